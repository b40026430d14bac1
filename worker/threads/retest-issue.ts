/** In a thread: every frame of an issued revision evaluated by the present engine and held against what was stored. */
import { insertEngineTest } from '@/db/queries/engine-tests';
import { frameRows } from '@/db/queries/frame-rows';
import { findIssue } from '@/db/queries/issues';
import { updateJobProgress } from '@/db/queries/jobs';
import { findRevisionById } from '@/db/queries/revisions';
import { createAnalyser } from '@/lib/analysis/analyser';
import { engineVersion } from '@/lib/analysis/engine-version';
import { alteredFrame, type AlteredFrame } from '@/lib/issuing/altered-frame';
import { evaluateFrame } from '@/lib/results/evaluate';
import { openOnce } from './open-once';

export interface RetestTask {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly issue: number;
  readonly person: number;
  readonly job: number;
}

/** Frames that are named one by one. */
const mostNamed = 50;
const between = 50;

/** Nothing of the issue is touched: only what came of the test is kept. @throws {RangeError} where there is no such issue */
export async function retestIssue({ file, office, issue, person, job }: RetestTask): Promise<void> {
  const { db, raw } = openOnce(file);
  const found = await findIssue(db, office, issue);
  const revision = found && (await findRevisionById(db, office, found.revision.id));
  if (!revision?.settings) throw new RangeError(`Expected issue ${issue} to be of office ${office}`);
  const analyser = createAnalyser();
  const altered: AlteredFrame[] = [];
  let frames = 0;
  for (const { index, id, frame, evaluation } of frameRows(raw, revision.id, { states: true })) {
    if (frame === null || evaluation === null) continue;
    frames += 1;
    const now = evaluateFrame(analyser, frame, revision.settings, { second: false, all: false });
    const difference = alteredFrame({ number: index + 1, frame: id }, evaluation, now);
    if (difference) altered.push(difference);
    if (frames % between === 0) await updateJobProgress(db, job, { done: frames, total: revision.frames });
  }
  const other = (one: AlteredFrame): boolean => one.before.verdict !== one.now.verdict;
  const largest = altered.reduce((most, { ratioBy }) => Math.max(most, ratioBy), 0);
  await insertEngineTest(db, office, {
    issue,
    engine: engineVersion,
    person,
    frames,
    altered: altered.length,
    verdicts: altered.filter(other).length,
    largest: largest > 0 && Number.isFinite(largest) ? largest : null,
    list: [...altered]
      .sort((a, b) => Number(other(b)) - Number(other(a)) || b.ratioBy - a.ratioBy || b.forceBy - a.forceBy)
      .slice(0, mostNamed),
  });
  await updateJobProgress(db, job, { done: frames, total: frames });
}
