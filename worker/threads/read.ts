/** In a thread of its own with bounded memory: a revision's uploaded files, or an earlier one's changed rows → what they say, stored. */
import { listOfficeLimits } from '@/db/queries/office-limits';
import { listOwnThings } from '@/db/queries/own-parts';
import { insertIntake, type IntakeStored } from '@/db/queries/intake';
import { findMaking } from '@/db/queries/changes';
import { listUploadedFiles, listUploads } from '@/db/queries/uploads';
import { readIntake } from '@/lib/intake/read-intake';
import { makeChanged } from './make-changed';
import { unreadIntake } from '../unread-intake';
import { openOnce } from './open-once';

export interface ReadTask {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly revision: number;
  /** Reading of the files' bytes stops itself after this time, with a problem that says so. */
  readonly deadline_s: number;
}

export async function readRevision(task: ReadTask): Promise<IntakeStored> {
  const until = performance.now() + 1000 * task.deadline_s;
  const database = openOnce(task.file);
  const { db, raw } = database;
  const making = findMaking(raw, task.office, task.revision);
  if (making)
    return insertIntake(raw, task.office, task.revision, await makeChanged(database, task.office, task.revision, making));
  const files = await listUploadedFiles(db, task.office, task.revision);
  const intake = await readIntake(files, {
    shouldStop: () => performance.now() > until,
    stopsAfter: `${task.deadline_s} s`,
    officeLimits: await listOfficeLimits(db, task.office),
    own: await listOwnThings(db, task.office),
  });
  return insertIntake(raw, task.office, task.revision, intake);
}

export interface UnreadTask extends Omit<ReadTask, 'deadline_s'> {
  readonly why: Parameters<typeof unreadIntake>[1];
}

/** Records that a reading was given up; takes away, beside the pages, what it had stored. */
export async function recordUnread({ file, office, revision, why }: UnreadTask): Promise<IntakeStored> {
  const { db, raw } = openOnce(file);
  return insertIntake(raw, office, revision, unreadIntake(await listUploads(db, office, revision), why));
}

export { previewChanges } from './preview-changes';
export { previewChangesSheet } from './preview-changes-sheet';
export { readOwnTable } from './read-own-table';
