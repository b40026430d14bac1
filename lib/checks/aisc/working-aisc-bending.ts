import { fraction, root, symbol, text, type WorkingLine, type WorkingPart } from '../working-parts';
import { localBuckling } from './working-aisc-local';
import { availableLine, equals, F_y, line, plateLine, squared, times, type Sheet } from './working-aisc-parts';

const M_n = symbol('M', 'n');
const M_p = symbol('M', 'p');
const L_b = symbol('L', 'b');
const L_p = symbol('L', 'p');
const L_r = symbol('L', 'r');
const C_b = symbol('C', 'b');
const r_ts = symbol('r', 'ts');
const E_per_Fy = root(fraction([symbol('E')], [F_y]));

/** Bending by F2, F3, F6, F7 or F8. */
export function bendingLines(sheet: Sheet): readonly WorkingLine[] {
  const clause = sheet.word('clause') ?? '';
  return [
    line('required strength', sheet.given([symbol('M', 'r'), 'Mr', 'moment'])),
    plastic(sheet, clause),
    ...plateLine(sheet, clause === 'F8' ? 'wall D/t' : 'flange', 'flange', 'Table B4.1b'),
    ...plateLine(sheet, 'web', 'web', 'Table B4.1b'),
    ...localBuckling(sheet, clause),
    ...lateral(sheet, clause),
    line('nominal strength, the smallest', [M_n, equals, ...sheet.shown('Mn', 'moment')], clause),
    availableLine(sheet, 'M', ['Mn', 'Mc'], 'moment'),
  ];
}

function plastic(sheet: Sheet, clause: string): WorkingLine {
  const product = [F_y, symbol('Z'), equals, ...sheet.shown('Fy', 'stress'), times, ...sheet.shown('Z', 'modulus')];
  const capped =
    clause === 'F6' ? [text('≤ 1.6'), F_y, symbol('S'), equals, text('1.6 ·'), ...sheet.shown('Fy', 'stress'), times, ...sheet.shown('S', 'modulus'), text(':'), M_p] : []; // prettier-ignore
  const source = clause === 'F3' ? '(F2-1)' : `(${clause}-1)`;
  return line('plastic moment', [M_p, equals, ...product, ...capped, equals, ...sheet.shown('Mp', 'moment')], source);
}

function lateral(sheet: Sheet, clause: string): readonly WorkingLine[] {
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
  const X = fraction([symbol('J'), symbol('c')], [symbol('S', 'x'), symbol('h', 'o')]);
  const y = [text('0.7'), F_y];
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
    line(
      'limit of inelastic buckling',
      [
        L_r,
        text('= 1.95'),
        r_ts,
        fraction([symbol('E')], y),
        root(X, text('+'), root(text('('), X, text(')² + 6.76 ('), fraction(y, [symbol('E')]), text(')²'))),
        equals,
        ...sheet.shown('Lr', 'length'),
      ],
      '(F2-6)',
    ),
  ];
}

function boxLengths(sheet: Sheet): readonly WorkingLine[] {
  const stiffness = [symbol('E'), symbol('r', 'y'), root(symbol('J'), symbol('A', 'g'))];
  return [
    line(
      'section',
      sheet.given([symbol('r', 'y'), 'ry', 'dimension'], [symbol('J'), 'J', 'secondMoment'], [symbol('A', 'g'), 'Ag', 'area']),
    ),
    line(
      'limit of yielding',
      [L_p, text('= 0.13'), fraction(stiffness, [M_p]), equals, ...sheet.shown('Lp', 'length')],
      '(F7-12)',
    ),
    line(
      'limit of inelastic buckling',
      [L_r, text('= 2'), fraction(stiffness, [text('0.7'), F_y, symbol('S')]), equals, ...sheet.shown('Lr', 'length')],
      '(F7-13)',
    ),
  ];
}

function gradient(sheet: Sheet): readonly WorkingLine[] {
  const why = sheet.word('CbWhy');
  if (why !== null) return [line('moment gradient', [C_b, equals, ...sheet.shown('Cb', 'number'), text(`: ${why}`)], 'F1')];
  const M = (sub: string): WorkingPart => symbol('M', sub);
  return [
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
        fraction(
          [text('12.5 ·'), ...sheet.shown('Mmax', 'moment')],
          [
            text('2.5 ·'),
            ...sheet.shown('Mmax', 'moment'),
            text('+ 3 ·'),
            ...sheet.shown('MA', 'moment'),
            text('+ 4 ·'),
            ...sheet.shown('MB', 'moment'),
            text('+ 3 ·'),
            ...sheet.shown('MC', 'moment'),
          ],
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
        ...end,
      ],
      box ? '(F7-10)' : '(F2-2)',
    );
  if (box)
    return line(what, [M_n, equals, text('2'), symbol('E'), C_b, fraction([root(symbol('J'), symbol('A', 'g'))], [L_b, text('/'), symbol('r', 'y')]), text('≤'), M_p, ...end], '(F7-11)'); // prettier-ignore
  const ratio = [text('('), L_b, text('/'), r_ts, text(')²')];
  const X = fraction([symbol('J'), symbol('c')], [symbol('S', 'x'), symbol('h', 'o')]);
  return line(
    what,
    [
      symbol('F', 'cr'),
      equals,
      fraction([C_b, squared('π'), symbol('E')], ratio),
      root(text('1 + 0.078'), X, ...ratio),
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
