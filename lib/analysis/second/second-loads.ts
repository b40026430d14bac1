import type { Frame, MemberLoad } from '@/lib/model/frame';
import type { MemberFacts } from './second-model';

/**
 * What acts along one member, local axes, between the places where any load of any case begins, ends or stands.
 * Numbers of a stretch are by case: index case × stretches + stretch.
 */
export interface AlongMember {
  /** Lengths of the stretches, m. */
  readonly lengths: readonly number[];
  /** Line loads at the start of each stretch, N/m, and how they grow, N/m². */
  readonly qx: Float64Array;
  readonly qy: Float64Array;
  readonly growX: Float64Array;
  readonly growY: Float64Array;
  /** Forces and moments at the places before each stretch and at the end: index case × (stretches + 1) + place. */
  readonly Px: Float64Array;
  readonly Py: Float64Array;
  readonly M0: Float64Array;
  /** By case: free strain and free curvature. */
  readonly strain: Float64Array;
  readonly curvature: Float64Array;
}

/** The loads along every member, resolved from the sheet's rows (sheets §3, Member loads). */
export function loadsAlong(frame: Frame, members: readonly MemberFacts[]): AlongMember[] {
  const rows: MemberLoad[][] = members.map(() => []);
  for (const load of frame.memberLoads) rows[load.member]!.push(load);
  return members.map((facts, i) => alongOne(frame, facts, rows[i]!));
}

function alongOne(frame: Frame, facts: MemberFacts, rows: readonly MemberLoad[]): AlongMember {
  const places = [0, facts.L];
  for (const row of rows) {
    if (row.kind === 'distributed') places.push(row.from_m, row.to_m);
    else if (row.kind !== 'temperature') places.push(row.at_m);
  }
  const at = [...new Set(places.map((x) => Math.min(x, facts.L)))].sort((a, b) => a - b);
  const stretches = at.length - 1;
  const cases = frame.cases.length;
  const row = (): Float64Array => new Float64Array(cases * stretches);
  const place = (): Float64Array => new Float64Array(cases * at.length);
  const along = {
    lengths: at.slice(1).map((x, k) => x - at[k]!),
    qx: row(), qy: row(), growX: row(), growY: row(), Px: place(), Py: place(), M0: place(),
    strain: new Float64Array(cases), curvature: new Float64Array(cases),
  }; // prettier-ignore
  frame.cases.forEach((loadCase, c) => {
    if (loadCase.selfWeight === 0) return;
    for (let k = c * stretches; k < (c + 1) * stretches; k++) {
      along.qx[k]! -= loadCase.selfWeight * facts.weight * facts.ey;
      along.qy[k]! -= loadCase.selfWeight * facts.weight * facts.ex;
    }
  });
  for (const load of rows) {
    const c = load.case;
    if (load.kind === 'temperature') {
      if (load.dT_K !== 0) along.strain[c]! += facts.alpha * load.dT_K;
      if (load.dTAcross_K !== 0) along.curvature[c]! -= (facts.alpha * load.dTAcross_K) / facts.depth;
    } else if (load.kind === 'moment') {
      along.M0[c * at.length + at.indexOf(Math.min(load.at_m, facts.L))]! += load.M_Nm;
    } else if (load.kind === 'point') {
      const [dx, dy] = directionOf(load.axes === 'local', load.direction, facts);
      const k = c * at.length + at.indexOf(Math.min(load.at_m, facts.L));
      along.Px[k]! += load.P_N * dx;
      along.Py[k]! += load.P_N * dy;
    } else {
      const { from_m: a, q1_N_m: q1, q2_N_m: q2 } = load;
      const b = Math.min(load.to_m, facts.L);
      const shadow = load.axes !== 'projected' ? 1 : Math.abs(load.direction === 'y' ? facts.ex : facts.ey);
      const [dx, dy] = directionOf(load.axes === 'local', load.direction, facts).map((d) => d * shadow) as [number, number];
      const grow = b > a ? (q2 - q1) / (b - a) : 0;
      for (let k = at.indexOf(a); k < at.indexOf(b); k++) {
        const q = q1 + grow * (at[k]! - a);
        const o = c * stretches + k;
        along.qx[o]! += q * dx;
        along.qy[o]! += q * dy;
        along.growX[o]! += grow * dx;
        along.growY[o]! += grow * dy;
      }
    }
  }
  return along;
}

/** Local components of a unit load along a local or global axis. */
function directionOf(local: boolean, direction: 'x' | 'y', { ex, ey }: MemberFacts): readonly [number, number] {
  if (local) return direction === 'x' ? [1, 0] : [0, 1];
  return direction === 'x' ? [ex, -ey] : [ey, ex];
}

/** The loads along one member under factors × cases: the sum of what {@link AlongMember} holds by case. */
export interface Acting {
  readonly lengths: readonly number[];
  readonly qx: Float64Array;
  readonly qy: Float64Array;
  readonly growX: Float64Array;
  readonly growY: Float64Array;
  readonly Px: Float64Array;
  readonly Py: Float64Array;
  readonly M0: Float64Array;
  readonly strain: number;
  readonly curvature: number;
}

export function actingUnder(along: AlongMember, factors: ArrayLike<number>): Acting {
  const stretches = along.lengths.length;
  const sum = (values: Float64Array, width: number): Float64Array => {
    const total = new Float64Array(width);
    for (let c = 0; c < factors.length; c++) {
      const k = factors[c]!;
      if (k !== 0) for (let i = 0; i < width; i++) total[i]! += k * values[c * width + i]!;
    }
    return total;
  };
  return {
    lengths: along.lengths,
    qx: sum(along.qx, stretches),
    qy: sum(along.qy, stretches),
    growX: sum(along.growX, stretches),
    growY: sum(along.growY, stretches),
    Px: sum(along.Px, stretches + 1),
    Py: sum(along.Py, stretches + 1),
    M0: sum(along.M0, stretches + 1),
    strain: sum(along.strain, 1)[0]!,
    curvature: sum(along.curvature, 1)[0]!,
  };
}
