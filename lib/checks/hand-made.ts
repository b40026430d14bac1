import type { Combination, Frame, Limit, Material, Member, Section, SectionProperties } from '@/lib/model/frame';
import { defaultSettings, type Settings } from '@/lib/model/settings';
import type { Check, MemberLine, ResultState, Segment, StateMethod } from '@/lib/results/result';
import { checkFrame, type FrameChecks } from './check-frame';

/** For tests: sections, frames, states and member lines made by hand, so that every number of a check can be followed. */

const unknownProperties: SectionProperties = {
  A_m2: 0.01,
  I_m4: 1e-4,
  Wtop_m3: null,
  Wbottom_m3: null,
  depth_m: null,
  width_m: null,
  AvTyped_m2: null,
  AvPeak_m2: null,
  AvPeakTurned_m2: null,
  AvShear_m2: null,
  AvShearTurned_m2: null,
  Wpl_m3: null,
  Iminor_m4: null,
  Wminor_m3: null,
  WplMinor_m3: null,
  It_m4: null,
  Iw_m6: null,
  t_m: null,
};

/** A section by typed properties: A = 0.01 m², I = 1e-4 m⁴, W = 1e-3 m³, Av = 0.004 m² unless said otherwise. */
export function typedSection(change: Partial<SectionProperties> = {}): Section {
  const properties = { ...unknownProperties, Wtop_m3: 1e-3, Wbottom_m3: 1e-3, AvTyped_m2: 0.004, ...change };
  return { name: 'S', designation: null, shape: null, made: null, dimensions: null, properties, sources: {} };
}

/** E = 200 GPa, G = 80 GPa, fy = 250 MPa. */
export function steel(change: Partial<Material> = {}): Material {
  return {
    name: 'steel',
    grade: null,
    standard: null,
    E_Pa: 200e9,
    G_Pa: 80e9,
    fy_Pa: 250e6,
    fu_Pa: null,
    density_kg_m3: 7850,
    expansion_perK: 12e-6,
    sources: {},
    ...change,
  };
}

export function member(id: string, start: number, end: number, change: Partial<Member> = {}): Member {
  return {
    id,
    start,
    end,
    section: 0,
    material: 0,
    role: 'beam',
    startJoint: 'rigid',
    endJoint: 'rigid',
    axialOnly: false,
    tensionOnly: false,
    turned: false,
    span: null,
    lengthMajor_m: null,
    lengthMinor_m: null,
    lengthLtbTop_m: null,
    lengthLtbBottom_m: null,
    group: null,
    ...change,
  };
}

/** A beam AB of 10 m, pinned at A, a roller at B, with a strength combination C1 and a service combination S1. */
export function beamFrame(change: Partial<Frame> = {}): Frame {
  return {
    id: 'F1',
    title: null,
    group: null,
    count: 1,
    note: null,
    family: null,
    nodes: [
      { id: 'A', x_m: 0, y_m: 0, place: 'base' },
      { id: 'B', x_m: 10, y_m: 0, place: 'eaves' },
    ],
    members: [member('AB', 0, 1)],
    sections: [typedSection()],
    materials: [steel()],
    supports: [
      { node: 0, ux: 'fixed', uy: 'fixed', rz: 'free', angle_rad: 0 },
      { node: 1, ux: 'free', uy: 'fixed', rz: 'free', angle_rad: 0 },
    ],
    cases: [{ name: 'dead', kind: 'dead', selfWeight: 0, alternative: null, reversible: false, note: null }],
    nodeLoads: [],
    memberLoads: [],
    settlements: [],
    combinations: [combination('C1', 'strength'), combination('S1', 'service')],
    limits: [],
    notChecked: [],
    ...change,
  };
}

export const combination = (name: string, purpose: Combination['purpose']): Combination => ({
  name,
  purpose,
  terms: [{ case: 0, factor: 1 }],
});

export function limit(change: Partial<Limit> & Pick<Limit, 'measure'>): Limit {
  return {
    target: 'all',
    name: '*',
    direction: null,
    toNode: null,
    ratio: null,
    absolute_m: null,
    combination: null,
    namedFrame: false,
    source: 'Limits row 2',
    ...change,
  };
}

export function state(
  name: string,
  purpose: 'strength' | 'service',
  displacements: readonly number[] = [],
  alpha: number | null = null,
): ResultState {
  return {
    name,
    kind: 'combination',
    purpose,
    factors: new Float64Array([1]),
    order: 1,
    criticalLoadFactor: alpha,
    method: null,
    displacements: Float64Array.from(displacements),
    reactions: new Float64Array(),
    endForces: new Float64Array(),
  };
}

/** Of second order without more, converged in four passes. */
export function method(change: Partial<StateMethod> = {}): StateMethod {
  const plain = { shearDeformation: false, imperfection: null, notional: null, loadScale: 1, stiffness: null, slack: [] };
  return { ...plain, iterations: 4, change: 1e-10, ...change };
}

export function segment(from: number, to: number, forces: { N?: number[]; V?: number[]; M?: number[]; v?: number[] }): Segment {
  return { from, to, N: forces.N ?? [0], V: forces.V ?? [0], M: forces.M ?? [0], u: [0], v: forces.v ?? [0] };
}

/** One segment from 0 to L. */
export const line = (L: number, forces: { N?: number[]; V?: number[]; M?: number[]; v?: number[] }): MemberLine => ({
  length: L,
  segments: [segment(0, L, forces)],
});

export const settings = (change: Partial<Settings> = {}): Settings => ({ ...defaultSettings, ...change });

/** Checks a frame whose lines are given by combination and member id; whatever is not given carries nothing. */
export function check(
  frame: Frame,
  lines: Readonly<Record<string, Readonly<Record<string, MemberLine>>>>,
  change: Partial<Settings> = {},
  states: readonly ResultState[] = frame.combinations.map((c) =>
    state(c.name, c.purpose, new Array<number>(3 * frame.nodes.length).fill(0)),
  ),
  all = false,
): FrameChecks {
  const lineOf = (s: ResultState, m: number): MemberLine => lines[s.name]?.[frame.members[m]!.id] ?? line(10, {});
  return checkFrame(frame, settings(change), states, lineOf, { all });
}

/** The row of a subject's check; throws where there is none. */
export function rowOf(found: FrameChecks, name: string, subject: string | null = 'AB'): Check {
  const row = found.checks.find((c) => c.check === name && c.subject === subject);
  if (!row) throw new Error(`no ${name} of ${subject}: ${found.checks.map((c) => `${c.subject} ${c.check}`).join(', ')}`);
  return row;
}
