import type { Check } from '@/lib/results/result';
import { fraction, root, symbol, text, type Printer, type WorkingLine, type WorkingPart } from './working-parts';

const fy = symbol('f', 'y');
const num = (check: Check, name: string): number => {
  const value = check.inputs[name];
  return typeof value === 'number' ? value : NaN;
};

/** Working of an elastic stress check: section, actions, formula, numbers put in, limit. */
export function stressWorking(check: Check, print: Printer): readonly WorkingLine[] {
  const lines = [sectionLine(check, print), actionsLine(check, print)];
  if (check.check !== 'shear stress') lines.push(...normalLines(check, print));
  if (check.check !== 'normal stress') lines.push(...shearLines(check, print));
  if (check.check === 'equivalent stress') lines.push(...equivalentLines(check, print));
  return [...lines, limitLine(check, print)];
}

function sectionLine(check: Check, print: Printer): WorkingLine {
  const { section, A, W, Av } = check.inputs;
  const W_ = symbol('W', check.face ?? undefined);
  const parts: WorkingPart[] = [
    text(String(section ?? '')),
    ...print.given(symbol('A'), A, 'area'),
    ...print.given(W_, W, 'modulus'),
    ...print.given(symbol('A', 'v'), Av, 'area'),
    ...print.given(fy, check.inputs.fy, 'stress'),
  ];
  return { what: 'section', parts };
}

function actionsLine(check: Check, print: Printer): WorkingLine {
  const { N, V, M } = check.inputs;
  const parts = [
    ...print.given(symbol('x'), check.at, 'length'),
    ...print.given(symbol('N'), N, 'force'),
    ...print.given(symbol('M'), M, 'moment'),
    ...print.given(symbol('V'), V, 'force'),
    ...(check.face ? [text(`${check.face} face`)] : []),
  ];
  return { what: check.combination ? `actions, combination ${check.combination}` : 'actions', parts };
}

/** σ = N/A ∓ M/W with its sign; without a modulus (no bending) σ = N/A. */
function signedStress(check: Check): { axial: number; bending: number; total: number } {
  const axial = num(check, 'N') / num(check, 'A');
  const W = check.inputs.W;
  const bending = typeof W === 'number' ? ((check.face === 'top' ? -1 : 1) * num(check, 'M')) / W : 0;
  return { axial, bending, total: axial + bending };
}

function normalLines(check: Check, print: Printer): readonly WorkingLine[] {
  const { axial, bending, total } = signedStress(check);
  const sign = text(check.face === 'top' ? '−' : '+');
  const bent = typeof check.inputs.W === 'number';
  const W_ = symbol('W', check.face ?? undefined);
  const formula = bent
    ? [fraction([symbol('N')], [symbol('A')]), sign, fraction([symbol('M')], [W_])]
    : [fraction([symbol('N')], [symbol('A')])];
  const put = bent
    ? [
        fraction([print.number(num(check, 'N'), 'force')], [print.number(num(check, 'A'), 'area')]),
        sign,
        fraction([print.number(num(check, 'M'), 'moment')], [print.number(num(check, 'W'), 'modulus')]),
        text('='),
        print.number(axial, 'stress'),
        text(bending < 0 ? '−' : '+'),
        print.number(Math.abs(bending), 'stress'),
      ]
    : [fraction([print.number(num(check, 'N'), 'force')], [print.number(num(check, 'A'), 'area')])];
  const result = check.check === 'normal stress' ? print.result(total, 'stress') : print.number(total, 'stress');
  return [
    { what: 'normal stress', parts: [symbol('σ'), text('='), ...formula] },
    { what: 'numbers put in', parts: [text('='), ...put, text('='), result] },
  ];
}

function shearLines(check: Check, print: Printer): readonly WorkingLine[] {
  const tau = num(check, 'V') / num(check, 'Av');
  const result = check.check === 'shear stress' ? print.result(tau, 'stress') : print.number(tau, 'stress');
  return [
    { what: 'shear stress', parts: [symbol('τ'), text('='), fraction([symbol('V')], [symbol('A', 'v')])] },
    {
      what: 'numbers put in',
      parts: [
        text('='),
        fraction([print.number(num(check, 'V'), 'force')], [print.number(num(check, 'Av'), 'area')]),
        text('='),
        result,
      ],
    },
  ];
}

function equivalentLines(check: Check, print: Printer): readonly WorkingLine[] {
  const { total } = signedStress(check);
  const tau = num(check, 'V') / num(check, 'Av');
  const sigmaV = symbol('σ', 'v');
  return [
    {
      what: 'equivalent stress',
      parts: [sigmaV, text('='), root(symbol('σ', undefined, '2'), text('+ 3'), symbol('τ', undefined, '2'))],
      source: 'the peak τ taken at the face: on the safe side',
    },
    {
      what: 'numbers put in',
      parts: [
        text('='),
        root(text('('), print.number(total, 'stress'), text(')² + 3 ('), print.number(tau, 'stress'), text(')²')),
        text('='),
        print.result(check.value ?? NaN, 'stress'),
      ],
    },
  ];
}

function limitLine(check: Check, print: Printer): WorkingLine {
  const f = print.number(num(check, 'f'), 'number');
  const strength = print.number(num(check, 'fy'), 'stress');
  const limit = print.result(check.limit ?? NaN, 'stress');
  const shear = check.check === 'shear stress';
  const three = root(text('3'));
  const parts = shear
    ? [fraction([symbol('f'), fy], [three]), text('='), fraction([f, text('·'), strength], [three]), text('='), limit]
    : [symbol('f'), fy, text('='), f, text('·'), strength, text('='), limit];
  return { what: 'limit', parts, source: 'f: stress factor' };
}
