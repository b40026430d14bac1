import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { rigidStorey, type Storey, type StoreyColumn } from './rigid-storey';
import { statesByHand, typedLoads, type Resultant } from './typed-loads';

/** Sway of a one-storey frame under horizontal load beside what its columns give with a rigid beam. SI. */
export interface SwayBounds {
  readonly result: string;
  /** Horizontal load in all, N. */
  readonly H: number;
  /** Mean movement of the column heads along H, as stored. */
  readonly sway: number;
  /** With a rigid beam: bases fixed, and pinned (null: it would not stand). */
  readonly fixed: number;
  readonly pinned: number | null;
  /** With the beam as stiff as it is, where a formula of one bay fits; null = none does. */
  readonly withBeam: number | null;
  readonly outcome: 'between' | 'above' | 'below';
  /** Agrees: between its bounds, or as the formula with the beam's own bending has it. */
  readonly agreement: 'agrees' | 'differs' | 'explained';
  readonly why: string | null;
}

export interface SwayLeftOut {
  /** Null: no result of the frame. */
  readonly result: string | null;
  readonly why: string;
}

/** Bases taken as fixed, as pinned, or as they are. */
type Bases = 'fixed' | 'pinned' | 'own';

/** Hand formulas leave axial strain and shear deformation out. */
const slackOfFormula = 0.03;
const slackOfBounds = 0.005;

/**
 * Sway of the column heads against its bounds for a rigid beam. Columns that carry H together with a beam that does not bend,
 * each fixed or pinned at its foot, move by
 *
 *   Σ H/Σ(12EI/h³) (bases fixed) and Σ H/Σ(3EI/h³) (bases pinned),
 *
 * since a column whose head cannot turn is 12EI/h³ stiff when its foot cannot turn either and 3EI/h³ when it can
 * (slope-deflection: M = 2EI/h(2θ₁ + θ₂ − 3δ/h) with θ = 0 at a fixed end, M = 0 at a pinned one). A load on a column counts with
 * the share that its head holds: the column's own shape under a unit movement of its head, 3ξ² − 2ξ³ fixed, (3ξ − ξ³)/2 pinned
 * (reciprocity). Fixed bases lie between the two for any beam under load at the head; pinned ones lie above the second by what
 * the beam bends: for one bay of equal columns and a level beam, H at its head,
 *
 *   pinned δ = Hh³/(6EI)(1 + 1/(2β)),  fixed δ = Hh³/(24EI) (4 + 6β)/(1 + 6β),  β = (I_b/l)/(I/h)
 *
 * (slope-deflection, sway antisymmetric: the beam's end is 6EI_b/l stiff).
 */
export function swayByHand(frame: Frame, states: readonly ResultState[]): { lines: SwayBounds[]; leftOut: SwayLeftOut[] } {
  const storey = rigidStorey(frame);
  if ('why' in storey) return { lines: [], leftOut: [{ result: null, why: storey.why }] };
  const lines: SwayBounds[] = [];
  const leftOut: SwayLeftOut[] = [];
  for (const state of statesByHand(states)) {
    const loads = typedLoads(frame, state);
    const why = whyNot(frame, state, loads, storey);
    if (why !== null) leftOut.push({ result: state.name, why });
    else lines.push(boundsOf(state, loads, storey));
  }
  return { lines, leftOut };
}

function whyNot(frame: Frame, state: ResultState, loads: readonly Resultant[], storey: Storey): string | null {
  const acts = (loadCase: number): boolean => (state.factors[loadCase] ?? 0) !== 0;
  if (frame.settlements.some((one) => acts(one.case))) return 'a support settles in it';
  if (frame.memberLoads.some((one) => one.kind === 'temperature' && acts(one.case))) return 'temperature acts in it';
  const across = loads.reduce((sum, one) => sum + Math.abs(one.fx), 0);
  const upright = loads.reduce((sum, one) => sum + Math.abs(one.fy), 0);
  const H = loads.reduce((sum, one) => sum + one.fx, 0);
  if (!(across > 0) || Math.abs(H) < 0.05 * across) return 'it has no horizontal load to one side';
  if (upright > 0.02 * across) return 'it has vertical loads too, which sway a frame by themselves';
  const onColumns = loads.some((one) => one.m !== 0 && isOfColumns(one, storey));
  return onColumns ? 'a moment acts on a column' : null;
}

const isOfColumns = ({ member, node }: Resultant, { columns }: Storey): boolean =>
  columns.some((column) => column.member === member || column.foot === node);

