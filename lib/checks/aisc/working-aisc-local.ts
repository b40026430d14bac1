import { fraction, root, symbol, text, type WorkingLine, type WorkingPart } from '../working-parts';
import { equals, F_y, line, squared, times, type Sheet } from './working-aisc-parts';

const M_n = symbol('M', 'n');
const M_p = symbol('M', 'p');

/** The formula of a plate that is not compact. */
export function localBuckling(sheet: Sheet, clause: string): readonly WorkingLine[] {
  const lines: WorkingLine[] = [];
  const flange = sheet.word('flangeClass');
  if (flange === 'noncompact' || flange === 'slender') {
    const [parts, source] = flangeFormula(sheet, clause, flange);
    lines.push(
      ...(clause === 'F7' && flange === 'slender'
        ? [
            line(
              'effective flange',
              sheet.given([symbol('b', 'e'), 'be', 'dimension'], [symbol('S', 'e'), 'Se', 'modulus']),
              '(F7-4), both flanges reduced',
            ),
          ]
        : []),
      line(clause === 'F8' ? 'local buckling' : 'flange local buckling', [M_n, equals, ...parts, equals, ...sheet.shown('flangeMoment', 'moment')], source), // prettier-ignore
    );
  }
  if (clause === 'F7' && sheet.word('webClass') === 'noncompact')
    lines.push(
      line(
        'web local buckling',
        [
          M_n,
          equals,
          M_p,
          text('− ('),
          M_p,
          text('−'),
          F_y,
          symbol('S'),
          text(')(0.305'),
          symbol('λ'),
          root(fraction([F_y], [symbol('E')])),
          text('− 0.738) ='),
          ...sheet.shown('webMoment', 'moment'),
        ],
        '(F7-6)',
      ),
    );
  return lines;
}

function flangeFormula(sheet: Sheet, clause: string, flange: 'noncompact' | 'slender'): [readonly WorkingPart[], string] {
  const lambda = symbol('λ');
  const S = symbol('S');
  if (clause === 'F8')
    return flange === 'slender'
      ? [[fraction([text('0.33'), symbol('E')], [lambda]), S], '(F8-3), (F8-4)']
      : [[text('('), fraction([text('0.021'), symbol('E')], [lambda]), text('+'), F_y, text(')'), S, text('≤'), M_p], '(F8-2)'];
  if (clause === 'F7')
    return flange === 'slender'
      ? [[F_y, symbol('S', 'e'), equals, ...sheet.shown('Fy', 'stress'), times, ...sheet.shown('Se', 'modulus')], '(F7-3)']
      : [[M_p, text('− ('), M_p, text('−'), F_y, S, text(')(3.57'), lambda, root(fraction([F_y], [symbol('E')])), text('− 4.0)')], '(F7-2)']; // prettier-ignore
  if (flange === 'noncompact')
    return [
      [
        M_p,
        text('− ('),
        M_p,
        text('− 0.7'),
        F_y,
        S,
        text(')'),
        fraction([lambda, text('−'), symbol('λ', 'p')], [symbol('λ', 'r'), text('−'), symbol('λ', 'p')]),
        equals,
        ...sheet.shown('Mp', 'moment'),
        text('− ('),
        ...sheet.shown('Mp', 'moment'),
        text('− 0.7 ·'),
        ...sheet.shown('Fy', 'stress'),
        times,
        ...sheet.shown('S', 'modulus'),
        text(')'),
        fraction(
          [...sheet.shown('flangeLambda', 'number'), text('−'), ...sheet.shown('flangeLambdaP', 'number')],
          [...sheet.shown('flangeLambdaR', 'number'), text('−'), ...sheet.shown('flangeLambdaP', 'number')],
        ),
      ],
      clause === 'F6' ? '(F6-2)' : '(F3-1)',
    ];
  return clause === 'F6'
    ? [[fraction([text('0.69'), symbol('E')], [squared('λ')]), S], '(F6-3), (F6-4)']
    : [[fraction([text('0.9'), symbol('E'), symbol('k', 'c'), S], [squared('λ')]), text('with'), ...sheet.given([symbol('k', 'c'), 'kc', 'number'])], '(F3-2)']; // prettier-ignore
}
