/** Which frames of a revision a checker has to see, and why each of them. Deterministic: the same revision gives the same list. */
import { createHash } from 'node:crypto';
import type { Verdict } from '@/lib/results/result';

/** A solved frame as the rule looks at it. */
export interface FrameToList {
  /** Place in sheet order, from 0. */
  readonly index: number;
  readonly id: string;
  readonly verdict: Verdict;
  readonly ratio: number | null;
  /** The check that governs it. */
  readonly check: string | null;
  readonly family: string | null;
  /** Numeric parameters of its family, SI. */
  readonly parameters: Readonly<Record<string, number>>;
}

export type ReasonToSee =
  | { readonly kind: 'over' | 'not checked' | 'near' | 'sample' }
  | { readonly kind: 'least' | 'greatest'; readonly family: string; readonly parameter: string }
  | { readonly kind: 'worst of'; readonly check: string };

export interface ListedFrame {
  readonly index: number;
  readonly part: ListPart;
  readonly reasons: readonly ReasonToSee[];
}

const listParts = ['over', 'not checked', 'near', 'sample'] as const;
export type ListPart = (typeof listParts)[number];

/** Share of all frames that the sample of frames within comes to, and the fewest of them. */
const share = 0.05;
const fewest = 5;

/** The rule in words, as it is shown over the list. */
export const ruleWords =
  'Every frame that is over, not checked or near. Of each family the frames at the least and the greatest of each parameter ' +
  '(of several, the one with the largest ratio). The worst frame of each check that governs. Of frames within, more are picked by ' +
  'a hash of the input’s SHA-256 and the frame’s name until they come to 5 % of all frames solved, at least five.';

/**
 * The list, in the order it is gone through: over, not checked, near (each worst first), then the sample in sheet order.
 * O(frames × parameters).
 *
 * @param frames those that have a solution; the others are not issued, and named apart
 * @param inputHash SHA-256 of the revision's input: what the sample is picked by
 */
export function framesToSee(frames: readonly FrameToList[], inputHash: string): ListedFrame[] {
  const reasons = new Map<number, ReasonToSee[]>();
  const add = (frame: FrameToList, reason: ReasonToSee): void => {
    const known = reasons.get(frame.index);
    if (known) known.push(reason);
    else reasons.set(frame.index, [reason]);
  };
  for (const frame of frames) if (frame.verdict !== 'within') add(frame, { kind: frame.verdict });
  for (const [frame, reason] of [...extremes(frames), ...worstOfChecks(frames)]) add(frame, reason);
  const within = frames.filter(({ verdict }) => verdict === 'within');
  const wanted = Math.min(Math.max(Math.ceil(share * frames.length), fewest), within.length);
  let listed = within.filter(({ index }) => reasons.has(index)).length;
  if (listed < wanted) {
    for (const frame of byHash(
      within.filter(({ index }) => !reasons.has(index)),
      inputHash,
    )) {
      if (listed >= wanted) break;
      add(frame, { kind: 'sample' });
      listed++;
    }
  }
  const inOrder = frames.filter(({ index }) => reasons.has(index)).sort(inListOrder);
  return inOrder.map((frame) => ({ index: frame.index, part: partOf(frame.verdict), reasons: reasons.get(frame.index) ?? [] }));
}

const partOf = (verdict: Verdict): ListPart => (verdict === 'within' ? 'sample' : verdict);

function inListOrder(a: FrameToList, b: FrameToList): number {
  const [p, q] = [partOf(a.verdict), partOf(b.verdict)];
  if (p !== q) return listParts.indexOf(p) - listParts.indexOf(q);
  return p === 'sample' ? a.index - b.index : (b.ratio ?? -1) - (a.ratio ?? -1) || a.index - b.index;
}

/** Per family and parameter that varies: the frames at its least and greatest. */
function extremes(frames: readonly FrameToList[]): [FrameToList, ReasonToSee][] {
  const ends = new Map<string, { family: string; parameter: string; least: FrameToList; greatest: FrameToList }>();
  for (const frame of frames) {
    if (frame.family === null) continue;
    for (const [parameter, value] of Object.entries(frame.parameters)) {
      const key = JSON.stringify([frame.family, parameter]);
      const known = ends.get(key);
      if (!known) ends.set(key, { family: frame.family, parameter, least: frame, greatest: frame });
      else {
        const [low, high] = [known.least.parameters[parameter]!, known.greatest.parameters[parameter]!];
        if (value < low || (value === low && worse(frame, known.least))) known.least = frame;
        if (value > high || (value === high && worse(frame, known.greatest))) known.greatest = frame;
      }
    }
  }
  return [...ends.values()].flatMap(({ family, parameter, least, greatest }): [FrameToList, ReasonToSee][] =>
    least.parameters[parameter] === greatest.parameters[parameter]
      ? []
      : [
          [least, { kind: 'least', family, parameter }],
          [greatest, { kind: 'greatest', family, parameter }],
        ],
  );
}

const worse = (a: FrameToList, b: FrameToList): boolean => (a.ratio ?? -1) > (b.ratio ?? -1);

function worstOfChecks(frames: readonly FrameToList[]): [FrameToList, ReasonToSee][] {
  const worst = new Map<string, FrameToList>();
  for (const frame of frames) {
    if (frame.check === null || frame.ratio === null) continue;
    const known = worst.get(frame.check);
    if (!known || worse(frame, known)) worst.set(frame.check, frame);
  }
  return [...worst].map(([check, frame]) => [frame, { kind: 'worst of', check }]);
}

/** An order that nobody chose: by SHA-256 of the input's hash with the frame's name and place. */
function byHash(frames: readonly FrameToList[], inputHash: string): FrameToList[] {
  const keyed = frames.map((frame) => ({
    frame,
    key: createHash('sha256').update(`${inputHash}\n${frame.index}\n${frame.id}`).digest('hex'),
  }));
  keyed.sort((a, b) => (a.key < b.key ? -1 : a.key > b.key ? 1 : a.frame.index - b.frame.index));
  return keyed.map(({ frame }) => frame);
}

/** "greatest span of portal shed": why a frame is on the list, in a few words. */
export function reasonWords(reason: ReasonToSee): string {
  switch (reason.kind) {
    case 'least':
    case 'greatest':
      return `${reason.kind} ${reason.parameter} of ${reason.family}`;
    case 'worst of':
      return `worst of ${reason.check}`;
    case 'sample':
      return 'picked by hash';
    default:
      return reason.kind;
  }
}
