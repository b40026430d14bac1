import { describe, expect, it } from 'vitest';
import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { findDesignation } from '@/lib/sections/find-designation';
import { sectionFromShape } from '@/lib/sections/section-from-shape';
import { beamFrame, check, combination, limit, line, member, method, rowOf, state, steel, typedSection } from './hand-made';
import { criticalMoment, eulerLoad } from './lateral-torsional';

const close = (actual: number | null, expected: number, tolerance = 1e-9): void =>
  expect(Math.abs((actual ?? NaN) / expected - 1), `${actual} against ${expected}`).toBeLessThanOrEqual(tolerance);

/** I minor 1e-5 m⁴, It 1e-6 m⁴, Iw 1e-6 m⁶ beside A = 0.01, I = 1e-4, W = 1e-3. */
const whole = typedSection({ Iminor_m4: 1e-5, It_m4: 1e-6, Iw_m6: 1e-6 });
const lengths = { lengthMajor_m: 10, lengthMinor_m: 5, lengthLtbTop_m: 2, lengthLtbBottom_m: 4 };
const frame = (change: Partial<Frame> = {}): Frame =>
  beamFrame({ sections: [whole], members: [member('AB', 0, 1, lengths)], ...change });
const withAlpha = (alpha: number | null, change: Partial<ResultState> = {}): ResultState[] => [
  { ...state('C1', 'strength', [0, 0, 0, 0, 0, 0], alpha), ...change },
];

describe('critical loads', () => {
  it("Euler's load is π²EI/L²", () => close(eulerLoad(200e9, 1e-5, 5), (Math.PI ** 2 * 200e9 * 1e-5) / 25));

  it('M_cr without warping stiffness is π/L √(EIz GIt), without torsional stiffness π²E/L² √(Iz Iw)', () => {
    close(criticalMoment(200e9, 80e9, 1e-5, 1e-6, 0, 4), (Math.PI / 4) * Math.sqrt(200e9 * 1e-5 * 80e9 * 1e-6));
    close(criticalMoment(200e9, 80e9, 1e-5, 0, 1e-6, 4), ((Math.PI ** 2 * 200e9) / 16) * Math.sqrt(1e-5 * 1e-6));
  });

  // CTICM and SCI, Steel Buildings in Europe, Multi-Storey Steel Buildings Part 4 (2010), Worked Example A.5, sheets 2–3: HE 300 B
  it.each([
    [25170e-8, 8, 8151.2e3],
    [8560e-8, 5.6, 5657.4e3],
  ])('N_cr of HE 300 B, I = %d m⁴ over %d m, is %d N as published', (I, L, published) =>
    close(eulerLoad(210e9, I, L), published, 1e-4),
  );

  it('M_cr of an IPE 500 column over 3.8 m, with C1 = 1.77, gives M_b,Rd = 640 kN·m as published', () => {
    // CTICM and SCI, Steel Buildings in Europe, Single-Storey Steel Buildings Part 4 (2010), Appendix D sheets 20–21;
    // λ_LT = √(Wpl fy/M_cr), rolled sections: χ_LT with α = 0.49 (curve c), λ0 = 0.4, β = 0.75, f left out
    const Mcr = 1.77 * criticalMoment(210e9, 81e9, 2142e-8, 89.3e-8, 1249e-9, 3.8);
    const [plastic, slenderness] = [2194e-6 * 355e6, Math.sqrt((2194e-6 * 355e6) / Mcr)];
    const phi = 0.5 * (1 + 0.49 * (slenderness - 0.4) + 0.75 * slenderness ** 2);
    const chi = 1 / (phi + Math.sqrt(phi ** 2 - 0.75 * slenderness ** 2));
    close(chi * plastic, 640e3, 0.01);
  });
});

