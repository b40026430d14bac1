import { memberLine } from '@/lib/analysis/member-line';
import { valueAt } from '@/lib/analysis/value-at';
import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import type { Agreement } from './balance';
import { directionOf, measured, statesByHand, weightPerMetre } from './typed-loads';

/** One member under one uniform load in one load case. */
export interface SpanIdentity {
  readonly result: string;
  readonly member: string;
  /** Load across the member, N per metre of its length; positive towards its bottom face (local −y). */
  readonly w: number;
  readonly L: number;
  readonly start: number;
  readonly middle: number;
  readonly end: number;
  /** middle − (start + end)/2, and wL²/8. */
  readonly found: number;
  readonly expected: number;
  readonly agreement: Agreement;
}

/** A member that is loaded across, but not by one uniform load. */
export interface SpanLeftOut {
  readonly result: string;
  readonly member: string;
  readonly why: string;
}

const tolerance = 1e-6;

/**
 * Moment at the middle less the mean of the end moments is wL²/8 wherever a uniform load acts across a straight member, whatever
 * its ends are joined to: d²M/ds² = q, so M(L/2) − (M(0) + M(L))/2 = −qL²/8 with q along local +y, and w = −q (statics; M positive
 * with the local −y face in tension). First order only: on the moved shape M = … + N v comes in. For an inclined member w is the
 * part of the load square to it, per metre of its own length: a projected load q has w = q cos²α.
 */
export function spansByHand(frame: Frame, states: readonly ResultState[]): { lines: SpanIdentity[]; leftOut: SpanLeftOut[] } {
  const lines: SpanIdentity[] = [];
  const leftOut: SpanLeftOut[] = [];
  for (const state of statesByHand(states))
    frame.members.forEach((member, i) => {
      const { w, why } = across(frame, state, i);
      if (why === null && w === 0) return;
      const reason = why ?? (state.method?.slack.includes(i) ? 'it is slack, so its weight hangs without bending it' : null);
      if (reason !== null) {
        leftOut.push({ result: state.name, member: member.id, why: reason });
        return;
      }
      const { L } = measured(frame, i);
      const line = memberLine(frame, state, i);
      const start = state.endForces[6 * i + 2]!;
      const end = state.endForces[6 * i + 5]!;
      const middle = valueAt(line, line.length / 2).M;
      const found = middle - (start + end) / 2;
      const expected = (w * L * L) / 8;
      const size = Math.max(Math.abs(expected), Math.abs(start), Math.abs(end));
      const agrees = Math.abs(found - expected) <= tolerance * size;
      const agreement = agrees ? 'agrees' : 'differs';
      lines.push({ result: state.name, member: member.id, w, L, start, middle, end, found, expected, agreement });
    });
  return { lines, leftOut };
}

/** The uniform load across a member, or why there is none that is uniform. */
function across(frame: Frame, state: ResultState, member: number): { w: number; why: string | null } {
  const m = measured(frame, member);
  let q = 0;
  for (const load of frame.memberLoads) {
    const k = state.factors[load.case] ?? 0;
    if (load.member !== member || k === 0 || load.kind === 'temperature') continue;
    if (load.kind === 'moment') return { w: 0, why: 'a moment acts on it' };
    const d = directionOf(load, m);
    // its part along local +y
    const part = -d.x * m.cy + d.y * m.cx;
    if (Math.abs(part) < 1e-12) continue;
    if (load.kind === 'point') {
      if (load.P_N !== 0) return { w: 0, why: 'a point load acts on it' };
      continue;
    }
    if (load.q1_N_m === 0 && load.q2_N_m === 0) continue;
    if (load.from_m > 1e-9 * m.L || load.to_m < (1 - 1e-9) * m.L) return { w: 0, why: 'a load covers a part of it only' };
    if (load.q1_N_m !== load.q2_N_m) return { w: 0, why: 'a load varies along it' };
    q += k * load.q1_N_m * part;
  }
  const weight = frame.cases.reduce((sum, { selfWeight }, c) => sum + (state.factors[c] ?? 0) * selfWeight, 0);
  if (weight !== 0 && Math.abs(m.cx) > 1e-12) q -= weight * weightPerMetre(frame, member) * m.cx;
  return Number.isFinite(q) ? { w: q === 0 ? 0 : -q, why: null } : { w: 0, why: 'its weight is not known' };
}
