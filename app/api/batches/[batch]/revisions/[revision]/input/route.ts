import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { attachment } from '@/app/_server/download';
import { requireRead } from '@/app/_server/make-change';
import { databaseFile } from '@/db/client';
import type { InputFileWritten } from '@/lib/reports/input-workbook/input-workbook';
import { pools } from '@/worker/boot';
import type { InputTask } from '@/worker/threads/write-input';

/** A revision's input as a workbook, changes included: uploaded anew it gives the same frames. Written in a thread. */
export const GET = door(
  atRevision('read a batch', async ({ revision }) => {
    requireRead(revision);
    const task: InputTask = { file: databaseFile(), office: revision.office, revision: revision.id };
    const { write, bundle } = pools();
    const made = (await write.run(task, { filename: bundle('write'), name: 'writeInput' })) as InputFileWritten;
    return attachment(made.name, new Uint8Array(made.bytes));
  }),
);
