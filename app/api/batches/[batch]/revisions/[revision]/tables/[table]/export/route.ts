import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { attachment, textStream, xlsxStream } from '@/app/_server/download';
import { parse, queryOf } from '@/app/_server/input';
import { requireView, viewParameters } from '@/app/_server/view';
import { db } from '@/db/client';
import { iterateRows } from '@/db/queries/lists';
import { exportInput } from '@/lib/api/inputs';
import { viewSheet } from '@/lib/api/view-sheet';
import { csvOf } from '@/lib/reports/workbook/write-csv';

/** Exactly the view that the query describes, as CSV or XLSX: its rows, columns and order, in the batch's units. */
export const GET = door(
  atRevision<'table'>('take results away', async ({ request, person, revision, params }) => {
    const view = requireView(params.table, request);
    const { format } = parse(exportInput, queryOf(request));
    const sheet = viewSheet({
      view,
      units: revision.units,
      parameters: await viewParameters(revision, view),
      rows: () => iterateRows(db(), person.office, revision.id, view),
    });
    const name = `${revision.batchName} ${revision.letter} ${view.table}.${format}`;
    return attachment(name, format === 'csv' ? textStream(csvOf(sheet)) : xlsxStream([sheet]));
  }),
);
