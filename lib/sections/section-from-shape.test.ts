import { describe, expect, it } from 'vitest';
import type { SectionProperties } from '@/lib/model/frame';
import { inPlane } from './in-plane';
import { sectionFromShape, type ShapeWord, type ShapedSection } from './section-from-shape';

const mm = (dims: Record<string, number>) => Object.fromEntries(Object.entries(dims).map(([k, v]) => [k, v / 1000]));
function section(shape: ShapeWord, dims: Record<string, number>): ShapedSection {
  const result = sectionFromShape(shape, mm(dims));
  if ('trouble' in result) throw new Error(JSON.stringify(result.trouble));
  return result.section;
}
function expectClose(actual: number | null, expected: number, tolerance = 1e-9): void {
  expect(Math.abs((actual ?? NaN) / expected - 1), `${actual} against ${expected}`).toBeLessThanOrEqual(tolerance);
}

describe('closed forms, worked by hand', () => {
  it('a three-plate I 300 × 150 × 8 × 12 without fillets', () => {
    const p = section('I', { h: 300, b: 150, tw: 8, tf: 12 }).properties;
    // A = 2·150·12 + 276·8; I = (150·300³ − 142·276³)/12; Wpl = 150·12·288 + 8·276²/4
    expectClose(p.A_m2, 5808e-6);
    expectClose(p.I_m4, (150 * 300 ** 3 - 142 * 276 ** 3) / 12 / 1e12);
    expectClose(p.Wpl_m3, (150 * 12 * 288 + (8 * 276 ** 2) / 4) / 1e9);
    expectClose(p.Iminor_m4, (2 * 12 * 150 ** 3 + 276 * 8 ** 3) / 12 / 1e12);
    expectClose(p.Iw_m6, ((p.Iminor_m4 ?? 0) * 0.288 ** 2) / 4);
    expectClose(p.AvPeak_m2, (p.I_m4 * 0.008) / ((p.Wpl_m3 ?? 0) / 2));
    expectClose(p.AvPeakTurned_m2, ((2 / 3) * 2 * 150 * 12) / 1e6);
    expectClose(p.AvShear_m2, 0.3 * 0.008);
    expectClose(p.AvShearTurned_m2, ((5 / 6) * 2 * 150 * 12) / 1e6);
    expect(p.t_m).toBe(0.012);
  });

  it('a bar 100 × 20 upright and turned', () => {
    const bar = section('bar', { h: 100, b: 20 });
    expectClose(bar.properties.I_m4, (20 * 100 ** 3) / 12 / 1e12);
    expectClose(bar.properties.AvPeak_m2, (2 * 2000) / 3 / 1e6);
    expectClose(bar.properties.AvShear_m2, (5 * 2000) / 6 / 1e6);
    const turned = inPlane({ ...bar, name: 'b', designation: null }, true);
    expectClose(turned.I_m4, (100 * 20 ** 3) / 12 / 1e12);
    expectClose(turned.Wtop_m3, (100 * 20 ** 2) / 6 / 1e9);
    expect(turned.depth_m).toBe(0.02);
  });

  it('a torsion constant of a square bar is 0.1406 a⁴ (Roark, from memory)', () =>
    expectClose(section('bar', { h: 50, b: 50 }).properties.It_m4, 0.1406 * 0.05 ** 4, 5e-3));

  it('a round bar of 30', () => {
    const round = section('bar', { d: 30 });
    expect(round.shape).toBe('round');
    expectClose(round.properties.I_m4, (Math.PI * 0.03 ** 4) / 64);
    expectClose(round.properties.AvPeak_m2, (0.75 * Math.PI * 0.03 ** 2) / 4);
    expectClose(round.properties.AvShear_m2, (0.9 * Math.PI * 0.03 ** 2) / 4);
  });

  it('a thin tube carries a peak shear of twice the mean: Av → A/2', () => {
    const p = section('chs', { d: 1000, t: 1 }).properties;
    expectClose(p.AvPeak_m2, p.A_m2 / 2, 2e-3);
    expectClose(p.AvShear_m2, p.A_m2 / 2);
  });

  it('a hollow section with a blank radius has 1.5 t outside and 0.5 t inside', () => {
    const blank = section('rhs', { h: 200, b: 100, t: 8 });
    expect(blank.dimensions?.r).toBeCloseTo(0.012, 12);
    // A = 2·8·(200 + 100 − 16) − (4 − π)(12² − 4²)
    expectClose(blank.properties.A_m2, (2 * 8 * 284 - (4 - Math.PI) * (144 - 16)) / 1e6);
    expectClose(blank.properties.AvShear_m2, 2 * 0.2 * 0.008);
    expectClose(blank.properties.AvShearTurned_m2, 2 * 0.1 * 0.008);
  });

  it('a channel turned takes the smaller W at both faces', () => {
    const channel = section('channel', { h: 200, b: 75, tw: 8, tf: 12 });
    const A = 200 * 8 + 2 * 67 * 12;
    const ys = (200 * 8 * 4 + 2 * 67 * 12 * (8 + 33.5)) / A;
    const Iz = (200 * 8 ** 3) / 12 + 200 * 8 * (ys - 4) ** 2 + 2 * ((12 * 67 ** 3) / 12 + 67 * 12 * (41.5 - ys) ** 2);
    const turned = inPlane({ ...channel, name: 'c', designation: null }, true);
    expectClose(turned.I_m4, Iz / 1e12);
    expectClose(turned.Wtop_m3, Iz / (75 - ys) / 1e9);
    expect(turned.Wbottom_m3).toBe(turned.Wtop_m3);
  });
});

