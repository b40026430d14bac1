import { CholeskyDecomposition, LuDecomposition, Matrix } from 'ml-matrix';
import type { Frame, Joint } from '@/lib/model/frame';

/** A frame in equilibrium as `inTurningPieces` finds it: by node ux, uy; by member its mean N and its largest moment. */
export interface Turned {
  readonly movements: readonly (readonly [number, number])[];
  readonly N: readonly number[];
  readonly M: readonly number[];
}

/** How far anything may move in one pass, m and rad. */
const furthest = 0.02;

interface Piece {
  readonly member: number;
  readonly at: readonly number[];
  readonly l: number;
  readonly T: Matrix;
  readonly bending: Matrix;
  readonly G: Matrix;
}

/**
 * For tests: a frame under its first case by many small pieces whose axial strain is (u₂ − u₁)/l + ½∫v′²/l (moderate turns),
 * cubic shapes, Newton's method from no load on. Written apart from the analysis. Node loads, even loads in global y over
 * whole members, temperature; supports along global axes, sprung ones too; rigid, pinned and axial-only members.
 *
 * @returns null where no stable equilibrium follows from no load: a step without one, or whose tangent is not positive definite
 */
export function inTurningPieces(frame: Frame, factor = 1, pieces = 8, steps = 20): Turned | null {
  const { E_Pa: E, expansion_perK } = frame.materials[0]!;
  const parts: Piece[] = [];
  const f = new Map<number, number>();
  const add = (dof: number, value: number): void => void f.set(dof, (f.get(dof) ?? 0) + value);
  let dofs = 3 * frame.nodes.length;
  const held = new Set<number>();
  const springs: [number, number][] = [];
  for (const { node, ...support } of frame.supports)
    (['ux', 'uy', 'rz'] as const).forEach((key, r) => {
      if (support[key] === 'fixed') held.add(3 * node + r);
      else if (typeof support[key] === 'number') springs.push([3 * node + r, support[key]]);
    });
  const turning = new Set<number>();
  const strain: number[] = [];
  frame.members.forEach((member, i) => {
    const [a, b] = [frame.nodes[member.start]!, frame.nodes[member.end]!];
    const { I_m4: I } = frame.sections[member.section]!.properties;
    const L = Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m);
    const [c, s, l] = [(b.x_m - a.x_m) / L, (b.y_m - a.y_m) / L, L / pieces];
    const T = Matrix.eye(6, 6);
    for (const o of [0, 3]) [[c, s], [-s, c]].forEach((row, r) => row.forEach((value, k) => T.set(o + r, o + k, value))); // prettier-ignore
    const rotation = (joint: Joint, node: number): number => {
      if (joint !== 'rigid' || member.axialOnly) return dofs++;
      turning.add(3 * node + 2);
      return 3 * node + 2;
    };
    let at = [3 * member.start, 3 * member.start + 1, rotation(member.startJoint, member.start)];
    strain.push(0);
    for (const load of frame.memberLoads)
      if (load.member === i && load.kind === 'temperature') strain[i] = load.dT_K * (expansion_perK ?? 0);
    for (let k = 1; k <= pieces; k++) {
      const last = k === pieces;
      const next = last ? [3 * member.end, 3 * member.end + 1, rotation(member.endJoint, member.end)] : [dofs++, dofs++, dofs++];
      parts.push({ member: i, at: [...at, ...next], l, T, bending: bendingOf(E * I, l), G: turningOf(l) });
      for (const load of frame.memberLoads) {
        if (load.member !== i || load.kind !== 'distributed') continue;
        const [qx, qy] = [load.q1_N_m * s, load.q1_N_m * c];
        const local = Matrix.columnVector([qx / 2, qy / 2, (qy * l) / 12, qx / 2, qy / 2, (-qy * l) / 12]).mul(l);
        const global = T.transpose().mmul(local);
        [...at, ...next].forEach((dof, r) => add(dof, global.get(r, 0)));
      }
      at = next;
    }
  });
  frame.nodes.forEach((_, node) => turning.has(3 * node + 2) || held.add(3 * node + 2));
  for (const { node, Fx_N, Fy_N, Mz_Nm } of frame.nodeLoads) [Fx_N, Fy_N, Mz_Nm].forEach((F, r) => F !== 0 && add(3 * node + r, F)); // prettier-ignore
  const free = Array.from({ length: dofs }, (_, i) => i).filter((i) => !held.has(i));
  const row = new Map(free.map((dof, r) => [dof, r]));
  const d = new Float64Array(dofs);
  const EA = (i: number): number => E * frame.sections[frame.members[i]!.section]!.properties.A_m2;
  /** N, the row that it works along, and end forces of a piece, local. */
  const state = ({ member, at, l, T, bending, G }: Piece, share: number) => {
    const u = T.mmul(Matrix.columnVector(at.map((dof) => d[dof]!)));
    const Gu = G.mmul(u);
    const along = Gu.clone();
    along.set(0, 0, along.get(0, 0) - 1);
    along.set(3, 0, along.get(3, 0) + 1);
    const mean = (u.get(3, 0) - u.get(0, 0)) / l + u.transpose().mmul(Gu).get(0, 0) / (2 * l);
    const N = EA(member) * (mean - share * strain[member]!);
    return { N, along, q: bending.mmul(u), force: Matrix.add(bending.mmul(u), Matrix.mul(along, N)) };
  };
  for (let step = 1; step <= steps; step++) {
    const share = (factor * step) / steps;
    let done = false;
    for (let pass = 0; pass < 60 && !done; pass++) {
      const K = Matrix.zeros(free.length, free.length);
      const left = free.map((dof) => share * (f.get(dof) ?? 0));
      let size = Math.max(1e-3, ...left.map(Math.abs));
      for (const [dof, k] of springs) {
        const r = row.get(dof)!;
        K.set(r, r, K.get(r, r) + k);
        left[r] = left[r]! - k * d[dof]!;
      }
      for (const part of parts) {
        const { N, along, force } = state(part, share);
        size = Math.max(size, Math.abs(N));
        const k = part.bending.clone().add(Matrix.mul(part.G, N)).add(along.mmul(along.transpose()).mul(EA(part.member) / part.l)); // prettier-ignore
        const global = part.T.transpose().mmul(k).mmul(part.T);
        const F = part.T.transpose().mmul(force);
        part.at.forEach((i, r) => {
          const p = row.get(i);
          if (p === undefined) return;
          left[p] = left[p]! - F.get(r, 0);
          part.at.forEach((j, c) => {
            const q = row.get(j);
            if (q !== undefined) K.set(p, q, K.get(p, q) + global.get(r, c));
          });
        });
      }
      if (!new CholeskyDecomposition(Matrix.add(K, K.transpose())).isPositiveDefinite()) return null;
      if (Math.max(...left.map(Math.abs)) < 1e-8 * size) done = true;
      else {
        const by = new LuDecomposition(K).solve(Matrix.columnVector(left)).to1DArray();
        // never so far that a step leaps over where nothing stands
        const whole = Math.min(1, furthest / Math.max(...by.map(Math.abs)));
        by.forEach((value, r) => (d[free[r]!] = d[free[r]!]! + whole * value));
      }
      if (!d.every(Number.isFinite)) return null;
    }
    if (!done) return null;
  }
  const N = frame.members.map(() => 0);
  const M = frame.members.map(() => 0);
  for (const part of parts) {
    const found = state(part, factor);
    M[part.member] = Math.max(M[part.member]!, Math.abs(found.force.get(2, 0)), Math.abs(found.force.get(5, 0)));
    N[part.member] = N[part.member]! + found.N / pieces;
  }
  return { movements: frame.nodes.map((_, i) => [d[3 * i]!, d[3 * i + 1]!] as const), N, M };
}

function bendingOf(EI: number, l: number): Matrix {
  const [a, b, c, e] = [(12 * EI) / l ** 3, (6 * EI) / l ** 2, (4 * EI) / l, (2 * EI) / l];
  return new Matrix([
    [0, 0, 0, 0, 0, 0],
    [0, a, b, 0, -a, b],
    [0, b, c, 0, -b, e],
    [0, 0, 0, 0, 0, 0],
    [0, -a, -b, 0, a, -b],
    [0, b, e, 0, -b, c],
  ]);
}

/** ∫v′² of a cubic as a form of its ends' movements. */
function turningOf(l: number): Matrix {
  return new Matrix([
    [0, 0, 0, 0, 0, 0],
    [0, 36, 3 * l, 0, -36, 3 * l],
    [0, 3 * l, 4 * l * l, 0, -3 * l, -l * l],
    [0, 0, 0, 0, 0, 0],
    [0, -36, -3 * l, 0, 36, -3 * l],
    [0, 3 * l, -l * l, 0, -3 * l, 4 * l * l],
  ]).div(30 * l);
}
