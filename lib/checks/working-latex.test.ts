import katex from 'katex';
import { describe, expect, it } from 'vitest';
import { latexOf } from './working-latex';
import { fraction, root, symbol, text, type WorkingPart } from './working-parts';
import { textOf } from './working-text';

const resistance: readonly WorkingPart[] = [
  symbol('N', 'b,Rd'),
  text('='),
  fraction([symbol('χ'), symbol('A'), symbol('f', 'y')], [symbol('γ', 'M1')]),
  text('='),
  fraction([{ kind: 'number', text: '0.6120' }, text('·'), { kind: 'number', text: '53.80', unit: 'cm²' }], [{ kind: 'number', text: '1.000' }]),
  text('='),
  { kind: 'result', text: '1,165', unit: 'kN' },
]; // prettier-ignore

describe('a line of calculation', () => {
  it('is LaTeX with symbols, upright subscripts and units, and a bold result', () => {
    expect(latexOf(resistance)).toBe(
      'N_{\\mathrm{b,Rd}}' +
        ' = \\dfrac{χ A f_{\\mathrm{y}}}{γ_{\\mathrm{M1}}} = \\dfrac{{0.6120} \\cdot {53.80}\\,\\mathrm{cm}^{2}}{{1.000}} = \\mathbf{{1{,}165}}\\,\\mathrm{kN}',
    );
  });

  it('sets givens apart and what stands behind ^( as an exponent', () => {
    const given = (letter: string, text_: string): readonly WorkingPart[] => [symbol(letter), text('='), { kind: 'number', text: text_, unit: 'kN·m' }]; // prettier-ignore
    expect(latexOf([...given('N', '4'), ...given('M', '5')])).toBe(
      'N = {4}\\,\\mathrm{kN}{\\cdot}\\mathrm{m} \\quad M = {5}\\,\\mathrm{kN}{\\cdot}\\mathrm{m}',
    );
    expect(latexOf([text('0.658^('), symbol('F', 'y'), text('/'), symbol('F', 'e'), text(')'), symbol('F', 'y')])).toBe(
      '0.658^{F_{\\mathrm{y}} / F_{\\mathrm{e}}} F_{\\mathrm{y}}',
    );
  });

  it('is text that reads the same, fractions in brackets', () => {
    expect(textOf(resistance)).toBe('N_b,Rd = (χ A f_y) / γ_M1 = (0.6120 · 53.80 cm²) / 1.000 = 1,165 kN');
    expect(textOf([symbol('λ̄'), text('='), root(fraction([symbol('A'), symbol('f', 'y')], [symbol('N', 'cr')]))])).toBe(
      'λ̄ = √((A f_y) / N_cr)',
    );
  });

  it.each<[string, readonly WorkingPart[]]>([
    ['a slenderness with a bar', [symbol('λ̄', 'LT'), text('='), root(symbol('W'))]],
    ['words with signs that LaTeX keeps for itself', [text('5 % of A_net & {b} # 2 ^ 3 ~ $ \\ _')]],
    ['words with a load named by a subscript', [text('below 0.04 N_cr, so that it is negligible')]],
    ['a figure below zero with thousands', [{ kind: 'number', text: '−12,345.6', unit: 'kN·m' }]],
    [
      'units with powers',
      [
        { kind: 'number', text: '8,356', unit: 'cm⁴' },
        { kind: 'number', text: '1', unit: 'kip·ft' },
      ],
    ],
    ['a resistance without end', [{ kind: 'number', text: '∞' }]],
    ['an angle in degrees', [{ kind: 'number', text: '5.71', unit: '°' }]],
    ['a squared bracket', [text('('), symbol('L'), text(')²')]],
    ['Greek in a subscript', [symbol('k', 'σ'), symbol('C', 'm,LT'), symbol('ψ'), symbol('Φ', 'LT', '2')]],
  ])('sets %s without a fault', (_, parts) => {
    const set = katex.renderToString(latexOf(parts), { throwOnError: true, strict: 'ignore' });
    expect(set).toContain('<math');
    expect(set).not.toContain('katex-error');
  });

  it('sets givens apart, also where only a blank stands between them', () => {
    const given = (letter: string, value: string) => [symbol(letter), text('='), { kind: 'number', text: value }] as const;
    expect(latexOf([...given('J', '0.5'), text(' '), ...given('c', '1.0')])).toMatch(/0\.5\}? \\quad c = /);
  });
});
