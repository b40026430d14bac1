/** In a thread of its own with bounded memory: a revision's uploaded files → what they say, stored. */
import { insertIntake, type IntakeStored } from '@/db/queries/intake';
import { listUploadedFiles } from '@/db/queries/uploads';
import { readIntake } from '@/lib/intake/read-intake';
import { openOnce } from './open-once';

export interface ReadTask {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly revision: number;
}

export async function readRevision(task: ReadTask): Promise<IntakeStored> {
  const { db, raw } = openOnce(task.file);
  const files = await listUploadedFiles(db, task.office, task.revision);
  const intake = await readIntake(files);
  return insertIntake(raw, task.office, task.revision, intake);
}