describe('stability screening', () => {
  // π²E = 1.97392e12: N_cr major = 1973.9 kN (L 10), minor = 789.6 kN (L 5)
  const NcrMinor = (Math.PI ** 2 * 200e9 * 1e-5) / 25;

  it('lets a span pass whose N/f is within 0.04 of N_cr about both axes', () => {
    const N = 0.03 * NcrMinor * 0.6;
    const row = rowOf(check(frame(), { C1: { AB: line(10, { N: [-N] }) } }), 'stability');
    expect(row).toMatchObject({ verdict: 'within', subjectKind: 'member', limit: 1, combination: 'C1' });
    close(row.ratio, 0.75);
  });

  it('takes the combination with the largest ratio wherever it stands, what is pulled and bent among them', () => {
    const [push, bend] = [(part: number) => [-part * NcrMinor * 0.6], (M: number) => [0, 4 * M, -0.4 * M]];
    const lines = [
      line(10, { N: push(0.01), M: bend(400) }),
      line(10, { N: [900e3] }),
      line(10, { N: push(0.03) }),
      line(10, { N: push(0.03) }),
      line(10, { N: push(0.02), M: bend(900) }),
      line(10, { N: push(0.0301) }),
      line(10, { N: push(0.005) }),
    ];
    const of = (count: number) => {
      const combinations = lines.slice(0, count).map((_, c) => combination(`C${c + 1}`, 'strength'));
      const along = Object.fromEntries(lines.slice(0, count).map((AB, c) => [`C${c + 1}`, { AB }]));
      return rowOf(check(frame({ combinations }), along), 'stability');
    };
    expect(of(5).combination).toBe('C3');
    close(of(5).ratio, 0.75);
    expect(of(7).combination).toBe('C6');
  });

  it('is never near, and above 1 not checked, with the figures', () => {
    const at = (part: number) => rowOf(check(frame(), { C1: { AB: line(10, { N: [-part * NcrMinor * 0.6] }) } }), 'stability');
    expect(at(0.0399).verdict).toBe('within');
    expect(at(0.19)).toMatchObject({ verdict: 'not checked', ratio: null, value: null, limit: null });
    expect(at(0.19).reason).toContain('buckling not negligible (N/N_cr major 0.076, N/N_cr minor 0.19)');
  });

  it('a figure just beyond its bound never prints as the bound', () =>
    expect(rowOf(check(frame(), { C1: { AB: line(10, { N: [-0.0401 * NcrMinor * 0.6] }) } }), 'stability').reason).toContain(
      'N/N_cr minor 0.041',
    ));

  it('takes the top lengths for +M and the bottom lengths for −M', () => {
    const [top, bottom] = [2, 4].map((L) => criticalMoment(200e9, 80e9, 1e-5, 1e-6, 1e-6, L)) as [number, number];
    const ratio = (M: number) => rowOf(check(frame(), { C1: { AB: line(10, { M: [M] }) } }), 'stability').ratio;
    close(ratio(6e3), 6e3 / 0.6 / top / 0.16);
    close(ratio(-6e3), 6e3 / 0.6 / bottom / 0.16);
  });

  it('a section in tension or without bending needs nothing', () => {
    const bare = frame({ sections: [typedSection()] });
    expect(rowOf(check(bare, { C1: { AB: line(10, { N: [1e5] }) } }), 'stability')).toMatchObject({
      verdict: 'within',
      ratio: 0,
    });
  });

  it.each([
    [{}, { N: [-1e3] }, 'needs I minor'],
    [{}, { M: [1e3] }, 'needs I minor, It, Iw'],
    [{}, { N: [-1e3], M: [1e3] }, 'needs I minor, It, Iw'],
    [{ Iminor_m4: 1e-5, Iw_m6: 1e-6 }, { M: [1e3] }, 'needs It'],
    [{ Iminor_m4: 1e-5, It_m4: 1e-6, Iw_m6: 1e-6, Wbottom_m3: 2e-3 }, { M: [1e3] }, 'needs a doubly symmetric section for M_cr'],
  ])('properties %o under %o: %s', (properties, forces, reason) => {
    const bare = frame({ sections: [typedSection(properties)] });
    expect(rowOf(check(bare, { C1: { AB: line(10, forces) } }), 'stability')).toMatchObject({ verdict: 'not checked', reason });
  }); // prettier-ignore

  it('closed sections and sections bent about their weaker axis do not buckle laterally; channels and flat bars are not computed', () => {
    const reasonOf = (
      shape: 'rhs' | 'channel' | 'bar' | 'chs' | 'I',
      dims: Record<string, number>,
      turned = false,
    ): string | null => {
      const result = sectionFromShape(shape, dims);
      if ('trouble' in result) throw new Error('no section');
      const section = { ...result.section, name: 'S', designation: null };
      const members = [member('AB', 0, 1, { ...lengths, turned })];
      return rowOf(check(frame({ sections: [section], members }), { C1: { AB: line(10, { M: [10] }) } }), 'stability').reason;
    };
    expect(reasonOf('rhs', { h: 0.2, b: 0.1, t: 0.008 })).toBeNull();
    expect(reasonOf('chs', { d: 0.2, t: 0.008 })).toBeNull();
    expect(reasonOf('bar', { d: 0.05 })).toBeNull();
    expect(reasonOf('bar', { h: 0.02, b: 0.1 })).toBeNull();
    expect(reasonOf('bar', { h: 0.1, b: 0.02 }, true)).toBeNull();
    expect(reasonOf('I', { h: 0.3, b: 0.15, tw: 0.007, tf: 0.01 }, true)).toBeNull();
    expect(reasonOf('bar', { h: 0.1, b: 0.02 })).toBe('needs M_cr of a flat bar, which is not computed');
    expect(reasonOf('channel', { h: 0.2, b: 0.075, tw: 0.008, tf: 0.012 })).toBe(
      'needs M_cr of a channel, which is not computed',
    );
    expect(reasonOf('channel', { h: 0.2, b: 0.075, tw: 0.008, tf: 0.012 }, true)).toContain('needs M_cr of a channel');
  });

  it('needs G for a moment in an I whose material has none', () => {
    const ipe = findDesignation('IPE 300');
    if (!('section' in ipe)) throw new Error('no IPE 300');
    const bare = frame({ sections: [ipe.section], materials: [steel({ G_Pa: null })] });
    expect(rowOf(check(bare, { C1: { AB: line(10, { M: [1e3] }) } }), 'stability').reason).toBe('needs G');
  });
});

