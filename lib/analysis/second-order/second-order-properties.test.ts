import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Frame, Member, MemberLoad } from '@/lib/model/frame';
import type { ResultState, StateMethod } from '@/lib/results/result';
import { memberLine } from '../member-line';
import { plainCase } from '../plain-frame';
import { evaluate } from '../polynomial';
import { randomFrame } from '../random-frame';
import { valueAt } from '../value-at';
import { analyseCombination, stateOf } from './analyse-combination';

// no shrinking: a failing frame is found again by its seed
const seeded = { seed: 20261202, numRuns: 60, endOnFailure: true };

/** The frame with all its loads × factor, and a shear area. */
function loaded(frame: Frame, factor: number): Frame {
  return {
    ...frame,
    sections: frame.sections.map((s) => ({ ...s, properties: { ...s.properties, AvShear_m2: s.properties.A_m2 / 3 } })),
    materials: frame.materials.map((m) => ({ ...m, G_Pa: 81e9 })),
    combinations: [{ name: 'C1', purpose: 'strength', terms: [{ case: 0, factor: 1.35 * factor }, { case: 1, factor: -0.7 * factor }] }], // prettier-ignore
  };
}
/** Frames heavily loaded, short of their critical load; the rest are not what is tested here. */
const heavy = fc.tuple(randomFrame, fc.constantFrom(1, 3, 8), fc.boolean());
function solved(frame: Frame, how: Partial<StateMethod> = {}): ResultState {
  const state = analyseCombination(frame, 0, how);
  if ('why' in state) fc.pre(false);
  return state as ResultState;
}

const size = (values: ArrayLike<number>, r: number, least: number): number => {
  let most = least;
  for (let i = r; i < values.length; i += 3) if (!Number.isNaN(values[i]!)) most = Math.max(most, Math.abs(values[i]!));
  return most;
};
function expectSame(a: ArrayLike<number>, b: ArrayLike<number>, share: number, least: number): void {
  for (let r = 0; r < 3; r++) {
    const scale = size(a, r, least);
    for (let i = r; i < a.length; i += 3) {
      if (Number.isNaN(a[i]!) && Number.isNaN(b[i]!)) continue;
      expect(Math.abs(a[i]! - b[i]!) / scale, `${i}: ${a[i]} against ${b[i]}`).toBeLessThan(share);
    }
  }
}

