import { expect } from 'vitest';
import { memberExtremes } from '@/lib/analysis/member-extremes';
import { memberLine } from '@/lib/analysis/member-line';
import { valueAt } from '@/lib/analysis/value-at';
import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { unitsOf, type Ask, type PublishedCase } from './published-frame';

/** What the case asks of the solution, in the source's units. */
export function answer(frame: Frame, state: ResultState, published: PublishedCase, ask: Ask): number {
  const { length, force } = unitsOf(published);
  if (ask.of === 'critical load factor') return state.criticalLoadFactor ?? NaN;
  if (ask.of === 'movement' || ask.of === 'reaction') return atNode(frame, state, ask, length, force);
  const member = frame.members.findIndex((m) => m.id === ask.member);
  const line = memberLine(frame, state, member);
  const e = 6 * member;
  switch (ask.of) {
    case 'end force': {
      const [N, V, M] =
        ask.end === 'start' ? state.endForces.slice(e, e + 3) : state.endForces.slice(e + 3, e + 6).map((q) => -q);
      return ask.along === 'x' ? -N! / force : ask.along === 'y' ? V! / force : -M! / (force * length);
    }
    case 'place of extreme': {
      const extremes = memberExtremes(line);
      if (ask.quantity === 'v') {
        // the supported ends of these members do not move, so the chord is the axis
        expect(Math.sign(extremes.deflection.value)).toBe(ask.sign);
        return extremes.deflection.at / length;
      }
      return (ask.sign === 1 ? extremes.M.maxAt : extremes.M.minAt) / length;
    }
    default: {
      const x = ask.x! * length;
      const value = valueAt(line, Math.min(x, line.length), x >= line.length ? 'before' : 'after');
      if (ask.of === 'M') return value.M / (force * length);
      // along global X
      if (ask.of === 'ux') return globalX(frame, member, value.u, value.v) / length;
      if (ask.of === 'v' || ask.of === 'u') return value[ask.of] / length;
      return value[ask.of === 'N' ? 'N' : 'V'] / force;
    }
  }
}

function atNode(frame: Frame, state: ResultState, ask: Ask, length: number, force: number): number {
  const node = frame.nodes.findIndex((n) => n.id === ask.node);
  const support = frame.supports.findIndex((s) => s.node === node);
  const movement = ask.of === 'movement';
  const at = movement ? state.displacements.slice(3 * node, 3 * node + 3) : state.reactions.slice(3 * support, 3 * support + 3);
  if (ask.along === 'turn') return at[2]! / (movement ? 1 : force * length);
  const angle = ask.supportAxes ? frame.supports[support]!.angle_rad : 0;
  const x = at[0]! * Math.cos(angle) + at[1]! * Math.sin(angle);
  const y = at[1]! * Math.cos(angle) - at[0]! * Math.sin(angle);
  return (ask.along === 'x' ? x : y) / (movement ? length : force);
}

function globalX(frame: Frame, member: number, u: number, v: number): number {
  const { start, end } = frame.members[member]!;
  const [a, b] = [frame.nodes[start]!, frame.nodes[end]!];
  const L = Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m);
  return (u * (b.x_m - a.x_m) - v * (b.y_m - a.y_m)) / L;
}
