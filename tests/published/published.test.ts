import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { memberExtremes } from '@/lib/analysis/member-extremes';
import { memberLine } from '@/lib/analysis/member-line';
import { valueAt } from '@/lib/analysis/value-at';
import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { publishedFrame, unitsOf, type Ask, type PublishedCase } from './published-frame';

// What a case prints but the solution is not asked for stands in its `leftOut` with the reason. The second-order cases
// of the same collection come with second-order analysis.
const files = ['beams', 'rigid-frames', 'textbook-frames', 'buckling-loads'];
const analyser = createAnalyser();

for (const file of files) {
  const { group, cases } = read(file);
  describe(group, () => {
    for (const published of cases) {
      const memory = published.fromMemory ? ' (from memory)' : '';
      it(`${published.id} ${published.title}: ${published.source}${memory}`, () => {
        const frame = publishedFrame(published);
        const analysis = analyser.analyse(frame);
        if (!analysis.ok) throw new Error(analysis.failure.message);
        const state = analysis.states[1]!;
        expect(published.expected.length).toBeGreaterThan(0);
        for (const item of published.expected) {
          const found = answer(frame, state, published, item.ask);
          const allowed = Math.max((item.relative ?? 0) * Math.abs(item.value), item.absolute ?? 0);
          expect(allowed).toBeGreaterThan(0);
          const off = Math.abs(found - item.value);
          expect(off, `${item.what}: ${found} ${item.unit}, printed ${item.value}`).toBeLessThanOrEqual(allowed);
        }
      });
    }
  });
}

function read(file: string): { group: string; cases: PublishedCase[] } {
  return JSON.parse(readFileSync(new URL(`./${file}.json`, import.meta.url), 'utf8')) as {
    group: string;
    cases: PublishedCase[];
  };
}

/** What the case asks of the solution, in the source's units. */
function answer(frame: Frame, state: ResultState, published: PublishedCase, ask: Ask): number {
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
