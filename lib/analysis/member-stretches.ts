import type { Frame } from '@/lib/model/frame';
import { memberData } from './member-data';
import { memberLoads, type LocalLoads } from './member-loads';

/** What one case does along a member, by place (and the stretch that begins there). */
export interface CaseStretches {
  /** q_x = lines[4i] + lines[4i + 1] s, q_y = lines[4i + 2] + lines[4i + 3] s, s from the place; N/m. */
  readonly lines: Float64Array;
  /** 1 where a load of the case begins, ends or stands. */
  readonly divides: Uint8Array;
  /** 1 where a force or moment of the case stands; null = it has none. */
  readonly jumps: Uint8Array | null;
  readonly Px: Float64Array;
  readonly Py: Float64Array;
  readonly M: Float64Array;
  /** Whether the case changes the axial force along the member. */
  readonly axial: boolean;
  /** Free strain and curvature. */
  readonly strain: number;
  readonly curvature: number;
}

/** The places at which loads of any case begin, end or stand, both ends among them, and what acts between. */
export interface Stretches {
  readonly places: Float64Array;
  /** By case; undefined where nothing acts. */
  readonly cases: readonly (CaseStretches | undefined)[];
}

const known = new WeakMap<Frame, (Stretches | undefined)[]>();

/** Loads of a member as every state of the frame takes them: sums over its cases. Worked out once a member. */
export function stretchesOf(frame: Frame, member: number): Stretches {
  let all = known.get(frame);
  if (!all) known.set(frame, (all = new Array<Stretches | undefined>(frame.members.length).fill(undefined)));
  return (all[member] ??= build(frame, member));
}

function build(frame: Frame, member: number): Stretches {
  const count = frame.cases.length;
  const loads = memberLoads(frame).slice(member * count, (member + 1) * count);
  const L = memberData(frame)[member]!.length;
  const met = [0, L];
  for (const acting of loads) {
    for (const line of acting?.lines ?? []) met.push(line.a, line.b);
    for (const place of acting?.places ?? []) met.push(place.x);
  }
  const places = met.length === 2 ? Float64Array.of(0, L) : distinct(met, L);
  return { places, cases: loads.map((acting) => acting && caseStretches(acting, places)) };
}

function caseStretches(acting: LocalLoads, places: Float64Array): CaseStretches {
  const n = places.length;
  const lines = new Float64Array(4 * n);
  const divides = new Uint8Array(n);
  for (const line of acting.lines) {
    const from = nearest(places, line.a);
    const to = nearest(places, line.b);
    divides[from] = divides[to] = 1;
    const span = line.b - line.a;
    const gx = (line.qx2 - line.qx1) / span;
    const gy = (line.qy2 - line.qy1) / span;
    for (let i = from; i < to; i++) {
      const s = places[i]! - line.a;
      lines[4 * i] = lines[4 * i]! + line.qx1 + gx * s;
      lines[4 * i + 1] = lines[4 * i + 1]! + gx;
      lines[4 * i + 2] = lines[4 * i + 2]! + line.qy1 + gy * s;
      lines[4 * i + 3] = lines[4 * i + 3]! + gy;
    }
  }
  const jumps = acting.places.length > 0 ? new Uint8Array(n) : null;
  const [Px, Py, M] = jumps ? [new Float64Array(n), new Float64Array(n), new Float64Array(n)] : [none, none, none];
  if (jumps)
    for (const place of acting.places) {
      const i = nearest(places, place.x);
      jumps[i] = divides[i] = 1;
      Px[i] = Px[i]! + place.Px;
      Py[i] = Py[i]! + place.Py;
      M[i] = M[i]! + place.M;
    }
  const axial = Px.some((P) => P !== 0) || lines.some((q, i) => (i & 3) < 2 && q !== 0);
  return { lines, divides, jumps, Px, Py, M, axial, strain: acting.strain, curvature: acting.curvature };
}

const none = new Float64Array(0);

/** Places along the member, ascending, those within rounding of one another (or of an end) taken as one. */
function distinct(places: number[], L: number): Float64Array {
  const near = 1e-12 * L;
  places.sort((a, b) => a - b);
  const cuts: number[] = [];
  for (const x of places) {
    const place = x <= near ? 0 : x >= L - near ? L : x;
    if (cuts.length === 0 || place - cuts[cuts.length - 1]! > near) cuts.push(place);
  }
  return Float64Array.from(cuts);
}

function nearest(places: Float64Array, x: number): number {
  let best = 0;
  for (let i = 1; i < places.length; i++) if (Math.abs(places[i]! - x) < Math.abs(places[best]! - x)) best = i;
  return best;
}
