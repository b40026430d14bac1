/** In a thread: mechanisms and loose parts that a run has found, told as problems at their cells. */
import { insertProblems } from '@/db/queries/intake';
import { listProblems, listSheets } from '@/db/queries/problems';
import { inputRows, listFailures, updateProblemCounts } from '@/db/queries/waiting';
import { failureProblems } from '@/lib/results/failure-problem';
import { openOnce } from './open-once';

export interface FailuresTask {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly revision: number;
}

/** May be done again: a problem that is there is not added twice. */
export async function tellFailures({ file, office, revision }: FailuresTask): Promise<void> {
  const { db, raw } = openOnce(file);
  const failures = listFailures(raw, revision);
  if (failures.length === 0) return;
  const [problems, sheets] = await Promise.all([listProblems(db, office, revision), listSheets(db, office, revision)]);
  const found = failureProblems({ problems, sheets, rows: inputRows(raw, revision) }, failures);
  if (found.length === 0) return;
  insertProblems(raw, revision, found);
  updateProblemCounts(raw, revision);
}
