import type { Frame, MemberLoad } from '@/lib/model/frame';
import { memberData, type MemberData } from './member-data';

/** A linear load along local x and y from a to b, N/m. */
export interface LineLoad {
  readonly a: number;
  readonly b: number;
  readonly qx1: number;
  readonly qx2: number;
  readonly qy1: number;
  readonly qy2: number;
}
/** A force along local x and y and an anticlockwise moment at one place. */
export interface PlaceLoad {
  readonly x: number;
  readonly Px: number;
  readonly Py: number;
  readonly M: number;
}
/** Everything that acts on one member in one case, in local axes. */
export interface LocalLoads {
  readonly lines: readonly LineLoad[];
  readonly places: readonly PlaceLoad[];
  /** Free strain ε₀ = α dT and free curvature κ₀ = −α dT_across / depth. */
  readonly strain: number;
  readonly curvature: number;
}
interface Gathered {
  lines: LineLoad[];
  places: PlaceLoad[];
  strain: number;
  curvature: number;
}

const known = new WeakMap<Frame, readonly (LocalLoads | undefined)[]>();

/**
 * Loads of every member and case, resolved from what was typed into local axes (sheets §3, Member loads):
 * index member × number of cases + case; undefined where nothing acts. Computed once a frame.
 */
export function memberLoads(frame: Frame): readonly (LocalLoads | undefined)[] {
  const before = known.get(frame);
  if (before) return before;
  const cases = frame.cases.length;
  const data = memberData(frame);
  const all: (Gathered | undefined)[] = new Array<Gathered | undefined>(data.length * cases).fill(undefined);
  const at = (member: number, loadCase: number): Gathered =>
    (all[member * cases + loadCase] ??= { lines: [], places: [], strain: 0, curvature: 0 });
  frame.cases.forEach((loadCase, c) => {
    if (loadCase.selfWeight === 0) return;
    data.forEach((m, i) => {
      const q = -m.weight * loadCase.selfWeight;
      at(i, c).lines.push(lineLoad(m, q, q, 0, m.length, 'global', 'y'));
    });
  });
  for (const load of frame.memberLoads) add(at(load.member, load.case), load, data[load.member]!);
  known.set(frame, all);
  return all;
}

function add(into: Gathered, load: MemberLoad, m: MemberData): void {
  switch (load.kind) {
    case 'distributed':
      if (load.to_m > load.from_m)
        into.lines.push(lineLoad(m, load.q1_N_m, load.q2_N_m, load.from_m, load.to_m, load.axes, load.direction));
      return;
    case 'point': {
      const [ex, ey] = unitVector(m, load.axes, load.direction);
      into.places.push({ x: load.at_m, Px: load.P_N * ex, Py: load.P_N * ey, M: 0 });
      return;
    }
    case 'moment':
      into.places.push({ x: load.at_m, Px: 0, Py: 0, M: load.M_Nm });
      return;
    case 'temperature':
      if (load.dT_K !== 0) into.strain += m.expansion * load.dT_K;
      if (load.dTAcross_K !== 0) into.curvature -= (m.expansion * load.dTAcross_K) / m.depth;
  }
}

/** Local components of a unit force along the direction as typed. */
function unitVector(m: MemberData, axes: 'global' | 'local' | 'projected', direction: 'x' | 'y'): readonly [number, number] {
  if (axes === 'local') return direction === 'x' ? [1, 0] : [0, 1];
  return direction === 'x' ? [m.cos, -m.sin] : [m.sin, m.cos];
}

function lineLoad(
  m: MemberData,
  q1: number,
  q2: number,
  a: number,
  b: number,
  axes: 'global' | 'local' | 'projected',
  direction: 'x' | 'y',
): LineLoad {
  const [ex, ey] = unitVector(m, axes, direction);
  const share = axes === 'projected' ? Math.abs(direction === 'y' ? m.cos : m.sin) : 1;
  return { a, b, qx1: q1 * share * ex, qx2: q2 * share * ex, qy1: q1 * share * ey, qy2: q2 * share * ey };
}