describe('published values', () => {
  // National section tables to EN 10365 (PFC): h b tw tf r mm, A cm², Iy Iz cm⁴, Wel,y Wel,z Wpl,y Wpl,z cm³, It cm⁴, Iw cm⁶.
  it.each([
    [430, 100, 11, 19, 15, 82.1, 21900, 722, 1020, 97.9, 1220, 176, 63, 219000],
    [260, 75, 7, 12, 12, 35.1, 3620, 185, 278, 34.4, 328, 62, 11.7, 20300],
    [180, 90, 6.5, 12.5, 12, 33.2, 1820, 277, 202, 47.4, 232, 83.5, 13.3, 14100],
    [100, 50, 5, 8.5, 9, 13, 208, 32.3, 41.5, 9.89, 48.9, 17.5, 2.53, 491],
  ])('PFC %d × %d', (h, b, tw, tf, r, A, Iy, Iz, Wy, Wz, Wply, Wplz, It, Iw) => {
    const p = section('channel', { h, b, tw, tf, r }).properties;
    expectClose(p.A_m2, A * 1e-4, 0.005);
    for (const [actual, value, power] of [
      [p.I_m4, Iy, 4], [p.Iminor_m4, Iz, 4], [p.Wtop_m3, Wy, 3], [p.Wminor_m3, Wz, 3], [p.Wpl_m3, Wply, 3], [p.WplMinor_m3, Wplz, 3],
      [p.It_m4, It, 4], [p.Iw_m6, Iw, 6],
    ] as const) expectClose(actual, value * 0.01 ** power, 0.01); // prettier-ignore
  });

  // National section tables to EN 10219-2, whose inner radius is outer − t: h b t ro mm, A, Iy, Iz, Wel,y, Wel,z, Wpl,y, Wpl,z, It.
  it.each([
    [50, 25, 2, 4, 2.74, 8.38, 2.81, 3.35, 2.25, 4.26, 2.62, 7.06],
    [100, 80, 6, 12, 19.2, 258, 182, 51.7, 45.5, 63.8, 54.7, 357],
    [200, 100, 6, 12, 33.6, 1700, 577, 170, 115, 213, 132, 1420],
    [500, 300, 12, 36, 180, 60600, 27700, 2420, 1850, 2960, 2090, 62600],
  ])('hollow section %d × %d × %d', (h, b, t, r, A, Iy, Iz, Wy, Wz, Wply, Wplz, It) => {
    const p = section('rhs', { h, b, t, r }).properties;
    expectClose(p.A_m2, A * 1e-4, 0.005);
    for (const [actual, value, power] of [
      [p.I_m4, Iy, 4], [p.Iminor_m4, Iz, 4], [p.Wtop_m3, Wy, 3], [p.Wminor_m3, Wz, 3], [p.Wpl_m3, Wply, 3], [p.WplMinor_m3, Wplz, 3],
      [p.It_m4, It, 4],
    ] as const) expectClose(actual, value * 0.01 ** power, 0.01); // prettier-ignore
  });

  // EN 10210-2 circular: D t mm, A cm², I cm⁴, Wel Wpl cm³, It cm⁴.
  it.each([
    [21.3, 2.6, 1.53, 0.681, 0.639, 0.915, 1.36],
    [101.6, 4, 12.3, 146, 28.8, 38.1, 293],
    [244.5, 10, 73.7, 5070, 415, 550, 10100],
  ])('tube %d × %d', (d, t, A, I, W, Wpl, It) => {
    const p = section('chs', { d, t }).properties;
    expectClose(p.A_m2, A * 1e-4, 0.005);
    expectClose(p.I_m4, I * 1e-8, 0.005);
    expectClose(p.Wtop_m3, W * 1e-6, 0.005);
    expectClose(p.Wpl_m3, Wpl * 1e-6, 0.005);
    expectClose(p.It_m4, It * 1e-8, 0.005);
  });
});

