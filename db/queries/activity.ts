import { instant } from '@/db/clock';
import type { Db } from '@/db/open';

/** What was done, in a few fixed words (`ran a revision`), with what it was done to. Entries are only ever added. */
export interface ActivityEntry {
  readonly what: string;
  readonly project?: number;
  readonly batch?: number;
  readonly revision?: number;
  /** Null: the service itself. */
  readonly person: number | null;
  readonly detail?: Readonly<Record<string, string | number | null>>;
}

export interface ActivityListed {
  readonly id: number;
  readonly what: string;
  readonly project: number | null;
  readonly batch: number | null;
  readonly revision: number | null;
  readonly letter: string | null;
  readonly person: string | null;
  readonly detail: Readonly<Record<string, string | number | null>>;
  readonly at: string;
}

export async function insertActivity(db: Db, office: number, entry: ActivityEntry): Promise<void> {
  await db
    .insertInto('activity')
    .values({
      office,
      project: entry.project ?? null,
      batch: entry.batch ?? null,
      revision: entry.revision ?? null,
      person: entry.person,
      what: entry.what,
      detail: JSON.stringify(entry.detail ?? {}),
      at: instant(),
    })
    .execute();
}

/** The newest entries of an office, or of one of its projects. */
export async function listActivity(
  db: Db,
  office: number,
  { project, limit = 100 }: { readonly project?: number; readonly limit?: number } = {},
): Promise<ActivityListed[]> {
  let query = db
    .selectFrom('activity')
    .leftJoin('person', 'person.id', 'activity.person')
    .leftJoin('revision', 'revision.id', 'activity.revision')
    .select([
      'activity.id',
      'activity.what',
      'activity.project',
      'activity.batch',
      'activity.revision',
      'revision.letter',
      'person.name as person',
      'activity.detail',
      'activity.at',
    ])
    .where('activity.office', '=', office);
  if (project !== undefined) query = query.where('activity.project', '=', project);
  const rows = await query.orderBy('activity.id', 'desc').limit(limit).execute();
  return rows.map((row) => ({ ...row, detail: JSON.parse(row.detail) as ActivityListed['detail'] }));
}
