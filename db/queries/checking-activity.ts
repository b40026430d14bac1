import type { Db } from '@/db/open';
import { insertActivity } from '@/db/queries/activity';
import type { RevisionRecord } from '@/db/queries/revisions';

/** What a person did to a revision while it was checked. Within the transaction that does it. */
export async function insertCheckingActivity(
  within: Db,
  { office, project, batch, id }: RevisionRecord,
  by: { readonly id: number },
  what: string,
  detail: Readonly<Record<string, string | number | null>>,
): Promise<void> {
  await insertActivity(within, office, { what, project, batch, revision: id, person: by.id, detail });
}
