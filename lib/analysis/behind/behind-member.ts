import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { nodeAngles } from '../assemble';
import { endForces, endInNodeAxes, toLocal } from '../load-vectors';
import type { MemberData } from '../member-data';
import { squareToAxis } from './bent-member';
import { memberInState, type MemberInState } from './member-in-state';
import { nodeDisplacements } from './node-displacements';

/** Everything between a member's end displacements and its end forces in one state, SI. */
export interface BehindMember extends MemberInState {
  /** Angle of the axes of its start and end node from global X, rad: a support's own, else 0. */
  readonly angles: readonly [number, number];
  /** k: 6 × 6 by rows, local axes, order u₁ v₁ φ₁ u₂ v₂ φ₂. */
  readonly local: readonly number[];
  /** T: 6 × 6 by rows, from the axes of the nodes to the member's: u = T d. */
  readonly turn: readonly number[];
  /** Tᵀ k T: 6 × 6 by rows, axes of the nodes. */
  readonly global: readonly number[];
  /** d = [x₁ y₁ rotation₁ x₂ y₂ rotation₂], axes of the nodes; 0 where a node has no rotation of its own. */
  readonly displacements: readonly number[];
  /** u = T d. */
  readonly localDisplacements: readonly number[];
  /** k u. */
  readonly byDisplacements: readonly number[];
  /** −Tᵀ q_F: what the member adds to the load vector, axes of the nodes. */
  readonly toLoadVector: readonly number[];
  /** q = k u + q_F. */
  readonly endForces: readonly number[];
  /**
   * The end forces of the result as q, from N, V, M at both ends: X₁ = −N₁, Y₁ = Q₁, m₁ = −M₁, X₂ = N₂, Y₂ = −Q₂, m₂ = M₂;
   * Q = V in first order, V (1 + N/GAv) − N ψ in second.
   */
  readonly stored: readonly number[];
}

/**
 * The numbers behind a member under one case or combination: the engine's own member data, stiffness, fixed-end forces
 * and displacements, put together as it does, q = k T d + q_F (README (2.2) to (2.8)). Matrices are written out by asking the
 * engine's functions for unit movements, so nothing is worked out a second way.
 *
 * @throws {RangeError} where the member is not of the frame
 */
export function behindMember(frame: Frame, state: ResultState, member: number): BehindMember {
  const inState = memberInState(frame, state, member);
  const { data, k, fixedEnd } = inState;
  const angles = nodeAngles(frame);
  const d = endsOf(nodeDisplacements(frame, state), data);
  const u = new Float64Array(6);
  const q = new Float64Array(6);
  const local = byColumns((unit) => copy(endForces(k, unit, q), q));
  const turn = byColumns((unit) => copy(intoLocal(data, angles, unit, u), u));
  const global = byColumns((unit) => {
    intoLocal(data, angles, unit, u);
    endForces(k, u, q);
    return intoNodeAxes(data, angles, q);
  });
  intoLocal(data, angles, d, u);
  const localDisplacements = [...u];
  endForces(k, u, q);
  const byDisplacements = [...q].map(plain);
  const e = state.endForces.subarray(6 * member, 6 * member + 6);
  const V = [e[1]!, e[4]!] as const;
  const Q = inState.bent ? squareToAxis(inState.bent, data, V) : V;
  return {
    ...inState,
    angles: [angles[data.start]!, angles[data.end]!],
    local,
    turn,
    global,
    displacements: [...d],
    localDisplacements,
    byDisplacements,
    toLoadVector: intoNodeAxes(data, angles, fixedEnd).map((value) => plain(-value)),
    endForces: byDisplacements.map((value, r) => value + fixedEnd[r]!),
    stored: [-e[0]!, Q[0], -e[2]!, e[3]!, -Q[1], e[5]!].map(plain),
  };
}

/** Six columns, each the answer to a unit movement, as a matrix by rows. */
function byColumns(answer: (unit: Float64Array) => readonly number[]): number[] {
  const matrix = new Array<number>(36).fill(0);
  for (let column = 0; column < 6; column++) {
    const unit = new Float64Array(6);
    unit[column] = 1;
    answer(unit).forEach((value, row) => (matrix[6 * row + column] = plain(value)));
  }
  return matrix;
}

function endsOf(displacements: Float64Array, { start, end }: MemberData): Float64Array {
  const ends = new Float64Array(6);
  ends.set(displacements.subarray(3 * start, 3 * start + 3), 0);
  ends.set(displacements.subarray(3 * end, 3 * end + 3), 3);
  return ends;
}

const intoLocal = (m: MemberData, angles: Float64Array, ends: Float64Array, u: Float64Array): void =>
  toLocal(m, angles, ends, 0, 3, u);

function intoNodeAxes(m: MemberData, angles: Float64Array, q: Float64Array): number[] {
  return [0, 1].flatMap((end) => [
    ...endInNodeAxes(m, angles[end === 0 ? m.start : m.end]!, q[3 * end]!, q[3 * end + 1]!),
    q[3 * end + 2]!,
  ]);
}

const copy = (_done: void, values: Float64Array): number[] => [...values];
/** −0 is written as 0. */
const plain = (value: number): number => value + 0;
