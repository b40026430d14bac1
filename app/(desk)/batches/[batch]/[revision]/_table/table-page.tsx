import { TableSheet } from '@/app/_client/table-sheet';
import { needResults, pageRevision, type RevisionParams } from '@/app/_server/page-revision';
import { toParams, type SearchParams } from '@/app/_server/search-params';
import { Cautions } from '@/components/ui/notice';
import { Sheet } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listRows } from '@/db/queries/lists';
import { parametersOf } from '@/app/_server/view';
import { may } from '@/lib/access/may';
import { rowsAddress, rowsAtOnce } from '@/lib/api/rows-address';
import { viewFromParams } from '@/lib/api/view-address';
import { checkedWords } from '@/app/_server/checked-words';
import type { TableName } from '@/lib/tables/view';
import { RevisionHead } from '../_head/revision-head';

export interface TablePageProps {
  readonly params: Promise<RevisionParams>;
  readonly searchParams: Promise<SearchParams>;
}

/** The page of one table: its first rows are read here, the rest by the browser. */
export async function TablePage({ params, searchParams, table }: TablePageProps & { readonly table: TableName }) {
  const { person, revision } = await pageRevision(params, table);
  if (table !== 'problems') needResults(revision);
  const asked = toParams(await searchParams);
  const view = viewFromParams(table, asked);
  const at = { after: asked.get('after') ?? undefined, before: asked.get('before') ?? undefined };
  const page = await listRows(db(), person.office, revision.id, view, { limit: rowsAtOnce, ...at });
  if (page === undefined) throw new Error(`Expected rows of revision ${revision.id}`);
  const { batch, letter, units } = revision;
  return (
    <Sheet>
      <RevisionHead revision={revision} sheet={table} />
      <TableSheet
        batch={batch}
        letter={letter}
        table={table}
        units={units}
        nearLimit={revision.settings?.nearLimit ?? 0.9}
        parameters={await parametersOf(revision)}
        mayChange={may(person, 'change a revision')}
        first={{ address: rowsAddress(batch, letter, view, at), page }}
      />
      {table !== 'problems' && <Cautions {...checkedWords(revision)} />}
    </Sheet>
  );
}
