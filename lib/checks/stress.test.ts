import { describe, expect, it } from 'vitest';
import { findDesignation } from '@/lib/sections/find-designation';
import type { MemberLine } from '@/lib/results/result';
import { beamFrame, check, combination, line, member, rowOf, segment, steel, typedSection } from './hand-made';

const close = (actual: number | null, expected: number, tolerance = 1e-9): void =>
  expect(Math.abs((actual ?? NaN) / expected - 1), `${actual} against ${expected}`).toBeLessThanOrEqual(tolerance);

/** A beam of 10 m under q down: V = qL/2 − qx, M = qLx/2 − qx²/2. */
const uniform = (q: number, L = 10, N = 0): MemberLine => line(L, { N: [N], V: [(q * L) / 2, -q], M: [0, (q * L) / 2, -q / 2] });

describe('normal stress', () => {
  it('of a simple beam is qL²/8W at midspan, top and bottom alike: the top is named', () => {
    const row = rowOf(check(beamFrame(), { C1: { AB: uniform(4e3) } }), 'normal stress');
    // M = 4·100/8 = 50 kN·m, σ = 50e3/1e-3 = 50 MPa; limit 0.6·250 = 150
    expect(row).toMatchObject({
      combination: 'C1',
      face: 'top',
      verdict: 'within',
      reason: null,
      member: 0,
      subjectKind: 'member',
    });
    close(row.value, 50e6);
    close(row.limit, 150e6);
    close(row.ratio, 1 / 3);
    expect(row.at).toBeCloseTo(5, 9);
  });

  it('adds tension to the bottom face and compression to the top: σ = N/A ∓ M/W', () => {
    const pulled = rowOf(check(beamFrame(), { C1: { AB: uniform(4e3, 10, 200e3) } }), 'normal stress');
    expect(pulled.face).toBe('bottom');
    close(pulled.value, 200e3 / 0.01 + 50e6);
    const pushed = rowOf(check(beamFrame(), { C1: { AB: uniform(4e3, 10, -200e3) } }), 'normal stress');
    expect(pushed.face).toBe('top');
    close(pushed.value, 200e3 / 0.01 + 50e6);
  });

  it('uses the modulus of each face', () => {
    const frame = beamFrame({ sections: [typedSection({ Wtop_m3: 2e-3, Wbottom_m3: 0.5e-3 })] });
    const row = rowOf(check(frame, { C1: { AB: uniform(4e3) } }), 'normal stress');
    expect(row.face).toBe('bottom');
    close(row.value, 100e6);
  });

  it('is found at an irrational place: a triangular load is worst at L/√3', () => {
    // q rising from 0 to q₀ over 6 m: M = q₀L x/6 − q₀x³/6L, M_max = q₀L²/(9√3)
    const [q, L] = [12e3, 6];
    const triangular = line(L, { V: [(q * L) / 6, 0, -q / (2 * L)], M: [0, (q * L) / 6, 0, -q / (6 * L)] });
    const row = rowOf(check(beamFrame(), { C1: { AB: triangular } }), 'normal stress');
    expect(row.at).toBeCloseTo(L / Math.sqrt(3), 9);
    close(row.value, (q * L * L) / (9 * Math.sqrt(3)) / 1e-3);
  });

  it('is not where M is largest when N varies along the member', () => {
    // N = −30x kN, M = 40 x − 4x² kN·m: σ_bottom is largest at 5; σ_top = −3x − (40x − 4x²) MPa has its worst where −43 + 8x = 0
    const leaning = line(10, { N: [0, -30e3], V: [40e3, -8e3], M: [0, 40e3, -4e3] });
    const row = rowOf(check(beamFrame(), { C1: { AB: leaning } }), 'normal stress');
    expect(row.face).toBe('top');
    expect(row.at).toBeCloseTo(43 / 8, 9);
    close(row.value, 43e6 * (43 / 8) - 4e6 * (43 / 8) ** 2);
  });

  it('counts both sides of a jump', () => {
    const jump: MemberLine = {
      length: 10,
      segments: [segment(0, 5, { M: [10e3] }), segment(5, 10, { M: [-60e3, 12e3] })],
    };
    const row = rowOf(check(beamFrame(), { C1: { AB: jump } }), 'normal stress');
    expect(row).toMatchObject({ at: 5, face: 'top' });
    close(row.value, 60e6);
  });

  it('of equal extremes gives the smallest x', () => {
    const constant: MemberLine = {
      length: 10,
      segments: [segment(0, 4, { N: [1e5] }), segment(4, 10, { N: [1e5 * (1 + 1e-13)] })],
    };
    expect(rowOf(check(beamFrame(), { C1: { AB: constant } }), 'normal stress').at).toBe(0);
  });
});

