import type { Frame } from '@/lib/model/frame';
import { LuDecomposition, Matrix } from 'ml-matrix';
import { equivalentLoads } from './second-loads';
import { secondModel, type MemberFacts, type SecondModel } from './second-model';

/** What the second analysis finds for one case, laid out as in a ResultState. */
export interface SecondState {
  readonly displacements: Float64Array;
  readonly reactions: Float64Array;
  readonly endForces: Float64Array;
}

/**
 * The second, independent analysis (engine, Certificate 3): dense, by transformation matrices, in global axes.
 *
 * It shares nothing with the first beyond the model: loads by the handbook's fixed-end formulas, ends that are not rigid
 * have a rotation of their own, and supports are held by Lagrange multipliers, which are the reactions. Solved by LU
 * with row exchanges.
 * @returns a state for each case; null where the equations are singular
 */
export function secondAnalysis(frame: Frame): SecondState[] | null {
  const model = secondModel(frame);
  const constraints = heldDirections(frame);
  const n = model.size;
  const K = Matrix.zeros(n + constraints.length, n + constraints.length);
  for (const member of model.members) spread(K, member.unknowns, globalStiffness(member));
  for (const [a, b, k] of model.springs)
    spread(
      K,
      [a, b],
      new Matrix([
        [k, -k],
        [-k, k],
      ]),
    );
  addSupportSprings(K, frame);
  const typical = Math.max(...Array.from({ length: n }, (_, i) => K.get(i, i)));
  for (let i = 0; i < n; i++) if (K.getRow(i).every((value) => value === 0)) K.set(i, i, typical);
  constraints.forEach((c, i) => {
    c.unknowns.forEach((unknown, k) => {
      K.set(n + i, unknown, typical * c.direction[k]!);
      K.set(unknown, n + i, typical * c.direction[k]!);
    });
  });
  const F = Matrix.zeros(n + constraints.length, frame.cases.length);
  frame.cases.forEach((_, c) => fillLoads(F, model, constraints, typical, c));
  const lu = new LuDecomposition(K);
  if (lu.isSingular()) return null;
  const solution = lu.solve(F);
  // one step of refinement: forces are differences of products of large stiffnesses
  solution.add(lu.solve(Matrix.sub(F, K.mmul(solution))));
  return frame.cases.map((_, c) => stateOf(model, constraints, typical, solution.getColumn(c), c));
}

interface Held {
  readonly support: number;
  readonly kind: 'x' | 'y' | 'turn';
  readonly unknowns: readonly number[];
  readonly direction: readonly number[];
}

function heldDirections(frame: Frame): Held[] {
  return frame.supports.flatMap((s, support) => {
    const held: Held[] = [];
    const plane = [3 * s.node, 3 * s.node + 1];
    const c = Math.cos(s.angle_rad);
    const d = Math.sin(s.angle_rad);
    if (s.ux === 'fixed') held.push({ support, kind: 'x', unknowns: plane, direction: [c, d] });
    if (s.uy === 'fixed') held.push({ support, kind: 'y', unknowns: plane, direction: [-d, c] });
    if (s.rz === 'fixed') held.push({ support, kind: 'turn', unknowns: [3 * s.node + 2], direction: [1] });
    return held;
  });
}

function supportSpring(frame: Frame, index: number): Matrix {
  const s = frame.supports[index]!;
  const number = (value: number | 'fixed' | 'free'): number => (typeof value === 'number' ? value : 0);
  const c = Math.cos(s.angle_rad);
  const d = Math.sin(s.angle_rad);
  const R = new Matrix([
    [c, d, 0],
    [-d, c, 0],
    [0, 0, 1],
  ]);
  return R.transpose()
    .mmul(Matrix.diag([number(s.ux), number(s.uy), number(s.rz)]))
    .mmul(R);
}

function addSupportSprings(K: Matrix, frame: Frame): void {
  frame.supports.forEach((s, i) => spread(K, [3 * s.node, 3 * s.node + 1, 3 * s.node + 2], supportSpring(frame, i)));
}

