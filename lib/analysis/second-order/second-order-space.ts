import type { Frame } from '@/lib/model/frame';
import type { MemberData } from '../member-data';
import type { Topology } from '../topology';
import { emptyPasses, type Passes } from './next-guess';
import { emptyLoading, type MemberLoading } from './member-loading';
import { emptyPiece, type Piece } from './piece';

/** Room for second-order analyses of one frame, used again by every combination. */
export interface SecondOrderSpace {
  readonly K: Float64Array;
  readonly diagonal: Float64Array;
  readonly inner: Float64Array;
  readonly pivots: Float64Array;
  /** Displacements of the unknowns, 3 × size, node axes. */
  readonly d: Float64Array;
  /** Loads on nodes and all movements (prescribed ones too): 3 a node, node axes. */
  readonly nodeForces: Float64Array;
  readonly all: Float64Array;
  readonly loadings: readonly MemberLoading[];
  /** What `loadings` and `held` were last made for, so that both directions of a combination share them; null = nothing. */
  readonly made: { factors: Float64Array | null; data: readonly MemberData[] | null; loadScale: number };
  /** By member: N at the start of each as taken and as answered, and answered with both ends held along it. */
  readonly N: Float64Array;
  readonly answer: Float64Array;
  readonly held: Float64Array;
  readonly passes: Passes;
  /** Members as the state at hand has them, ends clamped to the nodes. */
  readonly pieces: readonly Piece[];
  /** Rotations of their own ends, 2 a member. */
  readonly turns: Float64Array;
  /** Turns of the lines between their ends, 1 a member. */
  readonly chords: Float64Array;
}

export function secondOrderSpace(frame: Frame, t: Topology): SecondOrderSpace {
  const row = (n: number): Float64Array => new Float64Array(n);
  const members = frame.members.length;
  return {
    K: row(9 * t.blocks),
    diagonal: row(3 * t.size),
    inner: row(6 * t.size),
    pivots: row(3 * t.size),
    d: row(3 * t.size),
    nodeForces: row(3 * frame.nodes.length),
    all: row(3 * frame.nodes.length),
    loadings: frame.members.map(emptyLoading),
    made: { factors: null, data: null, loadScale: 1 },
    N: row(members),
    answer: row(members),
    held: row(members),
    passes: emptyPasses(members),
    pieces: frame.members.map(emptyPiece),
    turns: row(2 * members),
    chords: row(members),
  };
}
