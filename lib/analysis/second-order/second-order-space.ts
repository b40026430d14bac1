import type { Frame } from '@/lib/model/frame';
import type { Topology } from '../topology';
import { emptyPasses, type Passes } from './next-guess';
import { emptyLoading, type MemberLoading } from './member-loading';

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
  /** By member: N at the start of each as taken and as answered, and answered with both ends held along it. */
  readonly N: Float64Array;
  readonly answer: Float64Array;
  readonly held: Float64Array;
  readonly passes: Passes;
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
    N: row(members),
    answer: row(members),
    held: row(members),
    passes: emptyPasses(members),
  };
}