describe('dimensions that make no section', () => {
  it.each<[ShapeWord, Record<string, number>, string[]]>([
    ['I', { h: 300, b: 150 }, ['tw', 'tf']], ['channel', {}, ['h', 'b', 'tw', 'tf']], ['rhs', { h: 200, b: 100 }, ['t']],
    ['chs', { d: 100 }, ['t']], ['bar', { h: 100 }, ['b']], ['bar', {}, ['h', 'b']],
  ])('%s %o lacks %o', (shape, dims, missing) => {
    expect(sectionFromShape(shape, mm(dims))).toEqual({ trouble: { missing, impossible: null } });
  }); // prettier-ignore

  it.each<[ShapeWord, Record<string, number>, string]>([
    ['I', { h: 20, b: 150, tw: 8, tf: 12 }, 'tf'], ['I', { h: 300, b: 8, tw: 8, tf: 12 }, 'tw'], ['I', { h: 300, b: 50, tw: 8, tf: 12, r: 30 }, 'r'],
    ['channel', { h: 300, b: 8, tw: 8, tf: 12 }, 'tw'], ['rhs', { h: 200, b: 10, t: 5 }, 't'], ['rhs', { h: 200, b: 40, t: 5, r: 21 }, 'r'],
    ['chs', { d: 20, t: 10 }, 't'],
  ])('%s %o cannot be: %s', (shape, dims, dimension) => {
    expect(sectionFromShape(shape, mm(dims))).toMatchObject({ trouble: { missing: [], impossible: { dimension } } });
  }); // prettier-ignore

  it('a size that is no number above zero is the mistake of the caller', () =>
    expect(() => sectionFromShape('chs', { d: -1, t: 0.01 })).toThrow(RangeError));
});

describe('in-plane properties', () => {
  const properties: SectionProperties = {
    A_m2: 1, I_m4: 2, Wtop_m3: 3, Wbottom_m3: 4, depth_m: 5, width_m: 6, AvTyped_m2: null, AvPeak_m2: 7, AvPeakTurned_m2: 8,
    AvShear_m2: 9, AvShearTurned_m2: 10, Wpl_m3: 11, Iminor_m4: 12, Wminor_m3: 13, WplMinor_m3: 14, It_m4: 15, Iw_m6: 16, t_m: 17,
  }; // prettier-ignore
  const base = { name: 'S', designation: null, shape: null, made: null, dimensions: null, sources: {} };

  it('are the major ones as it stands and the minor ones when turned', () => {
    expect(inPlane({ ...base, properties }, false)).toEqual({
      A_m2: 1, I_m4: 2, Wtop_m3: 3, Wbottom_m3: 4, depth_m: 5, AvPeak_m2: 7, AvShear_m2: 9,
    }); // prettier-ignore
    expect(inPlane({ ...base, properties }, true)).toEqual({
      A_m2: 1, I_m4: 12, Wtop_m3: 13, Wbottom_m3: 13, depth_m: 6, AvPeak_m2: 8, AvShear_m2: 10,
    }); // prettier-ignore
  });

  it('take a typed Av as given, for stress and for deformation, turned or not', () => {
    for (const turned of [false, true])
      expect(inPlane({ ...base, properties: { ...properties, AvTyped_m2: 20 } }, turned)).toMatchObject({
        AvPeak_m2: 20,
        AvShear_m2: 20,
      });
  });
});
