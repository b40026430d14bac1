import type { Check } from '@/lib/results/result';
import { fraction, root, symbol, text, type Printer, type WorkingLine, type WorkingPart } from './working-parts';

const known = (check: Check, name: string): number | null => {
  const value = check.inputs[name];
  return typeof value === 'number' ? value : null;
};
const squared = (letter: string): WorkingPart => symbol(letter, undefined, '2');

/** Working of the stability screening: actions divided by the stress factor, critical load and moment, and their parts. */
export function stabilityWorking(check: Check, print: Printer): readonly WorkingLine[] {
  return [
    actions(check, print),
    ...axis(check, print, 'Major'),
    ...axis(check, print, 'Minor'),
    ...lateral(check, print),
    ...limit(check, print),
  ];
}

function actions(check: Check, print: Printer): WorkingLine {
  const parts = [
    ...print.given(symbol('N'), check.inputs.N, 'force'),
    ...print.given(symbol('M'), check.inputs.M, 'moment'),
    ...print.given(symbol('f'), check.inputs.f, 'number'),
  ];
  return { what: 'compression and moment, divided by f', parts, source: 'f: stress factor' };
}

function axis(check: Check, print: Printer, which: 'Major' | 'Minor'): readonly WorkingLine[] {
  const [N, E, I, L] = [
    known(check, 'N'),
    known(check, 'E'),
    known(check, `I${which.toLowerCase()}`),
    known(check, `L${which.toLowerCase()}`),
  ];
  const [critical, part] = [known(check, `Ncr${which}`), known(check, `NNcr${which}`)];
  if (N === null || E === null || I === null || L === null || critical === null || part === null) return [];
  const word = which.toLowerCase();
  const N_cr = symbol('N', `cr,${word}`);
  return [
    {
      what: `critical load, ${word} axis`,
      parts: [
        N_cr,
        text('='),
        fraction([squared('π'), symbol('E'), symbol('I')], [squared('L')]),
        text('='),
        fraction(
          [squared('π'), print.number(E, 'stress'), text('·'), print.number(I, 'secondMoment')],
          [text('('), print.number(L, 'length'), text(')²')],
        ),
        text('='),
        print.number(critical, 'force'),
      ],
    },
    {
      what: 'part of it',
      parts: [
        fraction([symbol('N')], [N_cr]),
        text('='),
        fraction([print.number(N, 'force')], [print.number(critical, 'force')]),
        text('='),
        print.result(part, 'number'),
        text('against 0.04'),
      ],
    },
  ];
}

function lateral(check: Check, print: Printer): readonly WorkingLine[] {
  const why = check.inputs.noLtb;
  if (typeof why === 'string') return [{ what: 'lateral-torsional buckling', parts: [text(`negligible: ${why}`)] }];
  const values = ['M', 'E', 'Iz', 'It', 'Iw', 'G', 'Lltb', 'Mcr', 'MMcr'].map((name) => known(check, name));
  if (values.some((value) => value === null)) return [];
  const [M, E, Iz, It, Iw, G, L, Mcr, part] = values as number[] as [
    number,
    number,
    number,
    number,
    number,
    number,
    number,
    number,
    number,
  ];
  const M_cr = symbol('M', 'cr');
  const EIz = [squared('π'), symbol('E'), symbol('I', 'z')];
  return [
    {
      what: 'lateral-torsional buckling',
      parts: [
        ...print.given(symbol('L'), L, 'length'),
        text(`(${String(check.inputs.ltbFace)} face in compression)`),
        ...print.given(symbol('I', 'z'), Iz, 'secondMoment'),
        ...print.given(symbol('I', 't'), It, 'secondMoment'),
        ...print.given(symbol('I', 'w'), Iw, 'warping'),
        ...print.given(symbol('E'), E, 'stress'),
        ...print.given(symbol('G'), G, 'stress'),
      ],
    },
    {
      what: 'critical moment',
      parts: [
        M_cr,
        text('='),
        fraction(EIz, [squared('L')]),
        root(
          fraction([symbol('I', 'w')], [symbol('I', 'z')]),
          text('+'),
          fraction([squared('L'), symbol('G'), symbol('I', 't')], EIz),
        ),
        text('='),
        print.number(Mcr, 'moment'),
      ],
      source: 'C1 = 1, load at the shear centre',
    },
    {
      what: 'part of it',
      parts: [
        fraction([symbol('M')], [M_cr]),
        text('='),
        fraction([print.number(Math.abs(M), 'moment')], [print.number(Mcr, 'moment')]),
        text('='),
        print.result(part, 'number'),
        text('against 0.16'),
      ],
    },
  ];
}

function limit(check: Check, print: Printer): readonly WorkingLine[] {
  if (check.ratio === null) return [];
  const parts = [
    text('max ('),
    fraction([symbol('N')], [text('0.04'), symbol('N', 'cr')]),
    text(','),
    fraction([symbol('M')], [text('0.16'), symbol('M', 'cr')]),
    text(') ='),
  ];
  return [{ what: 'buckling negligible up to 1', parts: [...parts, print.result(check.ratio, 'number')] }];
}
