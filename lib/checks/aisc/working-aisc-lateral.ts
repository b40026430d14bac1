import { fraction, root, symbol, text, type WorkingLine, type WorkingPart } from '../working-parts';
import { equals, F_y, line, squared, times, type Sheet } from './working-aisc-parts';

const M_n = symbol('M', 'n');
const M_p = symbol('M', 'p');
const L_b = symbol('L', 'b');
const L_p = symbol('L', 'p');
const L_r = symbol('L', 'r');
const C_b = symbol('C', 'b');
const r_ts = symbol('r', 'ts');
const E_per_Fy = root(fraction([symbol('E')], [F_y]));

/** The segment that governs, its limits, C_b and its moment; nothing where there is no buckling sideways. */
export function lateralBuckling(sheet: Sheet, clause: string): readonly WorkingLine[] {
  const [Lb, Lp, Lr] = [sheet.number('Lb'), sheet.number('Lp'), sheet.number('Lr')];
  if (Lb === null || Lp === null || Lr === null) return [];
  const box = clause === 'F7';
  return [
    line('segment between restraints', [
      text('from'),
      ...sheet.shown('from', 'length'),
      text('to'),
      ...sheet.shown('to', 'length'),
      text(':'),
      ...sheet.given([L_b, 'Lb', 'length']),
    ]),
    ...(box ? boxLengths(sheet) : openLengths(sheet)),
    ...gradient(sheet),
    moment(sheet, box, Lb <= Lp ? 'plastic' : Lb <= Lr ? 'inelastic' : 'elastic'),
  ];
}

function openLengths(sheet: Sheet): readonly WorkingLine[] {
  const c = sheet.word('shape') === 'channel' ? '(F2-8b)' : '(F2-8a)';
  return [
    line(
      'section',
      sheet.given(
        [symbol('r', 'y'), 'ry', 'dimension'],
        [r_ts, 'rts', 'dimension'],
        [symbol('J'), 'J', 'secondMoment'],
        [symbol('c'), 'c', 'number'],
        [symbol('h', 'o'), 'ho', 'dimension'],
        [symbol('S', 'x'), 'S', 'modulus'],
      ),
      `(F2-7), ${c}`,
    ),
    line(
      'limit of yielding',
      [L_p, text('= 1.76'), symbol('r', 'y'), E_per_Fy, text('= 1.76 ·'), ...sheet.shown('ry', 'dimension'), root(fraction(sheet.shown('E', 'stress'), sheet.shown('Fy', 'stress'))), equals, ...sheet.shown('Lp', 'length')],
      '(F2-5)',
    ), // prettier-ignore
    ...inelasticLimit(sheet),
  ];
}

/** L_r in two lines: what twists, then the length, so that neither is wider than a page. */
function inelasticLimit(sheet: Sheet): readonly WorkingLine[] {
  const X = fraction([symbol('J'), symbol('c')], [symbol('S', 'x'), symbol('h', 'o')]);
  const y = [text('0.7'), F_y];
  const x = symbol('X');
  const twist = sheet.shown('X', 'number');
  const yielding = [text('0.7 ·'), ...sheet.shown('Fy', 'stress')];
  return [
    line('twisting', [x, equals, X, equals, ...torsionFigures(sheet), equals, ...twist]),
    line(
      'limit of inelastic buckling',
      [
        L_r,
        text('= 1.95'),
        r_ts,
        fraction([symbol('E')], y),
        root(x, text('+'), root(squared('X'), text('+ 6.76 ('), fraction(y, [symbol('E')]), text(')²'))),
        equals,
        text('1.95 ·'),
        ...sheet.shown('rts', 'dimension'),
        times,
        fraction(sheet.shown('E', 'stress'), yielding),
        root(...twist, text('+'), root(text('('), ...twist, text(')² + 6.76 ('), fraction(yielding, sheet.shown('E', 'stress')), text(')²'))), // prettier-ignore
        equals,
        ...sheet.shown('Lr', 'length'),
      ],
      '(F2-6)',
    ),
  ];
}

/** J c/(S_x h_o) with its numbers. */
function torsionFigures(sheet: Sheet): readonly WorkingPart[] {
  return [
    fraction(
      [...sheet.shown('J', 'secondMoment'), times, ...sheet.shown('c', 'number')],
      [...sheet.shown('S', 'modulus'), times, ...sheet.shown('ho', 'dimension')],
    ),
  ];
}

