import { countWaiting } from '@/db/queries/results';
import type { OpenDatabase } from '@/db/open';
import { frameRows } from '@/db/queries/frame-rows';
import { listProblems, listSheets } from '@/db/queries/problems';
import { findRevisionById } from '@/db/queries/revisions';
import { inputRows } from '@/db/queries/waiting';
import { engineVersion } from '@/lib/analysis/engine-version';
import type { ReportFrame, ReportSource } from '@/lib/reports/workbook/report-source';
import { problemsInOrder } from '@/lib/results/failure-problem';

/** What result files of a stored revision are made from. @throws {RangeError} where the revision is not read */
export async function revisionSource({ db, raw }: OpenDatabase, office: number, revision: number): Promise<ReportSource> {
  const found = await findRevisionById(db, office, revision);
  if (!found?.settings || !found.origins || !found.input)
    throw new RangeError(`Expected revision ${revision} of office ${office} to be read`);
  const [problems, sheets] = await Promise.all([listProblems(db, office, revision), listSheets(db, office, revision)]);
  const unfinished = countWaiting(raw, revision).waiting > 0;
  return {
    title: {
      project: found.projectNumber ? `${found.projectNumber} ${found.projectName}` : found.projectName,
      batch: found.batchName,
      revision: found.letter,
      state: unfinished && found.state !== 'read' ? `${found.state} (not finished)` : found.state,
      prepared: `${(found.runBy ?? found.createdBy).name}, ${(found.runFinishedAt ?? found.createdAt).slice(0, 10)}`,
      checked: null,
      issued: null,
    },
    engine: found.engine ?? engineVersion,
    input: found.input,
    settings: found.settings,
    origins: found.origins,
    problems: problemsInOrder(problems, sheets),
    inputRows: () => inputRows(raw, revision),
    *frames(need): Generator<ReportFrame> {
      for (const row of frameRows(raw, revision, need)) yield { number: row.index + 1, ...row };
    },
  };
}
