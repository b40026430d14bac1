import fc from 'fast-check';
import { expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { memberLine } from '@/lib/analysis/member-line';
import { randomFrame } from '@/lib/analysis/random-frame';
import type { Frame, MemberLoad } from '@/lib/model/frame';
import { findDesignation } from '@/lib/sections/find-designation';
import { checkFrame, type FrameChecks } from './check-frame';
import { limit, settings, steel } from './hand-made';

const analyser = createAnalyser();

/** The random frame with sections that can be checked, a span word on every member, limits and two service combinations. */
function checkable(frame: Frame): Frame {
  const sections = ['IPE 300', 'HE 200 A'].map((name) => {
    const found = findDesignation(name);
    if (!('section' in found)) throw new Error(`no ${name}`);
    return found.section;
  });
  const lengths = { lengthMajor_m: 3, lengthMinor_m: 1, lengthLtbTop_m: 1, lengthLtbBottom_m: 2 };
  return {
    ...frame,
    sections,
    materials: [steel({ grade: 'S235', standard: 'EN', fy_Pa: 235e6, E_Pa: 210e9, G_Pa: 81e9 })],
    members: frame.members.map((m) => ({ ...m, ...lengths, span: m.id, role: m.id.startsWith('C') ? 'column' : 'beam' })),
    combinations: [
      ...frame.combinations,
      { name: 'S1', purpose: 'service', terms: [{ case: 0, factor: 1 }, { case: 1, factor: 1 }] },
      { name: 'S2', purpose: 'service', terms: [{ case: 1, factor: -1 }] },
    ],
    limits: [limit({ measure: 'deflection', ratio: 250 }), limit({ measure: 'sway', ratio: 300 })],
  }; // prettier-ignore
}

function checked(frame: Frame, all = false): FrameChecks {
  const analysis = analyser.analyse(frame, { second: false });
  if (!analysis.ok) throw new Error(analysis.failure.message);
  return checkFrame(frame, settings(), analysis.states, (state, member) => memberLine(frame, state, member), { all });
}

/** The frame with one member cut in two at a new node; the second piece may be drawn the other way where it has no loads. */
function split(frame: Frame, which: number, part: number): Frame {
  const old = frame.members[which]!;
  const [a, b] = [frame.nodes[old.start]!, frame.nodes[old.end]!];
  const cut = part * Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m);
  const node = { id: 'cut', x_m: a.x_m + part * (b.x_m - a.x_m), y_m: a.y_m + part * (b.y_m - a.y_m), place: null };
  const [first, second] = [which, frame.members.length];
  const members = [...frame.members, { ...old, id: `${old.id}'`, start: frame.nodes.length, startJoint: 'rigid' as const }];
  members[which] = { ...old, end: frame.nodes.length, endJoint: 'rigid' };
  const memberLoads = frame.memberLoads.flatMap((load): MemberLoad[] => {
    if (load.member !== which) return [load];
    if (load.kind === 'temperature') return [load, { ...load, member: second }];
    if (load.kind !== 'distributed') return load.at_m <= cut ? [load] : [{ ...load, member: second, at_m: load.at_m - cut }];
    const q = (x: number): number => load.q1_N_m + ((load.q2_N_m - load.q1_N_m) * (x - load.from_m)) / (load.to_m - load.from_m);
    if (load.to_m <= cut) return [load];
    if (load.from_m >= cut) return [{ ...load, member: second, from_m: load.from_m - cut, to_m: load.to_m - cut }];
    return [
      { ...load, member: first, to_m: cut, q2_N_m: q(cut) },
      { ...load, member: second, from_m: 0, to_m: load.to_m - cut, q1_N_m: q(cut) },
    ];
  });
  return { ...frame, nodes: [...frame.nodes, node], members, memberLoads };
}

const worst = (found: FrameChecks, name: string, span: string): number =>
  Math.max(
    -1,
    ...found.checks.filter((c) => c.check === name && c.subject?.replace(/'$/, '') === span).map((c) => c.ratio ?? -1),
  );

it('splitting a member of a span at a new node changes no check of it (seed 20261201)', () => {
  fc.assert(
    fc.property(randomFrame, fc.nat(), fc.integer({ min: 5, max: 95 }), (random, k, percent) => {
      const frame = checkable(random);
      const which = k % frame.members.length;
      fc.pre(analyser.analyse(frame, { second: false }).ok);
      const whole = checked(frame);
      const cut = checked(split(frame, which, percent / 100));
      for (const member of frame.members)
        for (const name of ['normal stress', 'shear stress', 'equivalent stress', 'stability', 'deflection', 'sway']) {
          const [before, after] = [worst(whole, name, member.id), worst(cut, name, member.id)];
          expect(Math.abs(after - before), `${member.id} ${name}: ${before}, split ${after}`).toBeLessThanOrEqual(
            1e-7 * Math.max(1, before),
          );
        }
    }),
    { seed: 20261201, numRuns: 60 },
  );
});

it('nor whether its plates are slender: IPE 300 and HE 200 A of S420, high in stress (seed 20261203)', () => {
  const slender = new Set<boolean>();
  fc.assert(
    fc.property(randomFrame, fc.nat(), fc.integer({ min: 5, max: 95 }), (random, k, percent) => {
      const frame = { ...checkable(random), materials: [steel({ fy_Pa: 420e6, E_Pa: 210e9, G_Pa: 81e9 })] };
      fc.pre(analyser.analyse(frame, { second: false }).ok);
      const slenderIn = (found: FrameChecks, span: string): boolean[] =>
        (found.allChecks ?? [])
          .filter((c) => c.check === 'normal stress' && c.subject?.replace(/'$/, '') === span)
          .map((c) => c.reason === 'slender web');
      const [whole, cut] = [checked(frame, true), checked(split(frame, k % frame.members.length, percent / 100), true)];
      for (const member of frame.members) {
        const [before] = slenderIn(whole, member.id);
        slender.add(before === true);
        expect(new Set(slenderIn(cut, member.id)), member.id).toEqual(new Set([before]));
      }
    }),
    { seed: 20261203, numRuns: 60 },
  );
  // a test in which nothing was slender, or everything, would show nothing
  expect(slender.size).toBe(2);
});

it('asking for every row changes none that governs (seed 20261202)', () => {
  fc.assert(
    fc.property(randomFrame, (random) => {
      const frame = checkable(random);
      const analysis = analyser.analyse(frame, { second: false });
      if (!analysis.ok) throw new Error(analysis.failure.message);
      const check = (all: boolean) =>
        checkFrame(frame, settings(), analysis.states, (state, member) => memberLine(frame, state, member), { all });
      const [few, every] = [check(false), check(true)];
      expect(every.checks).toEqual(few.checks);
      expect(every.notChecked).toEqual(few.notChecked);
      expect(every.assumptions).toEqual(few.assumptions);
    }),
    { seed: 20261202, numRuns: 40 },
  );
});
