import type {
  DrawingData,
  DrawingJoint,
  DrawingLine,
  DrawingLoad,
  DrawingMethod,
  DrawingRestraint,
  DrawingResult,
} from './drawing-data';
import { memberExtremes } from '@/lib/analysis/member-extremes';
import { memberLine } from '@/lib/analysis/member-line';
import { sampleLine } from '@/lib/analysis/sample-line';
import type { Frame, Joint, MemberLoad, Restraint } from '@/lib/model/frame';
import type { MemberGoverning } from '@/lib/results/member-results';
import type { Check, FrameEvaluation, ResultState } from '@/lib/results/result';
import { imperfectionForces, noCasesAlone } from '@/lib/results/state-facts';
import { describeState } from '@/lib/results/describe-state';
import { plainMethod } from './plain-method';

/** Standard gravity, m/s² (ISO 80000-3; sheets §2). */
const g = 9.80665;
/** Equal steps along a member; extremes and jumps come on top. */
const steps = 24;

interface Drawn {
  readonly frame: Frame;
  readonly evaluation: FrameEvaluation | null;
  readonly members: readonly MemberGoverning[];
  readonly units: 'metric' | 'us';
  readonly nearLimit: number;
  /** Name of the case or combination chosen; null = the governing one. */
  readonly chosen: string | null;
}

/** A frame as the drawing takes it: geometry, and the states of the chosen result and of the movement view. */
export function drawingData({ frame, evaluation, members, units, nearLimit, chosen }: Drawn): DrawingData {
  const states = evaluation?.states ?? [];
  const shown = states.find((state) => state.name === chosen) ?? governingState(evaluation);
  const moving = movementState(evaluation, shown);
  return {
    frame: frame.id,
    title: frame.title,
    units,
    nearLimit,
    nodes: frame.nodes.map(({ id, x_m, y_m, place }) => ({ id, x: x_m, y: y_m, place })),
    members: frame.members.map((member, index) => ({
      id: member.id,
      start: member.start,
      end: member.end,
      section: frame.sections[member.section]?.name ?? '',
      role: member.role,
      startJoint: joint(member.startJoint),
      endJoint: joint(member.endJoint),
      ...governing(members[index]),
    })),
    supports: frame.supports.map(({ node, ux, uy, rz, angle_rad }) => ({
      node,
      ux: restraint(ux),
      uy: restraint(uy),
      rz: restraint(rz),
      angle: angle_rad,
    })),
    results: states.map(({ name, kind, purpose, criticalLoadFactor }) => ({ name, kind, purpose, criticalLoadFactor })),
    notApplicable: notApplicable(frame, states),
    noCasesAlone: noCasesAlone(frame),
    chosen: shown === null ? null : drawingResult(frame, shown),
    movement: moving === null || moving === shown ? null : drawingResult(frame, moving),
  };
}

/** One case or combination: loads times their factors, reactions, displacements, N V M and the deflected line sampled. */
function drawingResult(frame: Frame, state: ResultState): DrawingResult {
  return {
    name: state.name,
    kind: state.kind,
    purpose: state.purpose,
    description: state.kind === 'case' ? null : describeState(frame, state),
    loads: [
      ...frame.cases.flatMap((one, index) => loadsOf(frame, index, one.name, state.factors[index] ?? 0)),
      ...notionalForces(frame, state),
    ],
    reactions: frame.supports.map((_, index) => ({
      Fx: state.reactions[3 * index] ?? 0,
      Fy: state.reactions[3 * index + 1] ?? 0,
      Mz: state.reactions[3 * index + 2] ?? 0,
    })),
    displacements: frame.nodes.map((_, index) => ({
      ux: state.displacements[3 * index] ?? 0,
      uy: state.displacements[3 * index + 1] ?? 0,
      rz: finite(state.displacements[3 * index + 2]),
    })),
    lines: frame.members.map((_, index) => drawingLine(frame, state, index)),
    slack: state.method?.slack ?? [],
    method: methodOf(state),
  };
}

/** The loads of one load case as typed, with nothing that they do. @param index of the case in the frame */
export function drawingCase(frame: Frame, index: number): DrawingResult {
  const name = frame.cases[index]?.name ?? '';
  return {
    name,
    kind: 'case',
    purpose: null,
    description: null,
    loads: loadsOf(frame, index, name, 1),
    reactions: [],
    displacements: [],
    lines: [],
    slack: [],
    method: plainMethod,
  };
}

export function methodOf({ order, criticalLoadFactor, method }: ResultState): DrawingMethod {
  return {
    order,
    criticalLoadFactor,
    imperfection: method?.imperfection ?? null,
    shearDeformation: method?.shearDeformation ?? false,
    reducedStiffness: (method?.stiffness ?? null) !== null,
    loadScale: method?.loadScale ?? 1,
    iterations: method?.iterations ?? 1,
    change: method?.change ?? 0,
  };
}

/** Load cases that have no result of their own where others have one. */
export function notApplicable(frame: Frame, states: readonly ResultState[]): string[] {
  const own = new Set(states.filter((state) => state.kind === 'case').map((state) => state.name));
  return states.length === 0 ? [] : frame.cases.flatMap(({ name }) => (own.has(name) ? [] : [name]));
}