describe('a tension-only member', () => {
  const rod = frame({ members: [member('AB', 0, 1, { tensionOnly: true, role: null })] });

  it('is not pressed, so nothing of it buckles, whatever its own weight does along it', () => {
    const found = check(rod, { C1: { AB: line(10, { N: [900, -100] }) } }, {}, withAlpha(2));
    expect(rowOf(found, 'stability')).toMatchObject({ verdict: 'within', ratio: 0 });
    expect(found.assumptions).toContain('Tension-only members: not pressed, so no buckling of theirs is screened');
    expect(found.assumptions.filter((each) => each.includes('length'))).toEqual([]);
  });

  it('is still screened for what bends it', () => {
    const bent = rowOf(check(rod, { C1: { AB: line(10, { M: [30e3] }) } }), 'stability');
    expect(bent.verdict).toBe('not checked');
    expect(bent.reason).toContain('M/M_cr');
  });

  it('has its sag limited only where Limits name it', () => {
    const sag = { S1: { AB: line(10, { v: [0, 0.1, -0.01] }) } };
    const rows = check(rod, sag, { deflectionRatio: 200 }).checks.filter((row) => row.check === 'deflection');
    expect(rows).toEqual([]);
    const limited = { ...rod, limits: [limit({ measure: 'deflection', target: 'member', name: 'AB', ratio: 200 })] };
    expect(rowOf(check(limited, sag), 'deflection').verdict).toBe('over');
  });
});

describe('states of one combination in both directions', () => {
  const both = [...withAlpha(30, { name: 'C1 →', order: 2 as const }), ...withAlpha(30, { name: 'C1 ←', order: 2 as const })];

  it('count as two combinations: the worse governs, under its own name', () => {
    const found = check(frame(), { 'C1 →': { AB: line(10, { M: [10e3] }) }, 'C1 ←': { AB: line(10, { M: [-12e3] }) } }, {}, both);
    expect(rowOf(found, 'normal stress')).toMatchObject({ combination: 'C1 ←', face: 'top' });
    const all = check(frame(), { 'C1 →': { AB: line(10, { M: [10e3] }) } }, {}, both, true).allChecks ?? [];
    expect(all.filter((row) => row.check === 'normal stress').map((row) => row.combination)).toEqual(['C1 →', 'C1 ←']);
  });

  it('have one α_cr, told of the first', () =>
    expect(rowOf(check(frame(), {}, {}, both), 'critical load factor', null)).toMatchObject({
      combination: 'C1 →',
      reference: 'EN 1993-1-1 5.2.1: second-order analysis, α_cr ≥ 1',
    }));
});