function boundsOf(state: ResultState, loads: readonly Resultant[], storey: Storey): SwayBounds {
  const { columns } = storey;
  const sum = (of: (column: StoreyColumn) => number): number => columns.reduce((total, column) => total + of(column), 0);
  const H = loads.reduce((total, { fx }) => total + fx, 0);
  const heldAtHead = (bases: Bases): number => loads.reduce((total, load) => total + load.fx * shareOf(load, columns, bases), 0);
  const k = (bases: Bases): number => sum((column) => stiffness(column, bases));
  const sign = Math.sign(heldAtHead('fixed')) || 1;
  const sway = (sign * sum(({ head }) => state.displacements[3 * head]!)) / columns.length;
  const fixed = (sign * heldAtHead('fixed')) / k('fixed');
  const pinned = k('pinned') > 0 ? (sign * heldAtHead('pinned')) / k('pinned') : null;
  // the least that the columns can move with the bases that they have
  const least = k('own') > 0 ? (sign * heldAtHead('own')) / k('own') : fixed;
  const topOnly = loads.every((load) => load.fx === 0 || !isOfColumns(load, storey));
  const withBeam = topOnly ? formulaWithBeam(Math.abs(H), storey) : null;
  const upper = pinned ?? Infinity;
  const outcome = sway < least * (1 - slackOfBounds) ? 'below' : sway > upper * (1 + slackOfBounds) ? 'above' : 'between';
  const near = withBeam !== null && Math.abs(sway - withBeam) <= slackOfFormula * withBeam;
  const { agreement, why } = judged(outcome, withBeam, near, storey);
  return { result: state.name, H: Math.abs(H), sway, fixed, pinned, withBeam, outcome, agreement, why };
}

function judged(
  outcome: SwayBounds['outcome'],
  withBeam: number | null,
  near: boolean,
  { bases }: Storey,
): Pick<SwayBounds, 'agreement' | 'why'> {
  if (outcome === 'below')
    return {
      agreement: 'differs',
      why: 'stiffer than its columns are with a rigid beam on the bases that they have: look for what else holds it, or a slip',
    };
  if (withBeam !== null && !near)
    return { agreement: 'differs', why: 'not as the formula of one bay with this beam has it, which leaves axial strain out' };
  if (outcome === 'between') return { agreement: 'agrees', why: null };
  if (near) return { agreement: 'agrees', why: 'above the bound by what the beam bends: the formula with this beam gives it' };
  return {
    agreement: 'explained',
    why:
      bases === 'fixed'
        ? 'above: load along the columns bends them between their ends too, and the beam turns'
        : 'above: the bases turn and the beam is not rigid; the bound is for a beam that does not bend',
  };
}

const footTurns = ({ footPinned, footJointPinned }: StoreyColumn, bases: Bases): boolean =>
  bases === 'pinned' || (bases === 'own' ? footPinned : footJointPinned);

/** 12EI/h³ with both ends held against turning, 3EI/h³ with one, 0 with none. */
function stiffness(column: StoreyColumn, bases: Bases): number {
  const held = (footTurns(column, bases) ? 0 : 1) + (column.headPinned ? 0 : 1);
  return (([0, 3, 12] as const)[held]! * column.EI) / column.h ** 3;
}

/** Share of a horizontal load that is held at the heads of the columns. */
function shareOf({ member, node, y }: Resultant, columns: readonly StoreyColumn[], bases: Bases): number {
  if (node !== null) return columns.some(({ foot }) => foot === node) ? 0 : 1;
  const column = columns.find((one) => one.member === member);
  if (!column) return 1;
  const xi = (y - column.y) / column.h;
  if (footTurns(column, bases)) return column.headPinned ? xi : (3 * xi - xi ** 3) / 2;
  return column.headPinned ? (3 * xi ** 2 - xi ** 3) / 2 : 3 * xi ** 2 - 2 * xi ** 3;
}

function formulaWithBeam(H: number, { columns, beam, bases }: Storey): number | null {
  const [a, b] = columns;
  if (!beam || columns.length !== 2 || !a || !b || bases === 'mixed') return null;
  const alike = Math.abs(a.EI - b.EI) <= 1e-6 * a.EI && Math.abs(a.h - b.h) <= 1e-6 * a.h;
  if (!alike || a.headPinned || b.headPinned) return null;
  const beta = (beam.EI / beam.l) / (a.EI / a.h); // prettier-ignore
  const unit = (H * a.h ** 3) / a.EI;
  return bases === 'pinned' ? (unit / 6) * (1 + 1 / (2 * beta)) : (unit / 24) * ((4 + 6 * beta) / (1 + 6 * beta));
}
