/** In a thread: the sender's own files back with each bad cell filled and noted. */
import { findMaking } from '@/db/queries/changes';
import { listProblems, listSheets } from '@/db/queries/problems';
import { listUploadedFiles } from '@/db/queries/uploads';
import type { InputFile } from '@/lib/intake/intake';
import type { Problem } from '@/lib/problems/problem';
import { markedCopy, type MarkedCopy } from '@/lib/reports/marked-copy/marked-copy';
import { openOnce } from './open-once';

export interface MarkedCopyTask {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly revision: number;
}

export async function writeMarkedCopy({ file, office, revision }: MarkedCopyTask): Promise<MarkedCopy> {
  const { db, raw } = openOnce(file);
  const [files, problems, sheets] = await Promise.all([
    listUploadedFiles(db, office, revision),
    listProblems(db, office, revision),
    listSheets(db, office, revision),
  ]);
  const headingRows = new Map(
    sheets.flatMap(({ name, headingRow }) => (headingRow === null ? [] : [[name, headingRow] as const])),
  );
  return markedCopy(files, findMaking(raw, office, revision) ? inOneFile(problems, files) : problems, headingRows);
}

/** A revision made by changes names the files that were brought in first; its own workbook has their cells at the same places. */
function inOneFile(problems: readonly Problem[], files: readonly InputFile[]): readonly Problem[] {
  const [only, second] = files;
  return only && !second ? problems.map((problem) => ({ ...problem, file: only.name })) : problems;
}
