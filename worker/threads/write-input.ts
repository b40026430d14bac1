/** In a thread: a revision's input as a workbook, written from its rows. */
import { findMaking } from '@/db/queries/changes';
import { findRevisionById } from '@/db/queries/revisions';
import { listUploadedFiles } from '@/db/queries/uploads';
import { type InputFileWritten, inputWorkbook } from '@/lib/reports/input-workbook/input-workbook';
import { storedInput } from './make-changed';
import { openOnce } from './open-once';

export interface InputTask {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly revision: number;
}

/** Of a revision made by changes the very file that its input's SHA-256 is of. @throws {RangeError} where nothing was read */
export async function writeInput({ file, office, revision }: InputTask): Promise<InputFileWritten> {
  const database = openOnce(file);
  const found = await findRevisionById(database.db, office, revision);
  if (!found) throw new RangeError(`Expected revision ${revision} to be of office ${office}`);
  if (findMaking(database.raw, office, revision)) {
    const [kept] = await listUploadedFiles(database.db, office, revision);
    if (kept) return kept;
  }
  return inputWorkbook(await storedInput(database, office, revision), `${found.batchName} ${found.letter} input`);
}
