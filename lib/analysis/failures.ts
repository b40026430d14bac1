import type { Frame } from '@/lib/model/frame';
import type { Failure } from '@/lib/results/result';
import type { Condition } from './condition';
import { memberData } from './member-data';
import { mostTurn } from './second-order/solve-second-order';
import { describeMovement, freeToMove, strains } from './mechanism';
import type { Topology } from './topology';

/** Why a frame's stiffness matrix could not be trusted to the digits asked for. */
export function lowDigits(frame: Frame, t: Topology, angles: Float64Array, condition: Condition, digits: number): Failure {
  // singular to working precision although each pivot passed: a mechanism all the same
  if (!(condition.condition < 1e14)) return freeOrHardlyHeld(frame, t, angles, condition.weakest);
  return hardlyHeld(frame, t, angles, condition.weakest, digits);
}

/** A movement that strains no member is a mechanism; one that does is lost beside something far stiffer. */
export function freeOrHardlyHeld(frame: Frame, t: Topology, angles: Float64Array, z: Float64Array): Failure {
  return strains(frame, t, angles, z) ? hardlyHeld(frame, t, angles, z, 0) : freeToMove(frame, t, angles, z);
}

function hardlyHeld(frame: Frame, t: Topology, angles: Float64Array, z: Float64Array, digits: number): Failure {
  const { node, how, remedy } = describeMovement(frame, t, angles, z);
  return {
    code: 'not-solved',
    node,
    message:
      `Node ${node} can almost freely ${how}: stiffnesses differ so much that only ${Math.max(0, Math.floor(digits))} digits ` +
      `of the results would be right (6 are asked for). ${stubRemedy(frame) ?? remedy}.`,
  };
}

/** A member far shorter than the rest is what makes stiffnesses differ so much: its nodes are better one. */
function stubRemedy(frame: Frame): string | null {
  const lengths = memberData(frame).map((m) => m.length);
  const shortest = Math.min(...lengths);
  if (!(shortest < 0.02 * Math.max(...lengths))) return null;
  const { id, start, end } = frame.members[lengths.indexOf(shortest)]!;
  const nodes = `${frame.nodes[start]!.id} and ${frame.nodes[end]!.id}`;
  return `Member ${id} is ${Number((1000 * shortest).toPrecision(3))} mm long, far stiffer than the rest: make its nodes ${nodes} one`;
}

/** Why one state has no position of equilibrium. */
export type StateTrouble =
  /**
   * Followed in stable equilibrium up to this share of its loads; α_cr, null = none or not known. `pulls`: how far each tie, in
   * order, is stretched as it gives way.
   */
  | {
      readonly kind: 'unstable';
      readonly reached: number;
      readonly criticalLoadFactor: number | null;
      readonly pulls?: readonly number[];
    }
  /** Beyond this share of its loads a member (index) turns further than small displacements allow. */
  | {
      readonly kind: 'too far';
      readonly reached: number;
      readonly member: number;
      readonly criticalLoadFactor: number | null;
      readonly pulls?: readonly number[];
    }
  | { readonly kind: 'not settled'; readonly reached: number }
  /** A member (index) whose axial force reaches what its section can carry, so that nothing of its stiffness is left. */
  | { readonly kind: 'squashed'; readonly member: number; readonly share: number }
  /** A member (index) pulled so hard for its I, m⁴, that it is a rope (second-order/ropes.ts). */
  | { readonly kind: 'rope'; readonly member: number; readonly slenderness: number; readonly leastI_m4: number }
  /**
   * Its members turn so far, `turned` (index) the most, that their lengthening would change it (drawn-shape.ts): the strains of
   * `member` (index) by the share `forces`, 0 = no more than is let pass, movements by `movements`; Infinity = it would not stand.
   */
  | {
      readonly kind: 'drawn shape';
      readonly turned: number;
      readonly turn: number;
      readonly member: number;
      readonly forces: number;
      readonly movements: number;
    }
  /** `caught`: whichever way it moves, some tie is stretched; how far each is (movement-without.ts). */
  | { readonly kind: 'free'; readonly movement: string; readonly caught: boolean; readonly stretches: readonly number[] };

/** @param name of the state as it is in the results; @param scale times which the loads were applied */
export function stateFailure(frame: Frame, name: string, scale: number, reduced: boolean, trouble: StateTrouble): Failure {
  return { code: 'not-solved', node: null, message: `${name}: ${troubleWords(frame, scale, reduced, trouble)}` };
}

