import { fraction, root, symbol, text, type WorkingLine, type WorkingPart } from '../working-parts';
import { equals, F_y, line, times, type Sheet } from './working-aisc-parts';

const M_n = symbol('M', 'n');

/** The letters of a formula, or the numbers put in for them. */
interface Terms {
  readonly Mp: readonly WorkingPart[];
  readonly Fy: readonly WorkingPart[];
  readonly E: readonly WorkingPart[];
  readonly S: readonly WorkingPart[];
  readonly Se: readonly WorkingPart[];
  readonly kc: readonly WorkingPart[];
  readonly lambda: readonly WorkingPart[];
  readonly lambdaP: readonly WorkingPart[];
  readonly lambdaR: readonly WorkingPart[];
  /** Between two factors: a dot between numbers. */
  readonly by: readonly WorkingPart[];
}

const letters: Terms = {
  Mp: [symbol('M', 'p')],
  Fy: [F_y],
  E: [symbol('E')],
  S: [symbol('S')],
  Se: [symbol('S', 'e')],
  kc: [symbol('k', 'c')],
  lambda: [symbol('λ')],
  lambdaP: [symbol('λ', 'p')],
  lambdaR: [symbol('λ', 'r')],
  by: [],
};

const numbers = (sheet: Sheet, plate: 'flange' | 'web'): Terms => ({
  Mp: sheet.shown('Mp', 'moment'),
  Fy: sheet.shown('Fy', 'stress'),
  E: sheet.shown('E', 'stress'),
  S: sheet.shown('S', 'modulus'),
  Se: sheet.shown('Se', 'modulus'),
  kc: sheet.shown('kc', 'number'),
  lambda: sheet.shown(`${plate}Lambda`, 'number'),
  lambdaP: sheet.shown(`${plate}LambdaP`, 'number'),
  lambdaR: sheet.shown(`${plate}LambdaR`, 'number'),
  by: [times],
});

type Formula = (of: Terms) => readonly WorkingPart[];

const squaredOf = (of: Terms): readonly WorkingPart[] => [text('('), ...of.lambda, text(')²')];
/** M_p − (M_p − 0.7 F_y S)(λ − λ_p)/(λ_r − λ_p). */
const straight: Formula = (of) => [
  ...of.Mp,
  text('− ('),
  ...of.Mp,
  text('− 0.7'),
  ...of.by,
  ...of.Fy,
  ...of.by,
  ...of.S,
  text(')'),
  fraction([...of.lambda, text('−'), ...of.lambdaP], [...of.lambdaR, text('−'), ...of.lambdaP]),
];
/** M_p − (M_p − F_y S)(k λ √(F_y/E) − less). */
const ofBox =
  (k: string, less: string): Formula =>
  (of) => [
    ...of.Mp,
    text('− ('),
    ...of.Mp,
    text('−'),
    ...of.Fy,
    ...of.by,
    ...of.S,
    text(`)(${k}`),
    ...of.by,
    ...of.lambda,
    root(fraction(of.Fy, of.E)),
    text(`− ${less}) ≤`),
    ...of.Mp,
  ];
const F3Slender: Formula = (of) => [
  fraction([text('0.9'), ...of.by, ...of.E, ...of.by, ...of.kc, ...of.by, ...of.S], squaredOf(of)),
];
const F6Slender: Formula = (of) => [fraction([text('0.69'), ...of.by, ...of.E], squaredOf(of)), ...of.by, ...of.S];
const F7Slender: Formula = (of) => [...of.Fy, ...of.by, ...of.Se];
const F8Noncompact: Formula = (of) => [
  text('('),
  fraction([text('0.021'), ...of.by, ...of.E], of.lambda),
  text('+'),
  ...of.Fy,
  text(')'),
  ...of.by,
  ...of.S,
  text('≤'),
  ...of.Mp,
];
const F8Slender: Formula = (of) => [
  fraction([text('0.33'), ...of.by, ...of.E], of.lambda),
  ...of.by,
  ...of.S,
  text('≤'),
  ...of.Mp,
];

const formulas: Readonly<Record<string, readonly [Formula, string]>> = {
  'F3 noncompact': [straight, '(F3-1)'],
  'F3 slender': [F3Slender, '(F3-2)'],
  'F6 noncompact': [straight, '(F6-2)'],
  'F6 slender': [F6Slender, '(F6-3), (F6-4)'],
  'F7 noncompact': [ofBox('3.57', '4.0'), '(F7-2)'],
  'F7 slender': [F7Slender, '(F7-3)'],
  'F8 noncompact': [F8Noncompact, '(F8-2)'],
  'F8 slender': [F8Slender, '(F8-3), (F8-4)'],
};

/** Local buckling of the plates that are not compact: formula, numbers, moment. */
export function localBuckling(sheet: Sheet, clause: string): readonly WorkingLine[] {
  const lines: WorkingLine[] = [];
  const found = formulas[`${clause} ${sheet.word('flangeClass') ?? ''}`];
  if (found) {
    const [formula, source] = found;
    const what = clause === 'F8' ? 'local buckling' : 'flange local buckling';
    if (sheet.number('Se') !== null) {
      const given = sheet.given([symbol('b', 'e'), 'be', 'dimension'], [symbol('S', 'e'), 'Se', 'modulus']);
      lines.push(line('effective flange', given, '(F7-4), both flanges reduced'));
    }
    lines.push(momentLine(sheet, what, formula, 'flange', source));
  }
  if (clause === 'F7' && sheet.word('webClass') === 'noncompact')
    lines.push(momentLine(sheet, 'web local buckling', ofBox('0.305', '0.738'), 'web', '(F7-6)'));
  return lines;
}

function momentLine(sheet: Sheet, what: string, formula: Formula, plate: 'flange' | 'web', source: string): WorkingLine {
  const put = formula(numbers(sheet, plate));
  return line(
    what,
    [M_n, equals, ...formula(letters), equals, ...put, equals, ...sheet.shown(`${plate}Moment`, 'moment')],
    source,
  );
}