describe('shear stress', () => {
  it('is V/Av against f·fy/√3, largest at the first end', () => {
    const row = rowOf(check(beamFrame(), { C1: { AB: uniform(4e3) } }), 'shear stress');
    close(row.value, 20e3 / 0.004);
    close(row.limit, 150e6 / Math.sqrt(3));
    expect(row).toMatchObject({ at: 0, face: null });
  });

  it('of a turned section uses the area across it', () => {
    const found = findDesignation('IPE 300');
    if (!('section' in found)) throw new Error('no IPE 300');
    const frame = beamFrame({ sections: [found.section], members: [member('AB', 0, 1, { turned: true })] });
    const results = check(frame, { C1: { AB: uniform(1e3) } });
    // IPE 300: b = 150, tf = 10.7 mm; turned Av = (2/3)·2·b·tf; Wz = 80.5 cm³ (EN 10365)
    close(rowOf(results, 'shear stress').value, 5e3 / ((2 / 3) * 2 * 0.15 * 0.0107));
    close(rowOf(results, 'normal stress').value, 12.5e3 / 80.5e-6, 2e-3);
  });
});

describe('equivalent stress', () => {
  it('of half a uniformly loaded beam is worst at an end: σ² + 3τ² is convex in (1 − x/L)²', () => {
    // V = 300(1 − x/10) kN falls, M = 300x − 15x² kN·m rises to 10: σ = M/W, τ = V/Av with W = 10e-3, Av = 0.001
    const frame = beamFrame({ sections: [typedSection({ Wtop_m3: 10e-3, Wbottom_m3: 10e-3, AvTyped_m2: 0.001 })] });
    const half: MemberLine = line(10, { V: [300e3, -30e3], M: [0, 300e3, -15e3] });
    const row = rowOf(check(frame, { C1: { AB: half } }), 'equivalent stress');
    // by hand, MPa: σ = 30x − 1.5x², τ = 300 − 30x, σ_v² = σ² + 3τ²; at 0: 519.6; at 10: 150
    const sigmaV = (x: number): number => Math.hypot(30 * x - 1.5 * x * x, Math.sqrt(3) * (300 - 30 * x)) * 1e6;
    close(row.value, sigmaV(0));
    expect(row.at).toBe(0);
  });

  it('governs inside a member, where neither M nor V is extreme (against a search at every 0.01 mm)', () => {
    // V = 120(1 − (x/6)²) kN keeps high while M = 120(x − x³/108) kN·m grows: the worst is between the ends
    const W = 4.6e-3;
    const Av = 2e-3;
    const frame = beamFrame({ sections: [typedSection({ Wtop_m3: W, Wbottom_m3: W, AvTyped_m2: Av })] });
    const curved = line(6, { V: [120e3, 0, -120e3 / 36], M: [0, 120e3, 0, -120e3 / 108] });
    const row = rowOf(check(frame, { C1: { AB: curved } }), 'equivalent stress');
    const sigmaV = (x: number): number =>
      Math.hypot((120e3 * (x - x ** 3 / 108)) / W, (Math.sqrt(3) * 120e3 * (1 - (x * x) / 36)) / Av);
    let [best, at] = [0, 0];
    for (let i = 0; i <= 6e5; i++) if (sigmaV(i * 1e-5) > best) [best, at] = [sigmaV(i * 1e-5), i * 1e-5];
    expect(at).toBeGreaterThan(0.5);
    expect(at).toBeLessThan(5.5);
    expect(Math.abs((row.at ?? NaN) - at)).toBeLessThan(2e-5);
    close(row.value, best, 1e-9);
    expect(rowOf(check(frame, { C1: { AB: curved } }), 'normal stress').at).toBe(6);
    expect(rowOf(check(frame, { C1: { AB: curved } }), 'shear stress').at).toBe(0);
  });

  it('is the same with every row asked for and with the governing ones only', () => {
    const frame = beamFrame({ combinations: ['C1', 'C2', 'C3'].map((name) => combination(name, 'strength')) });
    const lines = { C1: { AB: uniform(4e3) }, C2: { AB: uniform(6e3, 10, 50e3) }, C3: { AB: uniform(-6e3, 10, -50e3) } };
    const few = check(frame, lines);
    const all = check(frame, lines, {}, undefined, true);
    expect(all.checks).toEqual(few.checks);
    expect(few.allChecks).toBeNull();
    expect(all.allChecks?.filter((row) => row.check === 'equivalent stress').map((row) => row.combination)).toEqual([
      'C1',
      'C2',
      'C3',
    ]);
  });
});