/** Forces that stand for the imperfections, as they act beside the loads of the combination. */
function notionalForces(frame: Frame, state: ResultState): DrawingLoad[] {
  return imperfectionForces(frame, state).map(({ node: id, Fx_N, Fy_N }) => {
    const node = frame.nodes.findIndex((one) => one.id === id);
    return { case: 'imperfection', kind: 'node', node, Fx: Fx_N, Fy: Fy_N, Mz: 0 };
  });
}

function drawingLine(frame: Frame, state: ResultState, member: number): DrawingLine {
  const line = memberLine(frame, state, member);
  const points = sampleLine(line, steps);
  return {
    x: points.map((point) => point.x),
    N: points.map((point) => point.N),
    V: points.map((point) => point.V),
    M: points.map((point) => point.M),
    u: points.map((point) => point.u),
    v: points.map((point) => point.v),
    extremes: memberExtremes(line),
    ratio: null,
  };
}

/** The combination of the frame's governing check, else the first strength combination, else the first result. */
export function governingState(evaluation: FrameEvaluation | null): ResultState | null {
  if (evaluation === null) return null;
  const { states, governing: worst } = evaluation;
  return (
    states.find((state) => state.name === worst?.combination && state.kind === 'combination') ??
    states.find((state) => state.purpose === 'strength') ??
    states[0] ??
    null
  );
}

/** The combination whose movement is nearest its limit, else the first service combination, else the one shown. */
function movementState(evaluation: FrameEvaluation | null, shown: ResultState | null): ResultState | null {
  if (evaluation === null) return shown;
  const moves = evaluation.checks.filter((check) => check.quantity === 'displacement' && check.ratio !== null);
  const worst = moves.reduce<Check | null>((best, check) => (best === null || check.ratio! > best.ratio! ? check : best), null);
  const named = evaluation.states.find((state) => state.kind === 'combination' && state.name === worst?.combination);
  return named ?? evaluation.states.find((state) => state.purpose === 'service') ?? shown;
}

/** What governs a member, as the members table has it. */
function governing(member: MemberGoverning | undefined) {
  if (member === undefined) return { ratio: null, verdict: 'not checked' as const, governs: null };
  const governs = [member.check, member.combination].filter((word) => word !== null).join(' ');
  return { ratio: member.ratio, verdict: member.verdict, governs: governs === '' ? null : governs };
}

function loadsOf(frame: Frame, index: number, name: string, factor: number): DrawingLoad[] {
  if (factor === 0) return [];
  const of = { case: name } as const;
  const own = frame.cases[index]?.selfWeight ?? 0;
  const weight = own === 0 ? [] : frame.members.flatMap((_, member) => selfWeight(frame, member, own * factor, name));
  const onNodes = frame.nodeLoads.filter((load) => load.case === index);
  const moved = frame.settlements.filter((one) => one.case === index);
  return [
    ...weight,
    ...frame.memberLoads.filter((load) => load.case === index).map((load) => memberLoad(load, factor, name)),
    ...onNodes.map(({ node, Fx_N, Fy_N, Mz_Nm }) => ({
      ...of,
      kind: 'node' as const,
      node,
      Fx: Fx_N * factor,
      Fy: Fy_N * factor,
      Mz: Mz_Nm * factor,
    })),
    ...moved.map(({ node, dx_m, dy_m, rz_rad }) => ({
      ...of,
      kind: 'settlement' as const,
      node,
      dx: times(dx_m, factor),
      dy: times(dy_m, factor),
      rz: times(rz_rad, factor),
    })),
  ];
}

function selfWeight(frame: Frame, member: number, factor: number, name: string): DrawingLoad[] {
  const { section, material, start, end } = frame.members[member]!;
  const density = frame.materials[material]?.density_kg_m3 ?? null;
  const area = frame.sections[section]?.properties.A_m2 ?? 0;
  if (density === null) return [];
  const q = -density * area * g * factor;
  const [a, b] = [frame.nodes[start]!, frame.nodes[end]!];
  const to = Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m);
  return [
    { case: name, kind: 'distributed', member, axes: 'global', direction: 'y', q1: q, q2: q, from: 0, to, selfWeight: true },
  ];
}

function memberLoad(load: MemberLoad, k: number, name: string): DrawingLoad {
  const { member } = load;
  switch (load.kind) {
    case 'distributed': {
      const { axes, direction, q1_N_m, q2_N_m, from_m, to_m } = load;
      return { case: name, kind: load.kind, member, axes, direction, q1: q1_N_m * k, q2: q2_N_m * k, from: from_m, to: to_m };
    }
    case 'point':
      return { case: name, kind: load.kind, member, axes: load.axes, direction: load.direction, P: load.P_N * k, at: load.at_m };
    case 'moment':
      return { case: name, kind: load.kind, member, M: load.M_Nm * k, at: load.at_m };
    case 'temperature':
      return { case: name, kind: load.kind, member, dT: load.dT_K * k, dTAcross: load.dTAcross_K * k };
  }
}

const joint = (one: Joint): DrawingJoint => (typeof one === 'number' ? 'spring' : one);
const restraint = (one: Restraint): DrawingRestraint => (typeof one === 'number' ? 'spring' : one);
const times = (value: number | null, factor: number): number | null => (value === null ? null : value * factor);
const finite = (value: number | undefined): number | null => (value === undefined || Number.isNaN(value) ? null : value);