function spread(K: Matrix, unknowns: readonly number[], k: Matrix): void {
  unknowns.forEach((row, i) => unknowns.forEach((column, j) => K.set(row, column, K.get(row, column) + k.get(i, j))));
}

function localStiffness(EA: number, EI: number, l: number): Matrix {
  const a = EA / l;
  const b = (12 * EI) / l ** 3;
  const c = (6 * EI) / l ** 2;
  const d = (4 * EI) / l;
  const e = (2 * EI) / l;
  return new Matrix([
    [a, 0, 0, -a, 0, 0],
    [0, b, c, 0, -b, c],
    [0, c, d, 0, -c, e],
    [-a, 0, 0, a, 0, 0],
    [0, -b, -c, 0, b, -c],
    [0, c, e, 0, -c, d],
  ]);
}

function turning(ex: number, ey: number): Matrix {
  const T = Matrix.zeros(6, 6);
  for (const o of [0, 3]) {
    T.set(o, o, ex);
    T.set(o, o + 1, ey);
    T.set(o + 1, o, -ey);
    T.set(o + 1, o + 1, ex);
    T.set(o + 2, o + 2, 1);
  }
  return T;
}

function globalStiffness({ EA, EI, L, ex, ey }: MemberFacts): Matrix {
  const T = turning(ex, ey);
  return T.transpose()
    .mmul(localStiffness(EA, EI, L))
    .mmul(T);
}

function fillLoads(F: Matrix, model: SecondModel, constraints: readonly Held[], typical: number, loadCase: number): void {
  const { frame } = model;
  const add = (row: number, value: number): void => {
    F.set(row, loadCase, F.get(row, loadCase) + value);
  };
  for (const load of frame.nodeLoads) {
    if (load.case !== loadCase) continue;
    add(3 * load.node, load.Fx_N);
    add(3 * load.node + 1, load.Fy_N);
    add(3 * load.node + 2, load.Mz_Nm);
  }
  model.members.forEach((member, i) => {
    const p = equivalentLoads(model, i, loadCase);
    const global = turning(member.ex, member.ey).transpose().mmul(Matrix.columnVector(p));
    member.unknowns.forEach((unknown, k) => add(unknown, global.get(k, 0)));
  });
  constraints.forEach((held, i) => {
    const support = frame.supports[held.support]!;
    for (const s of frame.settlements) {
      if (s.case !== loadCase || s.node !== support.node) continue;
      const moved = held.kind === 'x' ? s.dx_m : held.kind === 'y' ? s.dy_m : s.rz_rad;
      add(model.size + i, typical * (moved ?? 0));
    }
  });
}

function stateOf(model: SecondModel, constraints: readonly Held[], typical: number, d: number[], loadCase: number): SecondState {
  const { frame } = model;
  const displacements = Float64Array.from({ length: 3 * frame.nodes.length }, (_, i) => d[i]!);
  const reactions = new Float64Array(3 * frame.supports.length);
  constraints.forEach((held, i) => {
    const force = -typical * d[model.size + i]!;
    held.direction.forEach((share, k) => {
      const at = 3 * held.support + (held.kind === 'turn' ? 2 : k);
      reactions[at] = reactions[at]! + force * share;
    });
  });
  frame.supports.forEach((s, i) => {
    const moved = Matrix.columnVector([d[3 * s.node]!, d[3 * s.node + 1]!, d[3 * s.node + 2]!]);
    const force = supportSpring(frame, i).mmul(moved);
    for (let k = 0; k < 3; k++) reactions[3 * i + k] = reactions[3 * i + k]! - force.get(k, 0);
  });
  const endForces = new Float64Array(6 * frame.members.length);
  model.members.forEach((member, i) => {
    const { EA, EI, ex, ey, L } = member;
    const u = turning(ex, ey).mmul(Matrix.columnVector(member.unknowns.map((unknown) => d[unknown]!)));
    const p = equivalentLoads(model, i, loadCase);
    const q = Matrix.sub(localStiffness(EA, EI, L).mmul(u), Matrix.columnVector(p)).getColumn(0);
    endForces.set([-q[0]!, q[1]!, -q[2]!, q[3]!, -q[4]!, q[5]!], 6 * i);
  });
  return { displacements, reactions, endForces };
}
