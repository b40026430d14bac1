import { fraction, root, symbol, text, type WorkingLine } from '../working-parts';
import { nominalLine, nominalStressLine, required } from './working-aisc-axial';
import { availableLine, equals, F_y, line, times, type Sheet } from './working-aisc-parts';

const F_n = symbol('F', 'n');
const A_g = symbol('A', 'g');

/** Slender elements by E7. */
export function slenderLines(sheet: Sheet): readonly WorkingLine[] {
  return [
    required(sheet),
    line(
      `elastic buckling stress of the member, by ${sheet.word('from') ?? ''}`,
      sheet.given([symbol('L', 'c/r'), 'slenderness', 'number'], [symbol('F', 'e'), 'Fe', 'stress']),
      sheet.word('from') === 'E4' ? '(E4-2)' : '(E3-4)',
    ),
    nominalStressLine(sheet),
    ...slenderPart(sheet, 'flange', sheet.word('shape') === 'chs' ? 'wall' : 'flange'),
    ...slenderPart(sheet, 'web', 'web'),
    effectiveArea(sheet),
    nominalLine(sheet, 'Ae', symbol('A', 'e'), '(E7-1)'),
    availableLine(sheet, 'P', ['Pn', 'Pc'], 'force'),
  ];
}

function effectiveArea(sheet: Sheet): WorkingLine {
  const lost = (['flangeLost', 'webLost'] as const).flatMap((name) =>
    sheet.number(name) ? [text('−'), ...sheet.shown(name, 'area')] : [],
  );
  const sum = lost.length > 0 ? [equals, ...sheet.shown('Ag', 'area'), ...lost] : [equals, A_g];
  return line('effective area', [symbol('A', 'e'), ...sum, equals, ...sheet.shown('Ae', 'area')], 'E7');
}

function slenderPart(sheet: Sheet, plate: 'flange' | 'web', name: string): readonly WorkingLine[] {
  if (sheet.number(`${plate}Lambda`) === null) return [];
  const given = sheet.given([symbol('λ'), `${plate}Lambda`, 'number'], [symbol('λ', 'r'), `${plate}LambdaR`, 'number']);
  const ratio = sheet.shown(`${plate}Ratio`, 'number');
  if (sheet.word('shape') === 'chs')
    return [
      line(
        `slender ${name}`,
        [
          ...given,
          text(':'),
          fraction([symbol('A', 'e')], [A_g]),
          equals,
          fraction([text('0.038'), symbol('E')], [F_y, symbol('λ')]),
          text('+'),
          fraction([text('2')], [text('3')]),
          equals,
          fraction(
            [text('0.038 ·'), ...sheet.shown('E', 'stress')],
            [...sheet.shown('Fy', 'stress'), times, ...sheet.shown(`${plate}Lambda`, 'number')],
          ),
          text('+'),
          fraction([text('2')], [text('3')]),
          equals,
          ...ratio,
        ],
        '(E7-7)',
      ),
    ];
  const local = root(fraction([symbol('F', 'el')], [F_n]));
  const figures = root(fraction(sheet.shown(`${plate}Fel`, 'stress'), sheet.shown('Fn', 'stress')));
  const full = sheet.number(`${plate}Ratio`) === 1;
  const width = [fraction([symbol('b', 'e')], [symbol('b')]), equals];
  return [
    line(`slender ${name}`, [...given, text(' '), ...sheet.given([symbol('c', '1'), `${plate}C1`, 'number'], [symbol('c', '2'), `${plate}C2`, 'number'])], 'Tables B4.1a, E7.1'), // prettier-ignore
    line(
      'its elastic local buckling stress',
      [
        symbol('F', 'el'),
        equals,
        text('('),
        fraction([symbol('c', '2'), symbol('λ', 'r')], [symbol('λ')]),
        text(')²'),
        F_y,
        equals,
        ...sheet.shown(`${plate}Fel`, 'stress'),
      ],
      '(E7-5)',
    ),
    full
      ? line('its effective width', [symbol('λ'), text('≤'), symbol('λ', 'r'), root(fraction([F_y], [F_n])), text(':'), ...width, text('1')], '(E7-2)') // prettier-ignore
      : line(
          'its effective width',
          [
            ...width,
            text('(1 −'),
            symbol('c', '1'),
            local,
            text(')'),
            local,
            equals,
            text('(1 −'),
            ...sheet.shown(`${plate}C1`, 'number'),
            figures,
            text(')'),
            figures,
            equals,
            ...ratio,
          ],
          '(E7-3)',
        ),
  ];
}
