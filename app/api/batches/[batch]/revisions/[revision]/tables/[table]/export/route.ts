import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { attachment } from '@/app/_server/download';
import { parse, queryOf } from '@/app/_server/input';
import { requireView, viewParameters } from '@/app/_server/view';
import { databaseFile } from '@/db/client';
import { exportInput } from '@/lib/api/inputs';
import { defaultSettings } from '@/lib/model/settings';
import { pools } from '@/worker/boot';
import { tableStream } from '@/worker/result-stream';

/** Exactly the view that the query describes, as CSV or XLSX: its rows, columns and order, in the batch's units, written in a thread. */
export const GET = door(
  atRevision<'table'>('take results away', async ({ request, person, revision, params }) => {
    const view = requireView(params.table, request);
    const { format } = parse(exportInput, queryOf(request));
    const content = tableStream(pools(), {
      file: databaseFile(),
      office: person.office,
      revision: revision.id,
      view,
      units: revision.units,
      nearLimit: revision.settings?.nearLimit ?? defaultSettings.nearLimit,
      parameters: await viewParameters(revision, view),
      as: format,
    });
    return attachment(`${revision.batchName} ${revision.letter} ${view.table}.${format}`, content);
  }),
);
