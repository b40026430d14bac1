import { describe, expect, it } from 'vitest';
import type { Material, Section } from '@/lib/model/frame';
import type { MemberLine } from '@/lib/results/result';
import { findDesignation } from '@/lib/sections/find-designation';
import { inPlane } from '@/lib/sections/in-plane';
import { sectionFromShape, type ShapeWord } from '@/lib/sections/section-from-shape';
import { beamFrame, check, combination, line, rowOf, segment, steel } from './hand-made';
import { plateProportions, slenderPlate } from './slender-plates';

const shaped = (shape: ShapeWord, dims: Record<string, number>, made: Section['made'] = null): Section => {
  const result = sectionFromShape(shape, Object.fromEntries(Object.entries(dims).map(([k, v]) => [k, v / 1000])), made);
  if ('trouble' in result) throw new Error(JSON.stringify(result.trouble));
  return { ...result.section, name: 'S', designation: null };
};
const library = (designation: string): Section => {
  const found = findDesignation(designation);
  if (!('section' in found)) throw new Error(`no ${designation}`);
  return found.section;
};
const S235 = steel({ grade: 'S235', standard: 'EN', fy_Pa: 235e6, E_Pa: 210e9 });
const S355 = steel({ grade: 'S355', standard: 'EN', fy_Pa: 355e6, E_Pa: 210e9 });
const A992 = steel({ grade: 'A992', standard: 'ASTM', fy_Pa: 345e6, E_Pa: 200e9 });

function plate(section: Section, material: Material, at: MemberLine, turned = false): string | null {
  const { watch } = plateProportions(section, turned, material);
  return slenderPlate(watch, at, inPlane(section, turned), material.fy_Pa ?? NaN);
}
/** Constant stresses in MPa at mid-depth and (from bending) at the edge of the clear web of a section. */
function webStress(section: Section, compression: number, bending: number): MemberLine {
  const { h = 0, tf = 0, r = 0 } = section.dimensions as { h: number; tf: number; r: number };
  const half = h / 2 - tf - r;
  return line(10, { N: [-compression * 1e6 * section.properties.A_m2], M: [(bending * 1e6 * section.properties.I_m4) / half] });
}

describe('a web by EN 1993-1-1 Table 5.2, class 3', () => {
  // welded I, S235 (ε = 1), clear web c over tw = 5 mm
  const web = (c: number): Section => shaped('I', { h: c + 40, b: 200, tw: 5, tf: 20 });

  it.each([
    [42, 100, 0, null], [42.5, 100, 0, 'web'], // uniform compression: 42
    [124, 0, 100, null], [124.5, 0, 100, 'web'], // bending: 124
    [62.5, 50, 50, null], [63, 50, 50, 'web'], // ψ = 0: 42/0.67 = 62.69
    [83, 25, 75, null], [84, 25, 75, 'web'], // ψ = −0.5: 42/(0.67 − 0.165) = 83.17
    [263, -50, 150, null], [264, -50, 150, 'web'], // ψ = −2: 62·3·√2 = 263.04
    [300, -100, 50, null], // tension throughout
  ])('c/t = %d with %d MPa axial and %d MPa bending: %s', (slenderness, axial, bending, expected) => {
    const section = web(slenderness * 5);
    for (const sign of [1, -1]) expect(plate(section, S235, webStress(section, axial, sign * bending))).toBe(expected);
  }); // prettier-ignore

  it('looks along the whole member: where M passes through zero, compression is uniform', () => {
    const section = web(60 * 5);
    const { A_m2: A, I_m4: I } = section.properties;
    const M = (100e6 * I) / 0.15;
    const reversing = line(10, { N: [-10e6 * A], V: [-M / 5], M: [M, -M / 5] });
    expect(plate(section, S235, reversing)).toBe('web');
    expect(plate(section, S235, line(10, { N: [-10e6 * A], M: [M] }))).toBeNull();
  });

  it('takes compression of rounding size for none', () => {
    const section = web(60 * 5);
    expect(plate(section, S235, line(10, { N: [-1e-6], V: [1e3], M: [0, 1e3] }))).toBeNull();
  });

  it('IPE 300: c/t = 248.6/7.1 = 35.0, class 3 in compression in S235 (42), class 4 in S355 (34.2)', () => {
    const pushed = line(10, { N: [-1e5] });
    expect(plate(library('IPE 300'), S235, pushed)).toBeNull();
    expect(plate(library('IPE 300'), S355, pushed)).toBe('web');
    expect(plate(library('IPE 300'), S355, line(10, { N: [1e5], M: [1e4] }))).toBeNull();
  });
});

