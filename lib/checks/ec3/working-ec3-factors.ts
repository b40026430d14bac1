/** Lines of working for the factors that a diagram of moments and Annex B give, numbers put in. */
import { fraction, root, symbol, text, type Printer, type WorkingLine, type WorkingPart } from '../working-parts';
import { given, squared, sum, words, type Reader } from './working-ec3-parts';

/** C1 of a stretch: by its diagram at the quarter points, by ψ where it is straight, or 1. */
export function momentGradientLines(of: Reader, print: Printer): readonly WorkingLine[] {
  const C1 = symbol('C', '1');
  const value = print.number(of.number('C1'), 'number');
  if (of.word('C1by') === 'straight') {
    const psi = print.number(of.number('psi'), 'number');
    return [
      sum('diagram of moments', C1, [words('1.77 − 1.04'), symbol('ψ'), words('+ 0.27'), squared('ψ')], [words('1.77 − 1.04 ·'), psi, words('+ 0.27 · ('), psi, words(')²')], value, 'straight, not above 2.60'), // prettier-ignore
    ];
  }
  if (of.word('C1by') !== 'diagram') return [given('diagram of moments', print, [[C1, of.number('C1'), 'number']], 'uniform moment, on the safe side')]; // prettier-ignore
  const M = (sub: string, name: string) => [symbol('M', sub), Math.abs(of.number(name)), 'moment'] as const;
  const part = (name: string): WorkingPart => print.number(Math.abs(of.number(name)) / of.number('Mmax'), 'number');
  const letter = (sub: string): WorkingPart => symbol('M', sub, '2');
  return [
    given('moments', print, [M('max', 'Mmax'), M('¼', 'Mquarter'), M('½', 'Mmiddle'), M('¾', 'MthreeQuarter')], 'at the quarter points of the length'), // prettier-ignore
    sum(
      'diagram of moments',
      C1,
      [root(fraction([words('35'), letter('max')], [letter('max'), words('+ 9'), letter('¼'), words('+ 16'), letter('½'), words('+ 9'), letter('¾')]))], // prettier-ignore
      [root(fraction([words('35')], [words('1 + 9 · ('), part('Mquarter'), words(')² + 16 · ('), part('Mmiddle'), words(')² + 9 · ('), part('MthreeQuarter'), words(')²')]))], // prettier-ignore
      value,
      'over the square of the largest; not below 1, not above 2.60',
    ),
  ];
}

/** M_cr in two lines, numbers put in: Euler's force of the length sideways, then the moment. */
export function criticalMomentLines(of: Reader, print: Printer): readonly WorkingLine[] {
  const high = of.number('zg') > 0;
  const P = symbol('P', 'z');
  const force = print.number(of.number('Pz'), 'force');
  const Iz = print.number(of.number('Iz'), 'secondMoment');
  const brackets = (inside: readonly WorkingPart[], lift: readonly WorkingPart[]): readonly WorkingPart[] =>
    high ? [words('{'), root(...inside, words('+ ('), ...lift, words(')²')), words('−'), ...lift, words('}')] : [root(...inside)];
  const [C1, C2, zg] = [symbol('C', '1'), symbol('C', '2'), symbol('z', 'g')];
  const letters = [fraction([symbol('I', 'w')], [symbol('I', 'z')]), words('+'), fraction([symbol('G'), symbol('I', 't')], [P])];
  const twist = [print.number(of.number('G'), 'stress'), words('·'), print.number(of.number('It'), 'secondMoment')];
  const figures = [fraction([print.number(of.number('Iw'), 'warping')], [Iz]), words('+'), fraction(twist, [force])];
  const lift = [print.number(of.number('C2'), 'number'), words('·'), print.number(of.number('zg'), 'dimension')];
  return [
    sum(
      'critical force sideways',
      P,
      [fraction([squared('π'), symbol('E'), symbol('I', 'z')], [squared('L')])],
      [fraction([squared('π'), words('·'), print.number(of.number('E'), 'stress'), words('·'), Iz], [words('('), print.number(of.number('L'), 'length'), words(')²')])], // prettier-ignore
      force,
      'over L; elastic, gross section',
    ),
    sum(
      'critical moment',
      symbol('M', 'cr'),
      [C1, P, ...brackets(letters, [C2, zg])],
      [print.number(of.number('C1'), 'number'), words('·'), force, words('·'), ...brackets(figures, lift)],
      print.number(of.number('Mcr'), 'moment'),
      '(6.3.2.2(2))',
    ),
  ];
}

