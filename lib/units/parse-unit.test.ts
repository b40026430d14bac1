import { describe, expect, it } from 'vitest';
import { batchUnit, fromSI, toSI, unitLabel } from '@/lib/units/batch-unit';
import { factorFor, parseUnit } from '@/lib/units/parse-unit';
import { type Quantity, quantities } from '@/lib/units/quantity';

/** The factor of a unit for a quantity, or why there is none. */
const factor = (text: string, quantity: Quantity): number | string => {
  const unit = parseUnit(text);
  return unit ? (factorFor(unit, quantity) ?? 'wrong kind') : 'unknown';
};
const close = (got: number | string, expected: number, relative = 1e-14): void => {
  expect(typeof got === 'number' ? Math.abs(got / expected - 1) : got, `${got} against ${expected}`).toBeLessThanOrEqual(
    relative,
  );
};

describe('parseUnit', () => {
  // NIST SP 811 (2008), appendix B.8 and B.9; exact arithmetic on 1 in = 25.4 mm, 1 lb = 0.45359237 kg, g = 9.80665 m/s²
  it.each<[string, Quantity, number]>([
    ['in', 'dimension', 0.0254],
    ['ft', 'length', 0.3048],
    ['in2', 'area', 645.16e-6],
    ['in3', 'modulus', 16387.064e-9],
    ['in4', 'secondMoment', 416231.4256e-12],
    ['in6', 'warping', 268535866.540096e-18],
    ['lb', 'mass', 0.45359237],
    ['lbf', 'force', 4.4482216152605],
    ['lb', 'force', 4.4482216152605],
    ['kip', 'force', 4448.2216152605],
    ['psi', 'stress', 6894.757293168361],
    ['ksi', 'stress', 6894757.293168361],
    ['psf', 'areaLoad', 47.88025898033584],
    ['plf', 'lineLoad', 14.593902937206366],
    ['klf', 'lineLoad', 14593.902937206366],
    ['kip·ft', 'moment', 1355.8179483314003],
    ['kip·in', 'moment', 112.9848290276167],
    ['lb/ft3', 'density', 16.01846337396014],
    ['kgf', 'force', 9.80665],
    ['°F', 'temperature', 0.5555555555555556],
    ['kip·in/rad', 'springRotation', 112.9848290276167],
    ['kip/in', 'springTranslation', 175126.8352464764],
  ])('knows 1 %s as %s', (text, quantity, si) => {
    close(factor(text, quantity), si);
  });

  it('keeps the fixed points of the contract', () => {
    close(Number(factor('psf', 'areaLoad')) * Number(factor('ft', 'length')), 14.5939, 1e-6);
    close(factor('kip·in/rad', 'springRotation'), 112.985, 2e-6);
    close(factor('lb/ft³', 'density'), 16.0185, 3e-6);
  });

  it.each<[string, Quantity, number]>([
    ['kN/m2', 'areaLoad', 1e3],
    ['kN/m^2', 'areaLoad', 1e3],
    ['kN/m²', 'areaLoad', 1e3],
    ['kn / m²', 'areaLoad', 1e3],
    ['kN m-2', 'areaLoad', 1e3],
    ['kN·m⁻²', 'areaLoad', 1e3],
    ['N/mm2', 'stress', 1e6],
    ['N/mm²', 'stress', 1e6],
    ['mpa', 'stress', 1e6],
    ['GPA', 'stress', 1e9],
    ['kPa', 'areaLoad', 1e3],
    ['kN·m', 'moment', 1e3],
    ['kN.m', 'moment', 1e3],
    ['kN*m', 'moment', 1e3],
    ['kN-m', 'moment', 1e3],
    ['kN m', 'moment', 1e3],
    ['kip-ft', 'moment', 1355.8179483314003],
    ['ft-kip', 'moment', 1355.8179483314003],
    ['k-ft', 'moment', 1355.8179483314003],
    ['kip-in.', 'moment', 112.9848290276167],
    ['in.', 'dimension', 0.0254],
    ['in.^2', 'area', 645.16e-6],
    ['10^6mm4', 'secondMoment', 1e-6],
    ['10^6 mm^4', 'secondMoment', 1e-6],
    ['10⁶ mm⁴', 'secondMoment', 1e-6],
    ['×10^6 mm4', 'secondMoment', 1e-6],
    ['x10^3 mm3', 'modulus', 1e-6],
    ['1e6 mm4', 'secondMoment', 1e-6],
    ['cm4', 'secondMoment', 1e-8],
    ['cm⁶', 'warping', 1e-12],
    ['1/°C', 'expansion', 1],
    ['per °C', 'expansion', 1],
    ['/°F', 'expansion', 1.8],
    ['10^-6/°C', 'expansion', 1e-6],
    ['1/K', 'expansion', 1],
    ['deg C', 'temperature', 1],
    ['K', 'temperature', 1],
    ['K', 'force', 4448.2216152605],
    ['°', 'angle', Math.PI / 180],
    ['deg', 'angle', Math.PI / 180],
    ['mrad', 'rotation', 1e-3],
    ['kN m / rad', 'springRotation', 1e3],
    ['kN·m/(rad)', 'springRotation', 1e3],
    ['kN/mm', 'springTranslation', 1e6],
    ['tf/m', 'lineLoad', 9806.65],
    ['kg/m3', 'density', 1],
    ['-', 'number', 1],
  ])('reads %s as people type it', (text, quantity, si) => {
    close(factor(text, quantity), si);
  });

  it('reads products written without a mark, as everybody writes them', () => {
    close(factor('kNm', 'moment'), 1e3);
    close(factor('Nmm', 'moment'), 1e-3);
    close(factor('kNcm', 'moment'), 10);
    close(factor('kNm/rad', 'springRotation'), 1e3);
    close(factor('kipft', 'moment'), 1355.8179483314003);
    close(factor('kft', 'moment'), 1355.8179483314003);
  });

  it('tells an unknown unit from one of the wrong kind', () => {
    expect(factor('furlong', 'length')).toBe('unknown');
    expect(factor('kN/furlong', 'lineLoad')).toBe('unknown');
    expect(factor('106 mm4', 'secondMoment')).toBe('unknown');
    expect(factor('kN/', 'force')).toBe('unknown');
    expect(factor('(kN', 'force')).toBe('unknown');
    expect(factor('', 'length')).toBe('unknown');
    expect(factor('kN', 'length')).toBe('wrong kind');
    expect(factor('kN/m', 'areaLoad')).toBe('wrong kind');
    expect(factor('kN/m', 'springRotation')).toBe('wrong kind');
    expect(factor('kN/m3', 'density')).toBe('wrong kind');
  });

  it('gives the units of force and length that a member load takes from its heading', () => {
    expect(parseUnit('kN/m')).toMatchObject({ force_N: 1e3, length_m: 1, perArea: false });
    expect(parseUnit('plf')).toMatchObject({ force_N: 4.4482216152605, length_m: 0.3048, perArea: false });
    expect(parseUnit('kip·in')).toMatchObject({ force_N: 4448.2216152605, length_m: 0.0254, perArea: false });
    expect(parseUnit('psf')).toMatchObject({ force_N: 4.4482216152605, length_m: 0.3048, perArea: true });
    expect(parseUnit('kN')).toMatchObject({ force_N: 1e3, length_m: null, perArea: false });
    expect(parseUnit('MPa')).toMatchObject({ force_N: null, length_m: null, perArea: true });
  });

  it('prints a unit as a book does', () => {
    expect(parseUnit('kn.m')?.symbol).toBe('kN·m');
    expect(parseUnit('CM4')?.symbol).toBe('cm⁴');
    expect(parseUnit('10^6mm4')?.symbol).toBe('10⁶ mm⁴');
    expect(parseUnit('kip.in/rad')?.symbol).toBe('kip·in/rad');
    expect(parseUnit('per °c')?.symbol).toBe('1/°C');
  });
});

describe('the batch units', () => {
  it('are of the kind of their quantity, in both systems, and go there and back', () => {
    for (const quantity of quantities) {
      for (const system of ['metric', 'us'] as const) {
        expect(factorFor(batchUnit(quantity, system), quantity), quantity).not.toBeNull();
        expect(fromSI(toSI(12.5, quantity, system), quantity, system)).toBeCloseTo(12.5, 10);
      }
    }
  });
  it('are those of the contract', () => {
    expect(toSI(35, 'displacement', 'metric')).toBe(0.035);
    expect(toSI(10, 'length', 'us')).toBe(3.048);
    expect(toSI(210000, 'stress', 'metric')).toBe(210e9);
    expect(unitLabel('moment', 'metric')).toBe('kN·m');
    expect(unitLabel('area', 'metric')).toBe('cm²');
    expect(unitLabel('areaLoad', 'us')).toBe('psf');
    expect(unitLabel('springRotation', 'us')).toBe('kip·in/rad');
    expect(unitLabel('number', 'us')).toBe('');
  });
});
