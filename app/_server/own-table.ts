import 'server-only';
import type { OwnKind } from '@/lib/intake/own/own-thing';
import type { OwnRecordsRead } from '@/lib/intake/own/read-own-records';
import type { InputFile } from '@/lib/intake/intake';
import type { System } from '@/lib/units/quantity';
import { pools } from '@/worker/boot';
import type { OwnTableTask } from '@/worker/threads/read-own-table';

/** A table of an office's own, read in a thread as every file is. */
export async function readOwnTable(kind: OwnKind, files: readonly InputFile[], units: System): Promise<OwnRecordsRead> {
  const threads = pools();
  const task: OwnTableTask = { kind, files, units };
  return (await threads.read.run(task, { filename: threads.bundle('read'), name: 'readOwnTable' })) as OwnRecordsRead;
}
