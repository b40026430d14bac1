import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { attachment, bodyOf } from '@/app/_server/download';
import { requireSizing } from '@/app/_server/sizings';
import { ApiError } from '@/lib/api/error';
import { csvOf } from '@/lib/reports/workbook/write-csv';
import { sizingSheet } from '@/lib/sizing/sizing-sheet';

/** Every candidate of every group of a sizing that is done, as CSV in the batch's units. */
export const GET = door(
  atRevision<'sizing'>('take results away', async ({ revision, params }) => {
    const { found, id } = await requireSizing(revision, params.sizing);
    if (found === null) throw new ApiError('conflict', 'This sizing has not found anything yet.');
    const sheet = sizingSheet(found, revision.units, revision.settings?.nearLimit ?? 0.9);
    const name = `${revision.batchName} ${revision.letter} sizing ${id}.csv`;
    return attachment(name, bodyOf(csvOf(sheet)));
  }),
);