/** C_m of Table B.3 with the diagram that it is of. */
export function momentFactorLines(of: Reader, print: Printer, axis: string): readonly WorkingLine[] {
  const Cm = symbol('C', `m${axis}`);
  const psi = print.number(of.number('psi'), 'number');
  const lateral = of.has('CmLT')
    ? [given('moment factor between restraints', print, [[symbol('C', 'mLT'), of.number('CmLT'), 'number']], 'Table B.3, the largest of all lengths between restraints')] // prettier-ignore
    : [];
  if (of.word('CmBy') === 'straight' && of.number('Cm') > 0.4)
    return [
      sum('moment factor', Cm, [words('0.6 + 0.4'), symbol('ψ')], [words('0.6 + 0.4 ·'), psi], print.number(of.number('Cm'), 'number'), 'Table B.3, straight, not below 0.4'), // prettier-ignore
      ...lateral,
    ];
  const alpha = of.word('CmBy') === 'end' ? symbol('α', 's') : of.word('CmBy') === 'middle' ? symbol('α', 'h') : null;
  const items: (readonly [WorkingPart, number, 'number' | 'moment'])[] = [
    [symbol('M', 'h'), of.number('Mh'), 'moment'],
    [symbol('M', 's'), of.number('Ms'), 'moment'],
    ...(alpha ? [[alpha, of.number('alpha'), 'number'] as const] : []),
    [symbol('ψ'), of.number('psi'), 'number'],
    [Cm, of.number('Cm'), 'number'],
  ];
  const source =
    of.word('CmBy') === 'sway'
      ? 'Table B.3, last line: sway mode, not below 0.9'
      : alpha
        ? 'Table B.3: the larger of uniform load and force, not below 0.4'
        : 'Table B.3: 0.4 at least; 1 where the largest moment is at neither end nor middle';
  return [given('moment factor', print, items, source), ...lateral];
}

/** The two interaction factors of Annex B for one moment. */
export function annexBLines(of: Reader, print: Printer): readonly WorkingLine[] {
  const plastic = of.number('class') <= 2;
  const turned = of.number('turned') === 1;
  const hollow = of.number('hollow') === 1;
  const n = (name: string): WorkingPart => print.number(of.number(name), 'number');
  const own = turned ? 'z' : 'y';
  const [lambda, part, k, value] = turned ? ['lambdaZ', 'nZ', 'kzz', 'k62'] : ['lambdaY', 'nY', 'kyy', 'k61'];
  const capped = of.number(lambda) > 1;
  const letter = symbol('k', k.slice(1));
  const [l, lp, Cm] = [symbol('λ̄', own), symbol('n', own), symbol('C', `m${own}`)];
  const slope = (sign: WorkingPart): readonly WorkingPart[] => {
    if (!plastic) return capped ? [words('0.6')] : [words('0.6 ·'), sign];
    if (turned && !hollow) return capped ? [words('1.4')] : [words('(2 ·'), sign, words('− 0.6)')];
    return capped ? [words('0.8')] : [words('('), sign, words('− 0.2)')];
  };
  const table = of.number('susceptible') === 1 ? 'Table B.2: susceptible to torsional deformations' : 'Table B.1: not susceptible to torsional deformations'; // prettier-ignore
  const first = sum(
    `interaction factor ${own}`,
    letter,
    [Cm, words('[1 +'), ...slope(l), words('·'), lp, words(']')],
    [n('Cm'), words('· [1 +'), ...slope(n(lambda)), words('·'), n(part), words(']')],
    n(value),
    `Table B.1${capped ? ', λ̄ above 1' : ''}; n = N_Ed/N_b,Rd`,
  );
  return turned ? [first, minorCross(of, print, plastic)] : [first, majorCross(of, print, plastic, table)];
}

const minorCross = (of: Reader, print: Printer, plastic: boolean): WorkingLine =>
  sum('interaction factor yz', symbol('k', 'yz'), [...(plastic ? [text('0.6 ·')] : []), symbol('k', 'zz')], [], print.number(of.number('k61'), 'number'), 'Table B.1'); // prettier-ignore

function majorCross(of: Reader, print: Printer, plastic: boolean, table: string): WorkingLine {
  const n = (name: string): WorkingPart => print.number(of.number(name), 'number');
  const letter = symbol('k', 'zy');
  const result = n('k62');
  if (of.number('susceptible') !== 1)
    return sum('interaction factor zy', letter, [words(plastic ? '0.6 ·' : '0.8 ·'), symbol('k', 'yy')], [words(plastic ? '0.6 ·' : '0.8 ·'), n('k61')], result, table); // prettier-ignore
  const [lambda, out] = [of.number('lambdaZ'), of.word('outMode')];
  if (plastic && lambda < 0.4 && Math.abs(of.number('k62') - (0.6 + lambda)) < 1e-9)
    return sum('interaction factor zy', letter, [words('0.6 +'), symbol('λ̄', out)], [words('0.6 +'), n('lambdaZ')], result, `${table}, λ̄ below 0.4`); // prettier-ignore
  const factor = words(plastic ? '0.1' : '0.05');
  const [sign, figure] = lambda < 1 ? [[symbol('λ̄', out)], [words('·'), n('lambdaZ')]] : [[], []];
  return sum(
    'interaction factor zy',
    letter,
    [words('1 −'), fraction([factor, ...sign, symbol('n', out)], [symbol('C', 'mLT'), words('− 0.25')])],
    [words('1 −'), fraction([factor, ...figure, words('·'), n('nZ')], [n('CmLT'), words('− 0.25')])],
    result,
    `${table}${lambda < 1 ? '' : ', λ̄ above 1'}`,
  );
}