describe('combinations', () => {
  it('the worst governs, the first of two alike', () => {
    const frame = beamFrame({ combinations: ['C1', 'C2', 'C3'].map((name) => combination(name, 'strength')) });
    const found = check(frame, { C1: { AB: uniform(4e3) }, C2: { AB: uniform(6e3) }, C3: { AB: uniform(-6e3 * (1 + 1e-12)) } });
    expect(rowOf(found, 'normal stress').combination).toBe('C2');
  });

  it.each([[12e3 * 0.9 - 1, 'within'], [12e3 * 0.9 + 1, 'near'], [12e3 - 1, 'near'], [12e3 + 1, 'over']])(
    'a load of %d N/m comes out %s (limit 150 MPa, near from 0.9)', (q, verdict) =>
      expect(rowOf(check(beamFrame(), { C1: { AB: uniform(q) } }), 'normal stress').verdict).toBe(verdict),
  ); // prettier-ignore
});

describe('what is missing is not checked', () => {
  const reasons = (frame = beamFrame(), lines: Record<string, Record<string, MemberLine>> = { C1: { AB: uniform(4e3) } }) =>
    Object.fromEntries(
      ['normal stress', 'shear stress', 'equivalent stress'].map((name) => {
        const row = rowOf(check(frame, lines), name);
        if (row.reason !== null) expect(row).toMatchObject({ verdict: 'not checked', value: null, limit: null, ratio: null });
        return [name, row.reason];
      }),
    );

  it('without Av: shear and equivalent stress', () =>
    expect(reasons(beamFrame({ sections: [typedSection({ AvTyped_m2: null })] }))).toEqual({
      'normal stress': null,
      'shear stress': 'needs Av',
      'equivalent stress': 'needs Av',
    }));

  it('without one modulus: normal and equivalent stress, since the other face is not invented', () =>
    expect(reasons(beamFrame({ sections: [typedSection({ Wbottom_m3: null })] }))).toEqual({
      'normal stress': 'needs W bottom',
      'shear stress': null,
      'equivalent stress': 'needs W bottom',
    }));

  it('without W a member that does not bend is checked all the same', () => {
    const frame = beamFrame({ sections: [typedSection({ Wtop_m3: null, Wbottom_m3: null })] });
    expect(reasons(frame)['normal stress']).toBe('needs W top, W bottom');
    const turned = { ...frame, sections: [typedSection({ Iminor_m4: 1e-5 })], members: [member('AB', 0, 1, { turned: true })] };
    expect(reasons(turned)['normal stress']).toBe('needs W minor');
    expect(rowOf(check(frame, { C1: { AB: line(10, { N: [1e6] }) } }), 'normal stress').value).toBe(1e8);
  });

  it('without yield: everything; where the grade is known, what lacks is the thickness', () => {
    expect(new Set(Object.values(reasons(beamFrame({ materials: [steel({ fy_Pa: null })] }))))).toEqual(new Set(['needs fy']));
    const graded = beamFrame({ materials: [steel({ fy_Pa: null, grade: 'S275', standard: 'EN' })] });
    expect(reasons(graded)['normal stress']).toBe('needs t (fy depends on it)');
  });

  it('without combinations: everything', () => {
    const none = check(beamFrame({ combinations: [] }), {});
    expect(rowOf(none, 'normal stress')).toMatchObject({ verdict: 'not checked', reason: 'no combinations', combination: null });
    expect(rowOf(none, 'stability').reason).toBe('no combinations');
    const service = check(beamFrame({ combinations: [combination('S1', 'service')] }), {});
    expect(rowOf(service, 'shear stress').reason).toBe('no strength combinations');
    expect(service.notChecked).toContain('shear stress: no strength combinations');
  });

  it('by a design code that cannot check it: never by stresses instead', () => {
    const found = check(beamFrame(), {}, { strengthCheck: 'EN 1993-1-1' });
    expect(rowOf(found, 'EN 1993-1-1')).toMatchObject({ verdict: 'not checked', ratio: null });
    expect(found.checks.map((one) => one.check)).not.toContain('normal stress');
  });

  it('what the sheets know not to be checked stays in front', () =>
    expect(check(beamFrame({ notChecked: ['a wind case is missing'] }), {}).notChecked[0]).toBe('a wind case is missing'));
});
