import { memberFacts, type SecondModel, type Stretch } from './second-model';

/** What acts on one stretch in one case, local axes: trapezia over its whole length, free strain and curvature. */
export interface StretchLoad {
  x1: number;
  x2: number;
  y1: number;
  y2: number;
  strain: number;
  curvature: number;
}

/** Line loads and temperature of a stretch: the typed loads read off at both ends of it. */
export function stretchLoad(model: SecondModel, stretch: Stretch, loadCase: number): StretchLoad {
  const { frame } = model;
  const facts = memberFacts(frame, stretch.member);
  const sum: StretchLoad = { x1: 0, x2: 0, y1: 0, y2: 0, strain: 0, curvature: 0 };
  const globalLoad = (gx1: number, gy1: number, gx2: number, gy2: number): void => {
    sum.x1 += gx1 * facts.ex + gy1 * facts.ey;
    sum.x2 += gx2 * facts.ex + gy2 * facts.ey;
    sum.y1 += gy1 * facts.ex - gx1 * facts.ey;
    sum.y2 += gy2 * facts.ex - gx2 * facts.ey;
  };
  const heavy = frame.cases[loadCase]!.selfWeight;
  if (heavy !== 0) globalLoad(0, -heavy * facts.weight, 0, -heavy * facts.weight);
  for (const load of frame.memberLoads) {
    if (load.case !== loadCase || load.member !== stretch.member) continue;
    if (load.kind === 'temperature') {
      if (load.dT_K !== 0) sum.strain += facts.alpha * load.dT_K;
      if (load.dTAcross_K !== 0) sum.curvature += (-facts.alpha * load.dTAcross_K) / facts.depth;
    }
    if (load.kind !== 'distributed') continue;
    const mid = (stretch.from + stretch.to) / 2;
    if (mid <= load.from_m || mid >= load.to_m) continue;
    const at = (x: number): number => load.q1_N_m + ((load.q2_N_m - load.q1_N_m) * (x - load.from_m)) / (load.to_m - load.from_m);
    let q1 = at(stretch.from);
    let q2 = at(stretch.to);
    if (load.axes === 'projected') {
      const shadow = load.direction === 'y' ? Math.abs(facts.ex) : Math.abs(facts.ey);
      q1 *= shadow;
      q2 *= shadow;
    }
    if (load.axes === 'local' && load.direction === 'x') {
      sum.x1 += q1;
      sum.x2 += q2;
    } else if (load.axes === 'local') {
      sum.y1 += q1;
      sum.y2 += q2;
    } else if (load.direction === 'x') globalLoad(q1, 0, q2, 0);
    else globalLoad(0, q1, 0, q2);
  }
  return sum;
}

/** Forces on the ends of a stretch that stand for its loads, by handbook formulas for a full trapezium. Local axes. */
export function equivalentLoads(load: StretchLoad, length: number, EA: number, EI: number): number[] {
  const { x1, x2, y1, y2, strain, curvature } = load;
  const l = length;
  return [
    (l * (2 * x1 + x2)) / 6 - EA * strain,
    (l * (7 * y1 + 3 * y2)) / 20,
    (l * l * (3 * y1 + 2 * y2)) / 60 - EI * curvature,
    (l * (x1 + 2 * x2)) / 6 + EA * strain,
    (l * (3 * y1 + 7 * y2)) / 20,
    (-l * l * (2 * y1 + 3 * y2)) / 60 + EI * curvature,
  ];
}

/** Point forces and moments of a member in one case: place, global force, local force, moment. */
export function pointLoads(
  model: SecondModel,
  member: number,
  loadCase: number,
): { at: number; FX: number; FY: number; Px: number; Py: number; M: number }[] {
  const { ex, ey } = memberFacts(model.frame, member);
  return model.frame.memberLoads.flatMap((load) => {
    if (load.case !== loadCase || load.member !== member) return [];
    if (load.kind === 'moment') return [{ at: load.at_m, FX: 0, FY: 0, Px: 0, Py: 0, M: load.M_Nm }];
    if (load.kind !== 'point') return [];
    const along = load.direction === 'x';
    const [FX, FY] =
      load.axes === 'global'
        ? along
          ? [load.P_N, 0]
          : [0, load.P_N]
        : along
          ? [load.P_N * ex, load.P_N * ey]
          : [-load.P_N * ey, load.P_N * ex];
    return [{ at: load.at_m, FX, FY, Px: FX * ex + FY * ey, Py: FY * ex - FX * ey, M: 0 }];
  });
}