describe('blank lengths', () => {
  const blank = (change: Partial<Frame> = {}) => frame({ members: [member('AB', 0, 1)], ...change });
  const pushed = { C1: { AB: line(10, { N: [-1e3] }) } };

  it('are the length of the span, listed as assumptions', () => {
    const found = check(blank(), pushed);
    expect(found.assumptions).toContain('AB: length major, minor, LTB top, LTB bottom taken as the length of the span');
    close(rowOf(found, 'stability').ratio, 1e3 / 0.6 / ((Math.PI ** 2 * 200e9 * 1e-5) / 100) / 0.04);
  });

  it('in plane need second order with imperfections, or α_cr × f of 10', () => {
    const reason = (states: ResultState[]) => rowOf(check(blank(), pushed, {}, states), 'stability').reason;
    const leaning = { method: method({ imperfection: 'right' }) } as const;
    expect(reason(withAlpha(20))).toBeNull();
    expect(reason(withAlpha(null))).toBeNull();
    expect(reason(withAlpha(16.6))).toBe('needs length major (blank in plane, with α_cr × f = 9.9 below 10)');
    expect(reason(withAlpha(5, { order: 2 }))).toContain('needs length major');
    expect(reason(withAlpha(5, { order: 2, method: method() }))).toContain('needs length major');
    expect(reason(withAlpha(5, { order: 1, ...leaning }))).toContain('needs length major');
    expect(reason(withAlpha(5, { order: 2, ...leaning }))).toBeNull();
    const turned = blank({ members: [member('AB', 0, 1, { turned: true, lengthMajor_m: 10 })] });
    expect(rowOf(check(turned, pushed, {}, withAlpha(5)), 'stability').reason).toContain('needs length minor');
    expect(rowOf(check(frame(), pushed, {}, withAlpha(5)), 'stability').reason).toBeNull();
  });

  it('of a span in two pieces are the length of the span, never of a piece', () => {
    const two = frame({
      nodes: [
        { id: 'A', x_m: 0, y_m: 0, place: null },
        { id: 'X', x_m: 4, y_m: 0, place: null },
        { id: 'B', x_m: 10, y_m: 0, place: null },
      ],
      members: [member('AX', 0, 1, { span: 'AB' }), member('BX', 2, 1, { span: 'ab' })],
      supports: [0, 2].map((node) => ({ node, ux: 'fixed' as const, uy: 'fixed' as const, rz: 'free' as const, angle_rad: 0 })),
    });
    const found = check(two, { C1: { AX: line(4, { N: [-1e3] }), BX: line(6, { N: [-2e3] }) } });
    const row = rowOf(found, 'stability');
    expect(row.subjectKind).toBe('span');
    close(row.ratio, 2e3 / 0.6 / ((Math.PI ** 2 * 200e9 * 1e-5) / 100) / 0.04);
  });

  it('out of the plane are twice the length of a span with a free end: a strut fixed at its foot only', () => {
    const post = (lengthMinor_m: number | null) =>
      frame({
        members: [member('AB', 0, 1, { lengthMinor_m })],
        supports: [{ node: 0, ux: 'fixed', uy: 'fixed', rz: 'fixed', angle_rad: 0 }],
      });
    const ratioOf = (length: number | null) => {
      const found = check(post(length), { C1: { AB: line(10, { N: [-1e3] }) } });
      return { ratio: rowOf(found, 'stability').ratio, said: found.assumptions.join() };
    };
    const { ratio, said } = ratioOf(null);
    close(ratio, ratioOf(20).ratio ?? NaN);
    expect(said).toContain('AB: out of the plane twice the length of the span, since an end of it is free');
    expect(ratioOf(20).said).not.toContain('twice');
  });

  it('do not make a channel a strut that is checked: it twists as it buckles', () => {
    const channel = frame({ sections: [{ ...typedSection({ Iminor_m4: 4e-6 }), shape: 'channel' as const }] });
    const row = rowOf(check(channel, { C1: { AB: line(10, { N: [-1e3] }) } }), 'stability');
    expect(row).toMatchObject({ verdict: 'not checked', ratio: null });
    expect(row.reason).toContain('torsional-flexural buckling of a channel');
    expect(rowOf(check(channel, { C1: { AB: line(10, { N: [1e3] }) } }), 'stability').verdict).toBe('within');
  });
});

describe('a span with pieces drawn both ways', () => {
  const nodes = ['A', 'X', 'B'].map((id, i) => ({ id, x_m: 5 * i, y_m: 0, place: null }));
  const roof = (reversed: boolean): Frame => {
    const piece = { ...lengths, span: 'AB' };
    const second = reversed ? member('XB', 2, 1, piece) : member('XB', 1, 2, piece);
    return frame({ nodes, members: [member('AX', 0, 1, piece), second] });
  };
  const screened = (reversed: boolean) => {
    // the same bending either way: the lower face of XB is compressed, which is the top of a piece drawn from B
    const M = [(reversed ? 1 : -1) * 20e3];
    return check(roof(reversed), { C1: { AX: line(5, {}), XB: line(5, { M }) } });
  };

  it('takes the longer of the lengths of top and bottom for both faces, so that the shorter is never put to the wrong one', () => {
    const [alike, mixed] = [screened(false), screened(true)];
    close(rowOf(mixed, 'stability').ratio, rowOf(alike, 'stability').ratio ?? NaN);
    const said = 'AB: pieces drawn both ways, so the longer of length LTB top and bottom is taken for both faces';
    expect(mixed.assumptions).toContain(said);
    expect(alike.assumptions).not.toContain(said);
  });
});

