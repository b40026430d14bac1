/** In a thread: the sender's own files back with each bad cell filled and noted. */
import { listProblems, listSheets } from '@/db/queries/problems';
import { listUploadedFiles } from '@/db/queries/uploads';
import { markedCopy, type MarkedCopy } from '@/lib/reports/marked-copy/marked-copy';
import { openOnce } from './open-once';

export interface MarkedCopyTask {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly revision: number;
}

export async function writeMarkedCopy({ file, office, revision }: MarkedCopyTask): Promise<MarkedCopy> {
  const { db } = openOnce(file);
  const [files, problems, sheets] = await Promise.all([
    listUploadedFiles(db, office, revision),
    listProblems(db, office, revision),
    listSheets(db, office, revision),
  ]);
  const headingRows = new Map(
    sheets.flatMap(({ name, headingRow }) => (headingRow === null ? [] : [[name, headingRow] as const])),
  );
  return markedCopy(files, problems, headingRows);
}
