import { describe, expect, it } from 'vitest';
import type { Check } from '@/lib/results/result';
import { beamFrame, check, combination, limit, line, member, rowOf, state, typedSection } from './hand-made';
import { workingOf } from './working';
import { workingFormat } from './working-format';
import type { WorkingLine, WorkingPart } from './working-parts';

const format = workingFormat('metric', 0.9);
const plain = (parts: readonly WorkingPart[]): string =>
  parts
    .map((part) => {
      if (part.kind === 'fraction') return `(${plain(part.over)})/(${plain(part.under)})`;
      if (part.kind === 'root') return `√(${plain(part.of)})`;
      if (part.kind === 'symbol') return `${part.symbol}${part.sub ? `_${part.sub}` : ''}${part.sup ? `^${part.sup}` : ''}`;
      return part.kind === 'text' ? part.text : `${part.text}${part.unit ? ` ${part.unit}` : ''}`;
    })
    .join(' ');
const written = (row: Check): string[] => workingOf(row, format).map((l: WorkingLine) => `${l.what}: ${plain(l.parts)}`);

const whole = typedSection({ Iminor_m4: 1e-5, It_m4: 1e-6, Iw_m6: 1e-6 });
const frame = beamFrame({
  sections: [whole],
  members: [member('AB', 0, 1, { lengthMajor_m: 10, lengthMinor_m: 5, lengthLtbTop_m: 2, lengthLtbBottom_m: 4 })],
  limits: [limit({ measure: 'deflection', ratio: 250, absolute_m: 0.05 }), limit({ measure: 'displacement', absolute_m: 0.02 })],
});
const lines = {
  C1: { AB: line(10, { N: [-100e3], V: [20e3], M: [50e3] }) },
  S1: { AB: line(10, { v: [0, 0.012, -0.0012] }) },
};
const found = check(frame, lines, {}, [state('C1', 'strength', [], 30), state('S1', 'service', [0, 0, 0, 0.003, -0.004, 0])]);