export function troubleWords(frame: Frame, scale: number, reduced: boolean, trouble: StateTrouble): string {
  const loads = scale === 1 ? 'its loads' : `${scale} times its loads`;
  switch (trouble.kind) {
    case 'unstable':
      return `unstable at this load${softened(reduced)}: it stood up to ${figure(trouble.reached)} of ${loads}${critical(trouble, scale)}. ${remedy}`;
    case 'too far': {
      const id = frame.members[trouble.member]!.id;
      const alpha = trouble.criticalLoadFactor ?? Infinity;
      const turned = `${figure(trouble.reached)} of ${loads}, where member ${id} has turned by ${mostTurn} rad, the most for which small displacements hold`;
      return alpha * (reduced ? 0.8 : 1) <= scale
        ? `unstable at this load${softened(reduced)}: it stood up to ${turned}${critical(trouble, scale)}. ${remedy}`
        : `moves too far to be analysed${softened(reduced)}: it was followed up to ${turned}${critical(trouble, scale)}. ${remedy}`;
    }
    case 'not settled':
      return `the second-order analysis did not settle: it could be followed up to ${figure(trouble.reached)} of ${loads}.`;
    case 'squashed': {
      const id = frame.members[trouble.member]!.id;
      return `unstable at this load: member ${id} is pressed to ${figure(trouble.share)} of fy × A, which leaves it no stiffness (τ_b, AISC 360-22 C2.3(b)).`;
    }
    case 'rope': {
      const id = frame.members[trouble.member]!.id;
      const least = `${Number((trouble.leastI_m4 * 1e8).toPrecision(2))} cm⁴`;
      return (
        `member ${id} is pulled so hard for its I that it is a rope, not a bar: √(N/EI) × length is ` +
        `${Math.ceil(trouble.slenderness)}. With an I of ${least} or more it can be followed (a round bar has π d⁴/64).`
      );
    }
    case 'drawn shape':
      return (
        `changes its shape too much to be analysed on the drawn one${softened(reduced)}: member ${frame.members[trouble.turned]!.id} ` +
        `turns by ${trouble.turn.toPrecision(2)} rad under ${loads}, and what members lengthen as they turn, which is left out here, ` +
        `${lengthened(frame, trouble)}. Stiffen the frame, give flat members more rise, let their ends move along them, or reduce the load.`
      );
    case 'free':
      return trouble.movement;
  }
}

function lengthened(frame: Frame, { member, forces, movements }: Extract<StateTrouble, { kind: 'drawn shape' }>): string {
  if (!Number.isFinite(movements)) return 'would leave it no equilibrium near this one: it snaps through or gives way';
  if (forces > 0) return `would change the forces of member ${frame.members[member]!.id} by ${percent(forces)}`;
  return `would let it move ${percent(movements)} further`;
}

function percent(share: number): string {
  return `${Number((100 * share).toPrecision(2))} %`;
}

const remedy = 'Stiffen or brace the frame, or reduce the load.';

function softened(reduced: boolean): string {
  return reduced ? ' with the stiffness reduced (AISC 360-22 C2.3)' : '';
}

/** α_cr beside a share that was reached: they differ by what it leaves out. */
function critical({ criticalLoadFactor }: { readonly criticalLoadFactor: number | null }, scale: number): string {
  if (criticalLoadFactor === null) return '';
  const once = scale === 1 ? '' : ' of its loads once';
  return `; its critical load factor${once}, by first-order axial forces and full stiffness, is ${figure(criticalLoadFactor)}`;
}

/** Rounded down, so that a load that was not reached is never printed as reached. */
function figure(value: number): string {
  return String(Math.floor(value * 1000 * (1 + 1e-9)) / 1000);
}

/** Ties named of a failure; of more they are counted. */
const mostTies = 12;

/** A state whose tension-only members find no set. */
export function tieFailure(
  frame: Frame,
  name: string,
  { members, passes, why }: { readonly members: readonly number[]; readonly passes: number; readonly why: 'repeated' | 'passes' | string }, // prettier-ignore
): Failure {
  const ids = members.map((member) => frame.members[member]!.id);
  const one = ids.length === 1;
  const some =
    ids.length > mostTies ? `${ids.slice(0, mostTies - 1).join(', ')} and ${ids.length - mostTies + 1} more` : ids.join(', ');
  const named = `its tension-only member${one ? '' : 's'} ${some}`;
  const reason =
    why === 'repeated'
      ? `${named} never ${one ? 'settles' : 'settle'} as taut or slack`
      : why === 'passes'
        ? `${named} did not settle as taut or slack in ${passes} passes`
        : `${named} ${one ? 'is' : 'are'} slack, and without ${one ? 'it' : 'them'} ${why}`;
  return { code: 'not-solved', node: null, message: `${name}: ${reason}` };
}
