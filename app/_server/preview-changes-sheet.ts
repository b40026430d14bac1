import 'server-only';
import { databaseFile } from '@/db/client';
import type { RevisionRecord } from '@/db/queries/revisions';
import type { Person } from '@/lib/access/may';
import type { InputFile } from '@/lib/intake/intake';
import { pools } from '@/worker/boot';
import type { ChangesSheetAnswer, ChangesSheetTask } from '@/worker/threads/preview-changes-sheet';

/** What a Changes sheet would do, read in a thread. */
export async function previewChangesSheet(
  person: Person,
  revision: RevisionRecord,
  files: readonly InputFile[],
): Promise<ChangesSheetAnswer> {
  const task: ChangesSheetTask = { file: databaseFile(), office: person.office, revision: revision.id, files, by: person.name };
  const threads = pools();
  return (await threads.read.run(task, { filename: threads.bundle('read'), name: 'previewChangesSheet' })) as ChangesSheetAnswer;
}
