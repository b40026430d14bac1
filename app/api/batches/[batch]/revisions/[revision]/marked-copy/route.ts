import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { attachment } from '@/app/_server/download';
import { databaseFile } from '@/db/client';
import { ApiError } from '@/lib/api/error';
import type { MarkedCopy } from '@/lib/reports/marked-copy/marked-copy';
import { pools } from '@/worker/boot';
import type { MarkedCopyTask } from '@/worker/threads/write-marked-copy';

/** The sender's own file back, each bad cell filled and noted; of several files a zip. Made in a thread. */
export const GET = door(
  atRevision('read a batch', async ({ revision }) => {
    if (revision.state === 'reading') throw new ApiError('conflict', 'The sheets are still being read. Ask again in a moment.');
    const task: MarkedCopyTask = { file: databaseFile(), office: revision.office, revision: revision.id };
    const { write, bundle } = pools();
    const made = (await write.run(task, { filename: bundle('write'), name: 'writeMarkedCopy' })) as MarkedCopy;
    return attachment(made.name, new Uint8Array(made.bytes));
  }),
);
