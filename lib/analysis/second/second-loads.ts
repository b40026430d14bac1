import type { Frame, MemberLoad } from '@/lib/model/frame';
import type { MemberFacts } from './second-model';

/**
 * What acts along one member, local axes, between the places where any load of any case begins, ends or stands: numbers of
 * all cases one after the other.
 */
export interface AlongMember {
  /** Lengths of the stretches, m. */
  readonly lengths: readonly number[];
  /** 4 a stretch: q_x, q_y at its start, N/m, and how they grow, N/m². */
  readonly lines: Float64Array;
  /** 3 a place (before each stretch and at the end): P_x, P_y, N, and M₀, N·m; empty where nothing stands anywhere. */
  readonly places: Float64Array;
  /** 2 a case: free strain and free curvature. */
  readonly free: Float64Array;
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
  const stands = rows.some((row) => row.kind === 'point' || row.kind === 'moment');
  const along: AlongMember = {
    lengths: at.slice(1).map((x, k) => x - at[k]!),
    lines: new Float64Array(4 * cases * stretches),
    places: new Float64Array(stands ? 3 * cases * at.length : 0),
    free: new Float64Array(2 * cases),
  };
  const line = (c: number, k: number, qx: number, qy: number, growX: number, growY: number): void => {
    const o = 4 * (c * stretches + k);
    along.lines[o]! += qx;
    along.lines[o + 1]! += qy;
    along.lines[o + 2]! += growX;
    along.lines[o + 3]! += growY;
  };
  const place = (c: number, x: number, Px: number, Py: number, M0: number): void => {
    const o = 3 * (c * at.length + at.indexOf(Math.min(x, facts.L)));
    along.places[o]! += Px;
    along.places[o + 1]! += Py;
    along.places[o + 2]! += M0;
  };
  frame.cases.forEach(({ selfWeight }, c) => {
    const w = selfWeight === 0 ? 0 : -selfWeight * facts.weight;
    for (let k = 0; k < stretches; k++) line(c, k, w * facts.ey, w * facts.ex, 0, 0);
  });
  for (const load of rows) {
    const c = load.case;
    if (load.kind === 'temperature') {
      if (load.dT_K !== 0) along.free[2 * c]! += facts.alpha * load.dT_K;
      if (load.dTAcross_K !== 0) along.free[2 * c + 1]! -= (facts.alpha * load.dTAcross_K) / facts.depth;
    } else if (load.kind === 'moment') {
      place(c, load.at_m, 0, 0, load.M_Nm);
    } else if (load.kind === 'point') {
      const [dx, dy] = directionOf(load.axes === 'local', load.direction, facts);
      place(c, load.at_m, load.P_N * dx, load.P_N * dy, 0);
    } else {
      const { from_m: a, q1_N_m: q1, q2_N_m: q2 } = load;
      const b = Math.min(load.to_m, facts.L);
      const shadow = load.axes !== 'projected' ? 1 : Math.abs(load.direction === 'y' ? facts.ex : facts.ey);
      const [dx, dy] = directionOf(load.axes === 'local', load.direction, facts);
      const grow = b > a ? (shadow * (q2 - q1)) / (b - a) : 0;
      for (let k = at.indexOf(a); k < at.indexOf(b); k++) {
        const q = shadow * q1 + grow * (at[k]! - a);
        line(c, k, q * dx, q * dy, grow * dx, grow * dy);
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
  readonly lines: Float64Array;
  readonly places: Float64Array;
  readonly strain: number;
  readonly curvature: number;
}

export function actingUnder({ lengths, lines, places, free }: AlongMember, factors: ArrayLike<number>): Acting {
  const cases = factors.length;
  const [q, P] = [new Float64Array(4 * lengths.length), places.length === 0 ? places : new Float64Array(3 * lengths.length + 3)];
  let strain = 0;
  let curvature = 0;
  for (let c = 0; c < cases; c++) {
    const k = factors[c]!;
    if (k === 0) continue;
    for (let i = 0, o = c * q.length; i < q.length; i++) q[i]! += k * lines[o + i]!;
    for (let i = 0, o = c * P.length; i < P.length; i++) P[i]! += k * places[o + i]!;
    strain += k * free[2 * c]!;
    curvature += k * free[2 * c + 1]!;
  }
  return { lengths, lines: q, places: P, strain, curvature };
}