describe('the working of a check', () => {
  it('of normal stress: section, actions, formula, numbers put in, limit, ratio, reference', () =>
    expect(written(rowOf(found, 'normal stress'))).toEqual([
      'section: S A = 100.0 cm² W_top = 1000 cm³ f_y = 250.0 MPa',
      'actions, combination C1: x = 0 m N = −100.0 kN M = 50.00 kN·m top face',
      'normal stress: σ = (N)/(A) − (M)/(W_top)',
      'numbers put in: = (−100.0 kN)/(100.0 cm²) − (50.00 kN·m)/(1000 cm³) = −10.00 MPa − 50.00 MPa = −60.00 MPa',
      'limit: f f_y = 0.6000 · 250.0 MPa = 150.0 MPa',
      'ratio: (60.00 MPa)/(150.0 MPa) = 0.40',
      'reference: elastic stress, σ = N/A ∓ M/W ≤ f·fy (EN 1993-1-1 6.2.1(4))',
    ]));

  it('of shear stress divides by √3', () =>
    expect(written(rowOf(found, 'shear stress'))).toContain('limit: (f f_y)/(√(3)) = (0.6000 · 250.0 MPa)/(√(3)) = 86.60 MPa'));

  it('of equivalent stress says that it is on the safe side', () => {
    const row = rowOf(found, 'equivalent stress');
    expect(written(row)).toContain('numbers put in: = √(( −60.00 MPa )² + 3 ( 5.000 MPa )²) = 60.62 MPa');
    expect(workingOf(row, format).some((l) => l.source?.includes('on the safe side'))).toBe(true);
  });

  it('of stability puts the lengths and stiffnesses in', () => {
    const all = written(rowOf(found, 'stability'));
    expect(all[0]).toBe('compression and moment, divided by f: N = 166.7 kN M = 83.33 kN·m f = 0.6000');
    expect(all.join('\n')).toContain('N_cr,minor = (π^2 E I)/(L^2) = (π^2 200000 MPa · 1000 cm⁴)/(( 5.000 m )²) = 789.6 kN');
    expect(all.join('\n')).toContain('against 0.16');
    expect(all.at(-2)).toContain('not checked: buckling not negligible');
  });

  it('of a deflection shows both allowances and their source', () => {
    const row = rowOf(found, 'deflection');
    expect(written(row)).toContain('limit: (L)/(250.0) = (10.00 m)/(250.0) or 50.00 mm , the smaller = 40.00 mm');
    expect(workingOf(row, format).find((l) => l.what === 'limit')?.source).toBe('Limits row 2');
  });

  it('of a displacement and a critical load factor', () => {
    expect(written(rowOf(found, 'displacement', 'B')).join('\n')).toContain('√(( 3.000 mm )² + ( −4.000 mm )²) = 5.000 mm');
    expect(written(rowOf(found, 'critical load factor', null))[0]).toBe(
      'critical load factor, combination C1: α_cr f = 30.00 · 0.6000 = 18.00',
    );
  });

  it('of a sway and a spread', () => {
    const column = beamFrame({
      nodes: [{ id: 'A', x_m: 0, y_m: 0, place: null }, { id: 'B', x_m: 0, y_m: 6, place: null }],
      members: [member('AB', 0, 1, { role: 'column' })],
      combinations: [combination('S1', 'service')],
      limits: [limit({ measure: 'sway', ratio: 300 }), limit({ measure: 'spread', target: 'node', name: 'A', toNode: 'B', ratio: 500 })],
    }); // prettier-ignore
    const moved = check(column, {}, {}, [state('S1', 'service', [0.001, 0, 0, 0.011, 0.006, 0])]);
    expect(written(rowOf(moved, 'sway'))).toEqual([
      'sway, combination S1: | u_x,top − u_x,bottom | = | 11.00 mm − ( 1.000 mm )| = 10.00 mm',
      'limit: (h)/(300.0) = (6.000 m)/(300.0) = 20.00 mm',
      'ratio: (10.00 mm)/(20.00 mm) = 0.50',
      'reference: Limits row 2',
    ]);
    expect(written(rowOf(moved, 'spread', 'A–B'))[0]).toContain('6.000 mm');
  });

  it('of what was not checked gives the reason and no number', () => {
    const bare = check(beamFrame({ sections: [typedSection({ AvTyped_m2: null })] }), lines);
    expect(written(rowOf(bare, 'shear stress'))).toEqual([
      'not checked: needs Av',
      'reference: elastic stress, τ = V/Av ≤ f·fy/√3 (EN 1993-1-1 6.2.6(4))',
    ]);
    expect(written(rowOf(check(beamFrame({ combinations: [] }), {}), 'stability'))[0]).toBe('not checked: no combinations');
  });

  it('uses nothing but the inputs of the check: they give its value again', () => {
    for (const row of found.checks.filter((c) => c.quantity === 'stress')) {
      const { N = 0, A = 1, M = 0, W = 1, V = 0, Av = 1, value } = row.inputs as Record<string, number>;
      const sigma = row.check === 'shear stress' ? 0 : N / A + ((row.face === 'top' ? -1 : 1) * M) / W;
      const tau = row.check === 'normal stress' ? 0 : V / Av;
      const again = row.check === 'shear stress' ? Math.abs(tau) : Math.hypot(sigma, Math.sqrt(3) * tau);
      expect(Math.abs(again / (row.value ?? NaN) - 1)).toBeLessThan(1e-12);
      expect(value).toBe(row.value);
    }
  });

  it('prints US units for a batch in US units', () => {
    const text = workingOf(rowOf(found, 'normal stress'), workingFormat('us', 0.9)).map((l) => plain(l.parts)).join('\n'); // prettier-ignore
    expect(text).toContain('ksi');
    expect(text).not.toContain('MPa');
  });
});
