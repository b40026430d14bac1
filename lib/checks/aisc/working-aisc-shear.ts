import { fraction, root, symbol, text, type WorkingLine } from '../working-parts';
import { availableLine, equals, F_y, line, times, type Sheet } from './working-aisc-parts';

const V_n = symbol('V', 'n');
const requiredShear = (sheet: Sheet): WorkingLine => line('required strength', sheet.given([symbol('V', 'r'), 'Vr', 'force']));

/** Shear by G2, G4 or G6. */
export function shearLines(sheet: Sheet): readonly WorkingLine[] {
  const clause = sheet.word('clause') ?? '';
  const letter = clause === 'G2' ? 'v1' : 'v2';
  const rolled =
    clause === 'G2' && sheet.word('rolled') !== null && (sheet.number('factor') === 1 || sheet.number('factor') === 1.5);
  const kv = rolled ? [] : ([[symbol('k', 'v'), 'kv', 'number']] as const);
  return [
    requiredShear(sheet),
    line(
      clause === 'G6' ? 'flange' : 'web',
      sheet.given([symbol('λ'), 'ht', 'number'], ...kv, [symbol('C', letter), 'Cv', 'number']),
      rolled ? 'G2.1(a), (G2-2)' : clause === 'G2' ? 'G2.1(b), (G2-3), (G2-4)' : '(G2-9) to (G2-11)',
    ),
    ...coefficient(sheet, letter),
    line('area', [
      symbol('A', 'w'),
      equals,
      ...(clause === 'G2'
        ? [symbol('d'), symbol('t', 'w')]
        : clause === 'G4'
          ? [text('2'), symbol('h'), symbol('t')]
          : [text('2'), symbol('b', 'f'), symbol('t', 'f')]),
      equals,
      ...(clause === 'G2' ? [] : [text('2 ·')]),
      ...sheet.shown('width', 'dimension'),
      times,
      ...sheet.shown('t', 'dimension'),
      equals,
      ...sheet.shown('Aw', 'area'),
    ]),
    line(
      'nominal strength',
      [
        V_n,
        text('= 0.6'),
        F_y,
        symbol('A', 'w'),
        symbol('C', letter),
        text('= 0.6 ·'),
        ...sheet.shown('Fy', 'stress'),
        times,
        ...sheet.shown('Aw', 'area'),
        times,
        ...sheet.shown('Cv', 'number'),
        equals,
        ...sheet.shown('Vn', 'force'),
      ],
      `(${clause}-1)`,
    ),
    availableLine(sheet, 'V', ['Vn', 'Vc'], 'force'),
  ];
}

/** Shear of a round section by G5. */
export function roundShearLines(sheet: Sheet): readonly WorkingLine[] {
  const F_cr = symbol('F', 'cr');
  return [
    requiredShear(sheet),
    line(
      'section and length',
      sheet.given([symbol('D'), 'D', 'dimension'], [symbol('λ'), 'Dt', 'number'], [symbol('L', 'v'), 'Lv', 'length']),
    ),
    line(
      'critical stress',
      [
        F_cr,
        equals,
        text('max ('),
        fraction([text('1.60'), symbol('E')], [root(fraction([symbol('L', 'v')], [symbol('D')])), symbol('λ', undefined, '5/4')]),
        text(','),
        fraction([text('0.78'), symbol('E')], [symbol('λ', undefined, '3/2')]),
        text(') ≤ 0.6'),
        F_y,
        text('= 0.6 ·'),
        ...sheet.shown('Fy', 'stress'),
        text(':'),
        ...sheet.given([F_cr, 'Fcr', 'stress']),
      ],
      '(G5-2a), (G5-2b)',
    ),
    line(
      'nominal strength',
      [
        V_n,
        equals,
        fraction([F_cr, symbol('A', 'g')], [text('2')]),
        equals,
        fraction([...sheet.shown('Fcr', 'stress'), times, ...sheet.shown('Ag', 'area')], [text('2')]),
        equals,
        ...sheet.shown('Vn', 'force'),
      ],
      '(G5-1)',
    ),
    availableLine(sheet, 'V', ['Vn', 'Vc'], 'force'),
  ];
}

/** C_v where it is below 1: G2-4 and G2-10 while 1.10√(k_v E/F_y)/λ gives it, else G2-11. */
function coefficient(sheet: Sheet, letter: string): readonly WorkingLine[] {
  const [Cv, kv, lambda, E, Fy] = ['Cv', 'kv', 'ht', 'E', 'Fy'].map((name) => sheet.number(name) ?? NaN) as [
    number,
    number,
    number,
    number,
    number,
  ];
  if (!(Cv < 1)) return [];
  const C_v = symbol('C', letter);
  const k_v = symbol('k', 'v');
  const put = [...sheet.shown('kv', 'number'), times, ...sheet.shown('E', 'stress')];
  if (letter === 'v1' || lambda <= 1.37 * Math.sqrt((kv * E) / Fy))
    return [
      line(
        'shear buckling',
        [
          C_v,
          equals,
          fraction([text('1.10'), root(fraction([k_v, symbol('E')], [F_y]))], [symbol('λ')]),
          equals,
          fraction([text('1.10'), root(fraction(put, sheet.shown('Fy', 'stress')))], sheet.shown('ht', 'number')),
          equals,
          ...sheet.shown('Cv', 'number'),
        ],
        letter === 'v1' ? '(G2-4)' : '(G2-10)',
      ),
    ];
  return [
    line(
      'shear buckling',
      [
        C_v,
        equals,
        fraction([text('1.51'), k_v, symbol('E')], [symbol('λ', undefined, '2'), F_y]),
        equals,
        fraction(
          [text('1.51 ·'), ...put],
          [text('('), ...sheet.shown('ht', 'number'), text(')²'), times, ...sheet.shown('Fy', 'stress')],
        ),
        equals,
        ...sheet.shown('Cv', 'number'),
      ],
      '(G2-11)',
    ),
  ];
}