describe('flanges and walls by EN 1993-1-1 Table 5.2', () => {
  it('an outstand flange beyond 14 ε in compression', () => {
    const [stocky, slender] = [290, 310].map((b) => shaped('I', { h: 300, b, tw: 10, tf: 10 })) as [Section, Section];
    for (const M of [5e4, -5e4]) {
      expect(plate(stocky, S235, line(10, { M: [M] }))).toBeNull();
      expect(plate(slender, S235, line(10, { M: [M] }))).toBe('flange');
    }
    expect(plate(slender, S235, line(10, { N: [1e6], M: [1e3] }))).toBeNull();
  });

  it('a flange bent in its own plane: kσ = 0.57 − 0.21ψ + 0.07ψ², 21ε√kσ', () => {
    // ψ = root/tip = 5/155 = 0.032 → kσ = 0.5633, limit 15.76; c = 150, at tf = 10 15.0, at tf = 9.4 15.96
    const [stocky, slender] = [10, 9.4].map((tf) => shaped('I', { h: 300, b: 310, tw: 10, tf })) as [Section, Section];
    expect(plate(stocky, S235, line(10, { M: [1e4] }), true)).toBeNull();
    expect(plate(slender, S235, line(10, { M: [1e4] }), true)).toBe('flange');
    // uniform compression: 14
    expect(plate(stocky, S235, line(10, { N: [-1e4] }), true)).toBe('flange');
  });

  it('a tube beyond 90 ε² and a hollow section wall beyond 42 ε', () => {
    const pushed = line(10, { N: [-1e5] });
    expect(plate(shaped('chs', { d: 449, t: 5 }), S235, pushed)).toBeNull();
    expect(plate(shaped('chs', { d: 451, t: 5 }), S235, pushed)).toBe('wall');
    // c = 200 − 3t
    expect(plate(shaped('rhs', { h: 100, b: 200, t: 4.5 }), S235, pushed)).toBeNull();
    expect(plate(shaped('rhs', { h: 100, b: 200, t: 4.4 }), S235, pushed)).toBe('flange');
    expect(plate(shaped('rhs', { h: 200, b: 100, t: 4.4 }), S235, pushed)).toBe('web');
    expect(plate(shaped('rhs', { h: 200, b: 100, t: 4.4 }), S235, pushed, true)).toBe('flange');
    // rounder corners than 1.5 t do not make a wall narrower
    expect(plate(shaped('rhs', { h: 100, b: 200, t: 4.4, r: 13.2 }), S235, pushed)).toBe('flange');
  });

  it('a channel turned counts a plate as compressed as soon as one face is', () => {
    const channel = shaped('channel', { h: 300, b: 100, tw: 6, tf: 10 });
    // c/tw = 280/6 = 46.7
    expect(plate(channel, S235, line(10, { M: [1e3] }), true)).toBe('web');
    expect(plate(channel, S235, line(10, { M: [1e3] }))).toBeNull();
  });
});

describe('AISC 360-22 Tables B4.1a, B4.1b for ASTM grades', () => {
  // E/Fy = 579.7: 0.56√ = 13.48, 1.0√ = 24.08, 1.49√ = 35.88, 5.70√ = 137.2
  it('W12X26 has a slender web in compression (h/tw = 47.2 in the tables), none in bending', () => {
    const w = library('W12X26');
    expect(plate(w, A992, line(10, { N: [-1e4], M: [1e4] }))).toBe('web');
    expect(plate(w, A992, line(10, { M: [1e4] }))).toBeNull();
    expect(plate(w, A992, line(10, { N: [1e4], M: [1e4] }))).toBeNull();
  });

  it('W12X53 is nowhere slender', () => expect(plateProportions(library('W12X53'), false, A992).watch).toEqual([]));

  it('a built-up flange is judged by 0.64√(kc E/Fy)', () => {
    // h/tw = 760/6 = 126.7, kc = 4/√126.7 = 0.355; 0.64·24.08·√0.355 = 9.19; b/2tf = 9.5
    const girder = shaped('I', { h: 800, b: 380, tw: 6, tf: 20 }, 'welded');
    expect(plateProportions(girder, false, A992).watch).toContainEqual({ plate: 'flange', test: 'axial', a: 1, b: 0 });
  });

  it('a tube: 0.11 E/Fy in compression, 0.31 E/Fy in bending', () => {
    const tube = shaped('chs', { d: 400, t: 5 });
    expect(plate(tube, A992, line(10, { N: [-1e4] }))).toBe('wall');
    expect(plate(tube, A992, line(10, { M: [1e4] }))).toBeNull();
  });
});

