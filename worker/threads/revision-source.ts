import { countWaiting } from '@/db/queries/results';
import type { OpenDatabase, RawDatabase } from '@/db/open';
import { frameRows, readStates, type FrameRow } from '@/db/queries/frame-rows';
import { type ChangeRecord, listChanges } from '@/db/queries/changes';
import { listRevisionParts } from '@/db/queries/own-parts';
import { listProblems, listSheets } from '@/db/queries/problems';
import { findRevisionById } from '@/db/queries/revisions';
import { inputRows, inputWidth } from '@/db/queries/waiting';
import { changeLine } from '@/lib/changes/change-words';
import { engineVersion } from '@/lib/analysis/engine-version';
import type { ReportFrame, ReportSource } from '@/lib/reports/workbook/report-source';
import { problemsInOrder } from '@/lib/results/failure-problem';
import type { ResultState } from '@/lib/results/result';

/** What result files of a stored revision are made from. @throws {RangeError} where the revision is not read */
export async function revisionSource({ db, raw }: OpenDatabase, office: number, revision: number): Promise<ReportSource> {
  const found = await findRevisionById(db, office, revision);
  if (!found?.settings || !found.origins || !found.input)
    throw new RangeError(`Expected revision ${revision} of office ${office} to be read`);
  const [problems, sheets, changes, parts] = await Promise.all([
    listProblems(db, office, revision),
    listSheets(db, office, revision),
    listChanges(db, office, revision),
    listRevisionParts(db, office, revision),
  ]);
  const unfinished = countWaiting(raw, revision).waiting > 0;
  return {
    title: {
      project: found.projectNumber ? `${found.projectNumber} ${found.projectName}` : found.projectName,
      batch: found.batchName,
      revision: found.letter,
      state: unfinished && found.state !== 'read' ? `${found.state} (not finished)` : found.state,
      prepared: `${(found.runBy ?? found.createdBy).name}, ${(found.runFinishedAt ?? found.createdAt).slice(0, 10)}`,
      checked: found.checked && `${found.checked.name}, ${found.checked.at.slice(0, 10)}`,
      issued: found.issued && `${found.issued.number}, ${found.issued.name}, ${found.issued.at.slice(0, 10)}`,
      madeBy: madeBy(found.madeFrom, changes),
    },
    engine: found.engine ?? engineVersion,
    input: found.input,
    settings: found.settings,
    origins: found.origins,
    problems: problemsInOrder(problems, sheets),
    parts,
    inputRows: () => inputRows(raw, revision),
    inputWidth: () => inputWidth(raw, revision),
    frames: framesOf(raw, revision),
  };
}

/** What the cover says of a revision made on screen. */
function madeBy(from: string | null, changes: readonly ChangeRecord[]): string[] {
  const [first] = changes;
  if (from === null || !first) return [];
  return [
    `from revision ${from} by ${first.person}, ${first.at.slice(0, 10)}`,
    ...changes.map(changeLine),
    `why: ${first.reason}`,
  ];
}

/** Frames of a revision up to this number are decoded once and kept for the passes of a workbook: about 60 MB. */
const mostKept = 1_200;
/** Numbers of their states that are kept as well, as many as fit: four or five sheets are made from the same ones. */
const mostStateBytes = 32 * 2 ** 20;

/** A version's states, read once where they fit into what may be kept, else each time. */
function statesOnce(raw: RawDatabase): (version: number) => readonly ResultState[] {
  const read = readStates(raw);
  const kept = new Map<number, readonly ResultState[]>();
  let bytes = 0;
  return (version) => {
    const known = kept.get(version);
    if (known) return known;
    const states = read(version);
    const size = states.reduce((sum, { displacements }) => sum + displacements.buffer.byteLength, 0);
    if (bytes + size <= mostStateBytes) {
      bytes += size;
      kept.set(version, states);
    }
    return states;
  };
}

function framesOf(raw: RawDatabase, revision: number): ReportSource['frames'] {
  const states = statesOnce(raw);
  let kept: readonly FrameRow[] | null = null;
  return function* (need): Generator<ReportFrame> {
    if (kept === null) {
      let seen: FrameRow[] | null = need.states || need.checks === false ? null : [];
      for (const row of frameRows(raw, revision, need)) {
        if (seen !== null && seen.length < mostKept) seen.push(row);
        else seen = null;
        yield { number: row.index + 1, ...row };
      }
      kept = seen;
      return;
    }
    for (const row of kept) {
      const { evaluation, version } = row;
      const whole = need.states && evaluation && version !== null ? { ...evaluation, states: states(version) } : evaluation;
      yield { number: row.index + 1, ...row, evaluation: whole };
    }
  };
}
