import type { OpenDatabase } from '@/db/open';
import {
  type ComparedRevisions,
  findCompared,
  iterateKeptRows,
  listComparedFrames,
  listComparedMembers,
  listComparedReactions,
} from '@/db/queries/compare';
import { listSheets } from '@/db/queries/problems';
import { byMovement, type FramePair, type MemberPair, pairFrames, pairMembers } from '@/lib/results/compare';
import { type Causes, causesOf } from '@/lib/results/compare-causes';
import { compareInputs, groupDifferences, type InputDifference, type InputGroup } from '@/lib/results/compare-inputs';
import { byReaction, pairReactions, type ReactionPair } from '@/lib/results/compare-reactions';

/** Two revisions compared, each list made when it is first asked for. Of a frame carried over nothing is read but its row. */
export interface Compared {
  /** In sheet order. */
  readonly frames: readonly FramePair[];
  readonly framesByMovement: () => readonly FramePair[];
  readonly members: () => readonly MemberPair[];
  readonly reactions: () => readonly ReactionPair[];
  readonly inputs: () => Promise<readonly InputDifference[]>;
  readonly inputGroups: () => Promise<readonly InputGroup[]>;
  /** What touches a frame or member that is not the same in both. */
  readonly causes: () => Promise<Causes>;
}

/** A thread keeps the last comparisons, so that their pages follow at once. */
const kept = new Map<string, Compared>();
const mostKept = 2;

/** @returns null where one of them is not the office's, or they are not of one batch */
export function comparedOf(database: OpenDatabase, office: number, before: number, after: number): Compared | null {
  const found = findCompared(database.raw, office, before, after);
  if (!found) return null;
  const key = [database.raw.name, office, before, after, found.stamp].join(' ');
  const known = kept.get(key);
  if (known) return known;
  if (kept.size >= mostKept) kept.delete(kept.keys().next().value!);
  const made = compare(database, office, found);
  kept.set(key, made);
  return made;
}

function compare({ db, raw }: OpenDatabase, office: number, { before, after }: ComparedRevisions): Compared {
  const frames = pairFrames(listComparedFrames(raw, before), listComparedFrames(raw, after));
  /** Frames that both have, and not the same. */
  const changed = frames.flatMap(({ before: was, after: is, carried }, i) => (was && is && !carried ? { pair: frames[i]!, was, is } : [])); // prettier-ignore
  const inputs = once(async () => {
    const [earlier, later] = [await listSheets(db, office, before), await listSheets(db, office, after)];
    return compareInputs(
      { sheets: earlier, rows: iterateKeptRows(raw, before) },
      { sheets: later, rows: iterateKeptRows(raw, after) },
    );
  });
  return {
    frames,
    framesByMovement: once(() => byMovement(frames)),
    members: once(() =>
      byMovement(
        changed.flatMap(({ pair, was, is }) =>
          pairMembers(pair, listComparedMembers(raw, before, was.index), listComparedMembers(raw, after, is.index)),
        ),
      ),
    ),
    reactions: once(() =>
      byReaction(
        changed.flatMap(({ pair, was, is }) =>
          // where one has no results there is nothing to compare: the frame itself says so
          was.status === 'solved' && is.status === 'solved'
            ? pairReactions(
                { id: pair.id, index: is.index },
                listComparedReactions(raw, before, was.index),
                listComparedReactions(raw, after, is.index),
              )
            : [],
        ),
      ),
    ),
    inputs,
    inputGroups: once(async () => groupDifferences(await inputs())),
    causes: once(async () =>
      causesOf(
        await inputs(),
        frames.flatMap(({ id, carried }) => (carried ? [] : [id])),
      ),
    ),
  };
}

function once<T>(make: () => T): () => T {
  let made: { readonly value: T } | undefined;
  return () => (made ??= { value: make() }).value;
}