describe('a slender plate in the checks', () => {
  const frame = beamFrame({
    sections: [library('IPE 300')],
    materials: [S355],
    combinations: [combination('C1', 'strength'), combination('C2', 'strength')],
  });
  const bent = line(10, { M: [60e3] });
  const pushed = line(10, { N: [-1e5], M: [100] });

  it('replaces normal and equivalent stress of its combination, not shear', () => {
    const found = check(frame, { C1: { AB: bent }, C2: { AB: pushed } }, {}, undefined, true);
    expect(rowOf(found, 'normal stress')).toMatchObject({
      combination: 'C2',
      verdict: 'not checked',
      reason: 'slender web',
      value: null,
    });
    expect(rowOf(found, 'equivalent stress')).toMatchObject({ combination: 'C2', reason: 'slender web' });
    expect(rowOf(found, 'shear stress').verdict).toBe('within');
    const normal = found.allChecks?.filter((row) => row.check === 'normal stress').map((row) => row.verdict);
    expect(normal).toEqual(['within', 'not checked']);
  });

  it('does not hide a combination that is over', () => {
    const found = check(frame, { C1: { AB: line(10, { M: [200e3] }) }, C2: { AB: pushed } });
    expect(rowOf(found, 'normal stress')).toMatchObject({ combination: 'C1', verdict: 'over' });
    expect(found.notChecked).toContain('normal stress: slender web');
  });

  it('where M passes through zero at low stress, a web is judged by that stress: ε √(f·fy/σ_com), 5.5.2(9)', () => {
    // S355, f = 0.6, web 35.0: in uniform compression 34.2 at full stress, 34.2 √(213/σ_com) below it
    const column = (M: number) => line(10, { N: [-1e5], V: [M / 10], M: [0, M / 10] });
    // W = 557 cm³: 60 kN·m is 107.7 + 18.6 = 126 of 213 MPa; 110 kN·m 216 MPa is over, so nothing is eased
    const one = { ...frame, combinations: [combination('C1', 'strength')] };
    expect(rowOf(check(one, { C1: { AB: column(60e3) } }), 'normal stress')).toMatchObject({ verdict: 'within', at: 10 });
    expect(rowOf(check(one, { C1: { AB: column(110e3) } }), 'normal stress').reason).toBe('slender web');
    // at the place that governs nothing is eased, however low the stress
    expect(rowOf(check(one, { C1: { AB: line(10, { N: [-1e3] }) } }), 'normal stress').reason).toBe('slender web');
  });

  it('is not looked for where the proportions are not known, and that is said', () => {
    expect(check(beamFrame(), { C1: { AB: bent } }).assumptions).toContain(
      'Section S: proportions not given, so its plates are taken as not slender (class 3 or better)',
    );
  });

  it('a web deeper than 72 ε tw that is sheared is not checked for shear, nor for equivalent stress', () => {
    const sheared = { C1: { AB: line(10, { V: [1e3] }) } };
    const girder = (h: number) => beamFrame({ sections: [shaped('I', { h, b: 300, tw: 10, tf: 20 })], materials: [S235] });
    for (const name of ['shear stress', 'equivalent stress']) {
      const row = rowOf(check(girder(770), sheared), name);
      expect(row).toMatchObject({
        verdict: 'not checked',
        reason: 'shear buckling of the web (h/t 73.0 > 72.0), which is not computed',
      });
      expect(rowOf(check(girder(760), sheared), name).verdict).toBe('within');
    }
    expect(rowOf(check(girder(770), { C1: { AB: line(10, { N: [1e3] }) } }), 'shear stress').verdict).toBe('within');
  });

  it('counts both sides of a load point', () => {
    const two: MemberLine = { length: 10, segments: [segment(0, 5, { N: [1e5] }), segment(5, 10, { N: [-1e5] })] };
    expect(plate(library('IPE 300'), S355, two)).toBe('web');
  });
});