describe('an I turned', () => {
  const turned = (b: number): string | null => {
    const found = sectionFromShape('I', { h: 0.1, b, tw: 0.01, tf: 0.015, r: 0 });
    if (!('section' in found)) throw new Error('no section');
    const beam = frame({
      sections: [{ name: 'I', designation: null, ...found.section }],
      members: [member('AB', 0, 1, { ...lengths, turned: true })],
    });
    return rowOf(check(beam, { C1: { AB: line(10, { M: [20e3] }) } }), 'stability').reason;
  };

  it('does not buckle laterally about its weaker axis, but may where its flanges make the minor axis the stiffer', () => {
    expect(turned(0.1)).toBeNull();
    expect(turned(0.4)).toBe('needs M_cr of an I turned onto its stiffer axis, which is not computed');
  });
});

describe('spans that can not be screened', () => {
  const nodes = ['A', 'X', 'B'].map((id, i) => ({ id, x_m: 5 * i, y_m: 0, place: null }));

  it('pieces with different sections', () => {
    const mixed = frame({
      nodes,
      sections: [whole, typedSection()],
      members: [member('AX', 0, 1, { span: 'AB' }), member('XB', 1, 2, { span: 'AB', section: 1 })],
    });
    expect(rowOf(check(mixed, {}), 'stability').reason).toBe('pieces of the span have different sections');
  });

  it('pieces that do not meet', () => {
    const apart = frame({
      nodes: [...nodes, { id: 'Y', x_m: 7, y_m: 0, place: null }],
      members: [member('AX', 0, 1, { span: 'AB' }), member('YB', 3, 2, { span: 'AB' })],
    });
    expect(rowOf(check(apart, {}), 'stability').reason).toBe('pieces of the span do not form one line');
  });

  it('`by others` drops the screening and nothing else', () => {
    const names = check(frame(), {}, { stability: 'by others' }).checks.map((row) => row.check);
    expect(names).not.toContain('stability');
    expect(names).toContain('critical load factor');
  });
});

describe('critical load factor', () => {
  const found = (alpha: number | null, order: 1 | 2 = 1) =>
    rowOf(check(frame(), {}, {}, withAlpha(alpha, { order })), 'critical load factor', null);

  it('times the stress factor, against 1', () => {
    const row = found(25);
    expect(row).toMatchObject({ subjectKind: 'frame', subject: null, combination: 'C1', limit: 1, verdict: 'within' });
    close(row.value, 15);
    close(row.ratio, 1 / 15);
  });

  it('no positive root: within, ratio 0', () => expect(found(null)).toMatchObject({ verdict: 'within', ratio: 0, limit: 1 }));

  it('below 10 in first order: not checked; below 1: over', () => {
    expect(found(7).reason).toBe('second-order effects not negligible (α_cr 4.2, stress factor included)');
    expect(found(7)).toMatchObject({ verdict: 'not checked', value: null, limit: null, ratio: null });
    expect(found(1.5)).toMatchObject({ verdict: 'over' });
    close(found(1.5).ratio, 1 / 0.9);
  });

  it('in second order: near from the near limit on', () => {
    expect(found(7, 2).verdict).toBe('within');
    expect(found(1.7, 2).verdict).toBe('near');
  });

  it('over in one combination outranks not checked in another', () => {
    const two = frame({ combinations: [combination('C1', 'strength'), combination('C2', 'strength')] });
    const states = [state('C1', 'strength', [], 7), state('C2', 'strength', [], 1.2)];
    expect(rowOf(check(two, {}, {}, states), 'critical load factor', null)).toMatchObject({ combination: 'C2', verdict: 'over' });
    const unsaid = check(two, {}, {}, states).notChecked.filter((reason) => reason.startsWith('critical load factor'));
    expect(unsaid).toEqual(['critical load factor: second-order effects not negligible (α_cr 4.2, stress factor included)']);
  });
});
