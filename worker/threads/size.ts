/** In a thread: what a sizing has to do, and a chunk of its frames with one choice of sections. */
import { createHash } from 'node:crypto';
import { listOwnParts } from '@/db/queries/own-parts';
import { beginSizing, findVersionFrame, insertPiece, listPieces, versionsToSize, type AnswerPiece } from '@/db/queries/sizing';
import { createAnalyser } from '@/lib/analysis/analyser';
import { engineVersion } from '@/lib/analysis/engine-version';
import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import { canonicalJson } from '@/lib/results/frame-hash';
import { designationsOf, rangeNames } from '@/lib/sections/library';
import { evaluateChoice } from '@/lib/sizing/evaluate-choice';
import { problemOf, type FrameGiven, type ProblemRead } from '@/lib/sizing/problem-of';
import type { SizingProblem } from '@/lib/sizing/problem';
import type { SectionTaken } from '@/lib/sizing/section-taken';
import { batchRange, mostCandidates, officeRange, type Candidate, type FrameAnswer, type SizingGroup, type SizingRequest } from '@/lib/sizing/sizing'; // prettier-ignore
import { openOnce } from './open-once';
import { sectionsOf } from './take-sections';

export interface ListSizingTask {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly revision: number;
  readonly sizing: number;
  readonly request: SizingRequest;
}

export interface SizingListed {
  readonly problem: SizingProblem;
  /** By frame of the problem. */
  readonly versions: readonly number[];
  /** What frames answered before the server ended or it was stopped. */
  readonly pieces: readonly AnswerPiece[];
}

export async function listSizing(task: ListSizingTask): Promise<SizingListed | { readonly refused: string }> {
  const database = openOnce(task.file);
  const { db, raw } = database;
  const versions: number[] = [];
  const hash = createHash('sha256').update(canonicalJson({ engine: engineVersion, request: task.request }));
  const used = new Set<string>();
  function* frames(): Generator<FrameGiven> {
    for (const { version, hash: content, ...given } of versionsToSize(raw, task.revision)) {
      versions.push(version);
      hash.update(`\n${content}`);
      for (const { name } of given.frame.sections) used.add(name);
      yield given;
    }
  }
  const problem = problemOf(frames(), task.request.groups);
  if ('refused' in problem) return problem;
  const own = task.request.groups.some(({ range }) => range === officeRange)
    ? await listOwnParts(db, task.office, 'section')
    : [];
  const offered = own.filter(({ retiredAt }) => retiredAt === null).map(({ name }) => name);
  const names = task.request.groups.map(({ range }) => namesOf(range, offered, [...used]));
  const asked = names.flatMap((some, g) => some.map((name) => ({ name, materials: problem.materials[g] ?? [] })));
  const taken = await sectionsOf(database, task.office, task.revision, asked);
  let at = 0;
  const groups = problem.groups.map((group, g) => {
    const some = (names[g] ?? []).map((name) => candidateOf(name, taken[at++], problem, g));
    return { ...group, candidates: some.filter((one) => withinDepth(one, group)) };
  });
  const empty = groups.find(({ candidates }) => candidates.length === 0);
  if (empty) return { refused: `No section of ${empty.range} is within the depths given for ${empty.name}.` };
  const many = groups.find(({ candidates }) => candidates.length > mostCandidates);
  if (many) {
    return {
      refused: `${many.range} has ${many.candidates.length} sections for ${many.name}; at most ${mostCandidates} are tried. Give depths between which to look.`,
    };
  }
  beginSizing(raw, task.sizing, { hash: hash.digest('hex'), engine: engineVersion });
  return { problem: { frames: problem.frames, groups }, versions, pieces: listPieces(raw, task.sizing) };
}

function namesOf(range: string, own: readonly string[], used: readonly string[]): readonly string[] {
  if (range === officeRange) return own;
  if (range === batchRange) return used;
  const known = rangeNames.find((name) => name === range);
  if (!known) throw new RangeError(`Expected a range of sections, got ${range}`);
  return designationsOf(known);
}

function candidateOf(name: string, found: Awaited<ReturnType<typeof sectionsOf>>[number] | undefined, { materials }: ProblemRead, g: number): Candidate {
  if (!found || 'unfit' in found) return { name, A_m2: 0, taken: null, unfit: found?.unfit ?? 'It is not to be had.' };
  const without = (materials[g] ?? []).find((material) => !found.materials[material]);
  const { A_m2 } = found.section.properties;
  // shown and changed to by the name that members would have
  if (without !== undefined) return { name: found.section.name, A_m2, taken: null, unfit: `It is not to be had of ${without}.` };
  return { name: found.section.name, A_m2, taken: found, unfit: null };
} // prettier-ignore

function withinDepth({ taken }: Candidate, { minDepth_m, maxDepth_m }: SizingGroup): boolean {
  if (minDepth_m === null && maxDepth_m === null) return true;
  const depth = taken?.section.properties.depth_m ?? null;
  // a depth typed in mm and kept in m comes back a rounding away
  return depth !== null && depth >= (minDepth_m ?? 0) - 1e-9 && depth <= (maxDepth_m ?? Infinity) + 1e-9;
}

export interface SizeTask {
  /** The database's file. */
  readonly file: string;
  readonly revision: number;
  readonly sizing: number;
  readonly settings: Settings;
  readonly groups: readonly Pick<SizingGroup, 'by' | 'name'>[];
  readonly choice: readonly number[];
  /** By group, of the choice. */
  readonly taken: readonly (SectionTaken | null)[];
  readonly versions: readonly number[];
}

const analyser = createAnalyser();
const kept = new Map<string, Frame>();
const mostKept = 3_000;

/** What frames answer, in the order of the task's versions; it is stored as well. */
export function sizeChunk(task: SizeTask): FrameAnswer[] {
  const { raw } = openOnce(task.file);
  const answers = task.versions.map((version) => {
    const key = `${task.file} ${task.revision} ${version}`;
    let frame = kept.get(key);
    if (!frame) {
      frame = findVersionFrame(raw, task.revision, version);
      if (!frame) throw new RangeError(`Expected frame version ${version} of revision ${task.revision}`);
      if (kept.size >= mostKept) kept.clear();
      kept.set(key, frame);
    }
    return evaluateChoice(analyser, frame, task.settings, task.groups, task.taken);
  });
  insertPiece(raw, task.sizing, { choice: task.choice, versions: task.versions, answers });
  return answers;
}
