import type { SecondModel } from './second-model';

/** Boole's rule on five even points: exact to degree 5. */
const boole = [7 / 90, 32 / 90, 12 / 90, 32 / 90, 7 / 90] as const;

/**
 * Forces that a clamped member puts on its ends' nodes under everything that acts along it in one case, local axes:
 * the handbook's fixed-end formulas for a point force and a moment, the former summed over line loads by Boole's rule.
 */
export function equivalentLoads(model: SecondModel, member: number, loadCase: number): number[] {
  const facts = model.members[member]!;
  const { L, ex, ey, EA, EI } = facts;
  const p = [0, 0, 0, 0, 0, 0];
  const force = (x: number, Px: number, Py: number): void => {
    const a = x;
    const b = L - x;
    p[0]! += (Px * b) / L;
    p[3]! += (Px * a) / L;
    p[1]! += (Py * b * b * (3 * a + b)) / L ** 3;
    p[4]! += (Py * a * a * (a + 3 * b)) / L ** 3;
    p[2]! += (Py * a * b * b) / L ** 2;
    p[5]! -= (Py * a * a * b) / L ** 2;
  };
  const line = (from: number, to: number, q: (x: number) => readonly [number, number]): void => {
    boole.forEach((weight, k) => {
      const x = from + ((to - from) * k) / 4;
      const [qx, qy] = q(x);
      force(x, qx * weight * (to - from), qy * weight * (to - from));
    });
  };
  const heavy = model.frame.cases[loadCase]!.selfWeight;
  if (heavy !== 0) line(0, L, () => [-heavy * facts.weight * ey, -heavy * facts.weight * ex]);
  for (const load of model.frame.memberLoads) {
    if (load.case !== loadCase || load.member !== member) continue;
    if (load.kind === 'temperature') {
      const N = load.dT_K === 0 ? 0 : EA * facts.alpha * load.dT_K;
      const M = load.dTAcross_K === 0 ? 0 : (EI * facts.alpha * load.dTAcross_K) / facts.depth;
      p[0]! -= N;
      p[3]! += N;
      p[2]! += M;
      p[5]! -= M;
      continue;
    }
    if (load.kind === 'moment') {
      const a = load.at_m;
      const b = L - a;
      p[1]! -= (6 * load.M_Nm * a * b) / L ** 3;
      p[4]! += (6 * load.M_Nm * a * b) / L ** 3;
      p[2]! += (load.M_Nm * b * (b - 2 * a)) / L ** 2;
      p[5]! += (load.M_Nm * a * (a - 2 * b)) / L ** 2;
      continue;
    }
    const [dx, dy] = directionOf(load.axes === 'local', load.direction, ex, ey);
    if (load.kind === 'point') {
      force(load.at_m, load.P_N * dx, load.P_N * dy);
      continue;
    }
    const shadow = load.axes !== 'projected' ? 1 : load.direction === 'y' ? Math.abs(ex) : Math.abs(ey);
    const { from_m, to_m, q1_N_m, q2_N_m } = load;
    line(from_m, to_m, (x) => {
      const q = shadow * (q1_N_m + (to_m > from_m ? ((q2_N_m - q1_N_m) * (x - from_m)) / (to_m - from_m) : 0));
      return [q * dx, q * dy];
    });
  }
  return p;
}

/** Local components of a unit load along a local or global axis. */
function directionOf(local: boolean, direction: 'x' | 'y', ex: number, ey: number): readonly [number, number] {
  if (local) return direction === 'x' ? [1, 0] : [0, 1];
  return direction === 'x' ? [ex, -ey] : [ey, ex];
}