function boxLengths(sheet: Sheet): readonly WorkingLine[] {
  const stiffness = [symbol('E'), symbol('r', 'y'), root(symbol('J'), symbol('A', 'g'))];
  const figures = [
    ...sheet.shown('E', 'stress'),
    times,
    ...sheet.shown('ry', 'dimension'),
    root(...sheet.shown('J', 'secondMoment'), times, ...sheet.shown('Ag', 'area')),
  ];
  const yielding = [text('0.7 ·'), ...sheet.shown('Fy', 'stress'), times, ...sheet.shown('S', 'modulus')];
  return [
    line(
      'section',
      sheet.given([symbol('r', 'y'), 'ry', 'dimension'], [symbol('J'), 'J', 'secondMoment'], [symbol('A', 'g'), 'Ag', 'area']),
    ),
    line(
      'limit of yielding',
      [
        L_p,
        text('= 0.13'),
        fraction(stiffness, [M_p]),
        text('= 0.13'),
        fraction(figures, sheet.shown('Mp', 'moment')),
        equals,
        ...sheet.shown('Lp', 'length'),
      ],
      '(F7-12)',
    ),
    line(
      'limit of inelastic buckling',
      [
        L_r,
        text('= 2'),
        fraction(stiffness, [text('0.7'), F_y, symbol('S')]),
        text('= 2'),
        fraction(figures, yielding),
        equals,
        ...sheet.shown('Lr', 'length'),
      ],
      '(F7-13)',
    ),
  ];
}

function gradient(sheet: Sheet): readonly WorkingLine[] {
  const why = sheet.word('CbWhy');
  if (why !== null) return [line('moment gradient', [C_b, equals, ...sheet.shown('Cb', 'number'), text(`: ${why}`)], 'F1')];
  const M = (sub: string): WorkingPart => symbol('M', sub);
  return [
    line('moments of the segment', sheet.given([M('max'), 'Mmax', 'moment'], [M('A'), 'MA', 'moment'], [M('B'), 'MB', 'moment'], [M('C'), 'MC', 'moment']), 'at its quarter points'), // prettier-ignore
    line(
      'moment gradient',
      [
        C_b,
        equals,
        fraction(
          [text('12.5'), M('max')],
          [text('2.5'), M('max'), text('+ 3'), M('A'), text('+ 4'), M('B'), text('+ 3'), M('C')],
        ),
        equals,
        ...sheet.shown('Cb', 'number'),
      ],
      '(F1-1)',
    ),
  ];
}

function moment(sheet: Sheet, box: boolean, branch: 'plastic' | 'inelastic' | 'elastic'): WorkingLine {
  const what = 'lateral-torsional buckling';
  const end = [equals, ...sheet.shown('lateralMoment', 'moment')];
  if (branch === 'plastic')
    return line(what, [L_b, text('≤'), L_p, text(': none,'), M_n, equals, M_p, ...end], box ? 'F7.4(a)' : 'F2.2(a)');
  if (branch === 'inelastic')
    return line(
      what,
      [
        M_n,
        equals,
        C_b,
        text('('),
        M_p,
        text('− ('),
        M_p,
        text('− 0.7'),
        F_y,
        symbol('S'),
        text(')'),
        fraction([L_b, text('−'), L_p], [L_r, text('−'), L_p]),
        text(') ≤'),
        M_p,
        equals,
        ...sheet.shown('Cb', 'number'),
        text('('),
        ...sheet.shown('Mp', 'moment'),
        text('− ('),
        ...sheet.shown('Mp', 'moment'),
        text('− 0.7 ·'),
        ...sheet.shown('Fy', 'stress'),
        times,
        ...sheet.shown('S', 'modulus'),
        text(')'),
        fraction(
          [...sheet.shown('Lb', 'length'), text('−'), ...sheet.shown('Lp', 'length')],
          [...sheet.shown('Lr', 'length'), text('−'), ...sheet.shown('Lp', 'length')],
        ),
        text(') ≤'),
        ...sheet.shown('Mp', 'moment'),
        text(':'),
        M_n,
        ...end,
      ],
      box ? '(F7-10)' : '(F2-2)',
    );
  if (box)
    return line(what, [M_n, equals, text('2'), symbol('E'), C_b, fraction([root(symbol('J'), symbol('A', 'g'))], [L_b, text('/'), symbol('r', 'y')]), text('≤'), M_p, ...end], '(F7-11)'); // prettier-ignore
  const ratio = [text('('), L_b, text('/'), r_ts, text(')²')];
  const figures = [text('('), ...sheet.shown('Lb', 'length'), text('/'), ...sheet.shown('rts', 'dimension'), text(')²')];
  const X = fraction([symbol('J'), symbol('c')], [symbol('S', 'x'), symbol('h', 'o')]);
  return line(
    what,
    [
      symbol('F', 'cr'),
      equals,
      fraction([C_b, squared('π'), symbol('E')], ratio),
      root(text('1 + 0.078'), X, ...ratio),
      equals,
      fraction([...sheet.shown('Cb', 'number'), squared('π'), ...sheet.shown('E', 'stress')], figures),
      root(text('1 + 0.078'), ...torsionFigures(sheet), ...figures),
      equals,
      ...sheet.shown('Fcr', 'stress'),
      text(':'),
      M_n,
      equals,
      symbol('F', 'cr'),
      symbol('S', 'x'),
      text('≤'),
      M_p,
      ...end,
    ],
    '(F2-3), (F2-4)',
  );
}