describe('any frame in second order', () => {
  it('comes to its first-order state as the loads go to nothing', () => {
    fc.assert(
      fc.property(heavy, ([frame, , shearDeformation]) => {
        const tiny = loaded({ ...frame, settlements: [] }, 1e-7);
        const [first, second] = [1, 2].map((order) => stateOf(tiny, 0, { shearDeformation }, order as 1 | 2));
        expectSame(first!.displacements, second!.displacements, 1e-5, 1e-12);
        expectSame(first!.endForces, second!.endForces, 1e-5, 1e-4);
      }),
      seeded,
    );
  });

  it('is not changed by new nodes along its members', () => {
    fc.assert(
      fc.property(
        heavy,
        fc.nat(),
        fc.double({ min: 0.1, max: 0.9, noNaN: true }),
        ([frame, factor, shearDeformation], which, part) => {
          const whole = loaded(frame, factor);
          const member = which % frame.members.length;
          const cut = split(whole, member, part);
          const [a, b] = [solved(whole, { shearDeformation }), solved(cut, { shearDeformation })];
          const count = 3 * frame.nodes.length;
          expectSame(a.displacements, b.displacements.subarray(0, count), 1e-8, 1e-5);
          const L = memberLine(whole, a, member).length;
          const scale = [0, 1, 2].map((r) => size(a.endForces, r, 1e3));
          for (const x of [0.03, 0.3, 0.5, 0.77, 0.99].map((s) => s * L)) {
            if (whole.memberLoads.some((load) => 'at_m' in load && Math.abs(load.at_m - x) < 1e-6)) continue;
            const here = valueAt(memberLine(whole, a, member), x);
            const first = memberLine(cut, b, member);
            const there =
              x < first.length ? valueAt(first, x) : valueAt(memberLine(cut, b, frame.members.length), x - first.length);
            expect(Math.abs(here.N - there.N) / scale[0]!).toBeLessThan(1e-8);
            expect(Math.abs(here.V - there.V) / scale[1]!).toBeLessThan(1e-8);
            expect(Math.abs(here.M - there.M) / scale[2]!).toBeLessThan(1e-8);
            expect(Math.abs(here.v - there.v) / size(a.displacements, 1, 1e-3)).toBeLessThan(1e-8);
          }
        },
      ),
      seeded,
    );
  });

  it('has lines that meet both ends and themselves, with V = dM/dx, within 1e-9', () => {
    fc.assert(
      fc.property(heavy, ([frame, factor, shearDeformation]) => {
        const whole = loaded(frame, factor);
        const state = solved(whole, { shearDeformation });
        whole.members.forEach((_, i) => {
          const { segments, length } = memberLine(whole, state, i);
          const [first, last] = [segments[0]!, segments[segments.length - 1]!];
          expect([first.from, last.to]).toEqual([0, length]);
          const most = (key: 'N' | 'V' | 'M'): number => Math.max(1, ...segments.flatMap((s) => [Math.abs(s[key][0]!), Math.abs(evaluate(s[key], s.to - s.from)), Math.abs(evaluate(s[key], (s.to - s.from) / 2))])); // prettier-ignore
          (['N', 'V', 'M'] as const).forEach((key, r) => {
            const floor = 1e-9 * Math.max(most(key), size(state.endForces, r, 1e3));
            expect(Math.abs(evaluate(first[key], 0) - state.endForces[6 * i + r]!)).toBeLessThan(floor);
            expect(Math.abs(evaluate(last[key], last.to - last.from) - state.endForces[6 * i + 3 + r]!)).toBeLessThan(floor);
          });
          segments.forEach((s, k) => {
            expect(Math.max(s.V.length, s.M.length)).toBeLessThanOrEqual(7);
            expect(s.v.length).toBeLessThanOrEqual(9);
            const h = s.to - s.from;
            for (const t of h > 0 ? [0.2, 0.5, 0.9] : []) {
              const slope = s.M.reduce((sum, c, n) => sum + (n > 0 ? n * c * (t * h) ** (n - 1) : 0), 0);
              // a derivative of what is close within 1e-9 is close within 1e-9 × degree² / length
              expect(Math.abs(slope - evaluate(s.V, t * h))).toBeLessThan(
                1e-9 * most('V') + (1e-7 * most('M')) / Math.max(h, 1e-3),
              );
            }
            const next = segments[k + 1];
            if (next) expect(Math.abs(evaluate(s.v, h) - next.v[0]!)).toBeLessThan(1e-12);
          });
        });
      }),
      seeded,
    );
  });

  it('is divided by the load scale: 1.6 × loads ÷ 1.6 is the same as the state under 1.6 × loads', () => {
    fc.assert(
      fc.property(randomFrame, (frame) => {
        const notional = Float64Array.from({ length: 2 * frame.nodes.length }, (_, i) => (i % 2 === 0 ? 700 : 0));
        const scaled = solved(loaded(frame, 1), { loadScale: 1.6, notional });
        const straight = solved(loaded(frame, 1.6), { notional });
        expectSame(
          straight.displacements,
          scaled.displacements.map((d) => 1.6 * d),
          1e-9,
          1e-6,
        );
        expectSame(
          straight.reactions,
          scaled.reactions.map((R) => 1.6 * R),
          1e-9,
          1,
        );
        const [a, b] = [memberLine(loaded(frame, 1.6), straight, 0), memberLine(loaded(frame, 1), scaled, 0)];
        for (const x of [0.2, 0.6].map((s) => s * a.length)) expect(valueAt(a, x).M).toBeCloseTo(1.6 * valueAt(b, x).M, 3);
      }),
      seeded,
    );
  });
});

/** The frame with one member cut at a part of its length; the new piece and the new node come last. */
function split(frame: Frame, member: number, part: number): Frame {
  const m = frame.members[member]!;
  const [a, b] = [frame.nodes[m.start]!, frame.nodes[m.end]!];
  const L = Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m);
  const at = part * L;
  const node = frame.nodes.length;
  const first: Member = { ...m, end: node, endJoint: 'rigid' };
  const second: Member = { ...m, id: 'cut', start: node, startJoint: 'rigid' };
  const index = frame.members.length;
  const loads = frame.memberLoads.flatMap((load): MemberLoad[] => {
    if (load.member !== member) return [load];
    if (load.kind === 'temperature') return [load, { ...load, member: index }];
    if (load.kind === 'distributed') {
      const q = (x: number): number =>
        load.q1_N_m + ((load.q2_N_m - load.q1_N_m) * (x - load.from_m)) / (load.to_m - load.from_m || 1);
      if (load.to_m <= at) return [load];
      if (load.from_m >= at) return [{ ...load, member: index, from_m: load.from_m - at, to_m: load.to_m - at }];
      return [
        { ...load, to_m: at, q2_N_m: q(at) },
        { ...load, member: index, from_m: 0, to_m: load.to_m - at, q1_N_m: q(at) },
      ];
    }
    return [load.at_m <= at ? load : { ...load, member: index, at_m: load.at_m - at }];
  });
  return {
    ...frame,
    nodes: [...frame.nodes, { id: 'new', x_m: a.x_m + part * (b.x_m - a.x_m), y_m: a.y_m + part * (b.y_m - a.y_m), place: null }],
    members: [...frame.members.map((one, i) => (i === member ? first : one)), second],
    memberLoads: loads,
    cases: frame.cases.map((one) => ({ ...plainCase(one.name), ...one })),
  };
}
