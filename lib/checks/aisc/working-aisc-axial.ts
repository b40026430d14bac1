import { fraction, symbol, text, type WorkingLine } from '../working-parts';
import { availableLine, equals, F_y, line, squared, times, type Sheet } from './working-aisc-parts';

const F_e = symbol('F', 'e');
const F_n = symbol('F', 'n');
const A_g = symbol('A', 'g');
const P_n = symbol('P', 'n');

/** Tension by D2. */
export function tensionLines(sheet: Sheet): readonly WorkingLine[] {
  return [
    required(sheet),
    line(
      'yielding of the gross section',
      [P_n, equals, F_y, A_g, equals, ...sheet.shown('Fy', 'stress'), times, ...sheet.shown('Ag', 'area'), equals, ...sheet.shown('Pn', 'force')],
      '(D2-1)',
    ),
    availableLine(sheet, 'P', ['Pn', 'Pc'], 'force'),
  ]; // prettier-ignore
}

/** Compression by E3. */
export function flexuralLines(sheet: Sheet): readonly WorkingLine[] {
  const torsional = sheet.number('FeTorsional');
  return [
    required(sheet),
    slenderness(sheet),
    elasticStress(sheet),
    ...(torsional === null
      ? []
      : [
          line(
            (sheet.number('Fe') ?? Infinity) <= torsional ? 'torsional buckling does not govern' : 'torsional buckling governs',
            sheet.given([symbol('F', 'e'), 'FeTorsional', 'stress']),
            '(E4-2)',
          ),
        ]),
    nominalStressLine(sheet),
    nominalLine(sheet, 'Ag', A_g, '(E3-1)'),
    availableLine(sheet, 'P', ['Pn', 'Pc'], 'force'),
  ];
}

/** Torsional buckling by E4. */
export function torsionalLines(sheet: Sheet): readonly WorkingLine[] {
  return [
    required(sheet),
    line(
      'section and length',
      sheet.given(
        [symbol('C', 'w'), 'Cw', 'warping'],
        [symbol('J'), 'J', 'secondMoment'],
        [symbol('I', 'x'), 'Ix', 'secondMoment'],
        [symbol('I', 'y'), 'Iy', 'secondMoment'],
        [symbol('G'), 'G', 'stress'],
        [symbol('E'), 'E', 'stress'],
        [symbol('L', 'cz'), 'Lcz', 'length'],
      ),
    ),
    line(
      'elastic torsional buckling stress',
      [
        F_e,
        equals,
        text('('),
        fraction([squared('π'), symbol('E'), symbol('C', 'w')], [squared('L', 'cz')]),
        text('+'),
        symbol('G'),
        symbol('J'),
        text(')'),
        fraction([text('1')], [symbol('I', 'x'), text('+'), symbol('I', 'y')]),
        equals,
        text('('),
        fraction(
          [squared('π'), ...sheet.shown('E', 'stress'), times, ...sheet.shown('Cw', 'warping')],
          [text('('), ...sheet.shown('Lcz', 'length'), text(')²')],
        ),
        text('+'),
        ...sheet.shown('G', 'stress'),
        times,
        ...sheet.shown('J', 'secondMoment'),
        text(')'),
        fraction([text('1')], [...sheet.shown('Ix', 'secondMoment'), text('+'), ...sheet.shown('Iy', 'secondMoment')]),
        equals,
        ...sheet.shown('Fe', 'stress'),
      ],
      '(E4-2)',
    ),
    nominalStressLine(sheet),
    nominalLine(sheet, 'Ag', A_g, '(E4-1)'),
    availableLine(sheet, 'P', ['Pn', 'Pc'], 'force'),
  ];
}

export function required(sheet: Sheet): WorkingLine {
  return line('required strength', sheet.given([symbol('P', 'r'), 'Pr', 'force']));
}

function slenderness(sheet: Sheet): WorkingLine {
  return line(
    `slenderness about the ${sheet.word('axis') ?? ''} axis (the other: smaller)`,
    [
      fraction([symbol('L', 'c')], [symbol('r')]),
      equals,
      fraction(sheet.shown('Lc', 'length'), sheet.shown('r', 'dimension')),
      equals,
      ...sheet.shown('slenderness', 'number'),
      text('≥'),
      ...sheet.shown('otherSlenderness', 'number'),
    ],
    'E2',
  );
}

function elasticStress(sheet: Sheet): WorkingLine {
  return line(
    'elastic buckling stress',
    [
      F_e,
      equals,
      fraction([squared('π'), symbol('E')], [text('('), symbol('L', 'c'), text('/'), symbol('r'), text(')²')]),
      equals,
      fraction([squared('π'), ...sheet.shown('E', 'stress')], [text('('), ...sheet.shown('slenderness', 'number'), text(')²')]),
      equals,
      ...sheet.shown('Fe', 'stress'),
    ],
    '(E3-4)',
  );
}

export function nominalStressLine(sheet: Sheet): WorkingLine {
  const [Fy, Fe] = [sheet.number('Fy') ?? NaN, sheet.number('Fe') ?? NaN];
  const ratio = Fy / Fe;
  if (ratio <= 2.25)
    return line(
      'nominal stress',
      [
        F_n,
        equals,
        text('0.658^('),
        F_y,
        text('/'),
        F_e,
        text(')'),
        F_y,
        equals,
        text('0.658^('),
        ...sheet.shown('Fy', 'stress'),
        text('/'),
        ...sheet.shown('Fe', 'stress'),
        text(')'),
        times,
        ...sheet.shown('Fy', 'stress'),
        equals,
        ...sheet.shown('Fn', 'stress'),
      ],
      '(E3-2)',
    );
  return line('nominal stress', [F_n, equals, text('0.877'), F_e, equals, text('0.877 ·'), ...sheet.shown('Fe', 'stress'), equals, ...sheet.shown('Fn', 'stress')], '(E3-3)'); // prettier-ignore
}

export function nominalLine(sheet: Sheet, area: 'Ag' | 'Ae', letter: ReturnType<typeof symbol>, source: string): WorkingLine {
  return line(
    'nominal strength',
    [P_n, equals, F_n, letter, equals, ...sheet.shown('Fn', 'stress'), times, ...sheet.shown(area, 'area'), equals, ...sheet.shown('Pn', 'force')],
    source,
  ); // prettier-ignore
}
