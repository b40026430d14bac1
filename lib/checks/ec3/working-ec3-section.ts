import type { Check } from '@/lib/results/result';
import { fraction, root, symbol, type Printer, type WorkingLine } from '../working-parts';
import { classLine, given, M0, reader, squared, sum, words, type Reader } from './working-ec3-parts';

const N = symbol('N', 'Ed');
const V = symbol('V', 'Ed');
const M = symbol('M', 'Ed');
const fy = symbol('f', 'y');

/** 6.2.3 and 6.2.4: N_t,Rd or N_c,Rd = A fy/γM0. */
export function forceWorking(check: Check, print: Printer, kind: 't' | 'c'): readonly WorkingLine[] {
  const of = reader(check);
  const tension = kind === 't';
  const line = sum(
    tension ? 'tension resistance' : 'compression resistance',
    symbol('N', `${kind},Rd`),
    [fraction([symbol('A'), fy], [M0])],
    [
      fraction(
        [print.number(of.number('A'), 'area'), words('·'), print.number(of.number('fy'), 'stress')],
        [print.number(of.number('gammaM0'), 'number')],
      ),
    ],
    print.number(of.number(tension ? 'NtRd' : 'NcRd'), 'force'),
    tension ? '(6.6)' : '(6.10)',
  );
  const force = given(tension ? 'tension' : 'compression', print, [[N, of.number('N'), 'force']]);
  return [force, line];
}

function momentResistance(of: Reader, print: Printer): WorkingLine {
  const which = of.word('Wname');
  return sum(
    'moment resistance',
    symbol('M', 'c,Rd'),
    [fraction([symbol('W', which), fy], [M0])],
    [
      fraction(
        [print.number(of.number('W'), 'modulus'), words('·'), print.number(of.number('fy'), 'stress')],
        [print.number(of.number('gammaM0'), 'number')],
      ),
    ],
    print.number(of.number('McRd'), 'moment'),
    which === 'pl' ? '(6.13)' : '(6.14)',
  );
}

export function bendingWorking(check: Check, print: Printer): readonly WorkingLine[] {
  const of = reader(check);
  return [given('moment', print, [[M, of.number('M'), 'moment']]), classLine(of, print), momentResistance(of, print)];
}

export function shearWorking(check: Check, print: Printer): readonly WorkingLine[] {
  const of = reader(check);
  return [
    given('shear force', print, [[V, of.number('V'), 'force']]),
    given('shear area', print, [[symbol('A', 'v'), of.number('Av'), 'area'], [symbol('η'), of.number('eta'), 'number']], '6.2.6(3)'), // prettier-ignore
    sum(
      'shear resistance',
      symbol('V', 'pl,Rd'),
      [fraction([symbol('A', 'v'), fy], [root(words('3')), M0])],
      [fraction([print.number(of.number('Av'), 'area'), words('·'), print.number(of.number('fy'), 'stress')], [root(words('3')), words('·'), print.number(of.number('gammaM0'), 'number')])], // prettier-ignore
      print.number(of.number('VplRd'), 'force'),
      '(6.18)',
    ),
  ];
}

function shearReductionLine(of: Reader, print: Printer): WorkingLine {
  return sum(
    'reduction for shear',
    symbol('ρ'),
    [words('('), fraction([words('2'), V], [symbol('V', 'pl,Rd')]), words('− 1)²')],
    [
      words('('),
      fraction([words('2 ·'), print.number(of.number('V'), 'force')], [print.number(of.number('VplRd'), 'force')]),
      words('− 1)²'),
    ],
    print.number(of.number('rho'), 'number'),
    '(6.29)',
  );
}

export function bendingShearWorking(check: Check, print: Printer): readonly WorkingLine[] {
  const of = reader(check);
  const result = print.number(of.number('MvRd'), 'moment');
  const left = symbol('M', 'V,Rd');
  const [W, strength] = [print.number(of.number('W'), 'modulus'), print.number(of.number('fy'), 'stress')];
  const rho = print.number(of.number('rho'), 'number');
  const reduced =
    of.word('by') === '6.30'
      ? sum(
          'moment resistance beside shear',
          left,
          [words('('), symbol('W', 'pl'), words('−'), fraction([symbol('ρ'), squared('A', 'w')], [words('4'), symbol('t', 'w')]), words(')'), fraction([fy], [M0])], // prettier-ignore
          [words('('), W, words('−'), fraction([rho, words('· ('), print.number(of.number('Aw'), 'area'), words(')²')], [words('4 ·'), print.number(of.number('tw'), 'dimension')]), words(')'), fraction([strength], [print.number(of.number('gammaM0'), 'number')])], // prettier-ignore
          result,
          '(6.30), not above M_c,Rd',
        )
      : sum(
          'moment resistance beside shear',
          left,
          [words('(1 −'), symbol('ρ'), words(')'), symbol('M', 'c,Rd')],
          [words('(1 −'), rho, words(') ·'), print.number(of.number('McRd'), 'moment')],
          result,
          '6.2.8(3), for the whole section',
        );
  const actions = given('moment and shear force', print, [[M, of.number('M'), 'moment'], [V, of.number('V'), 'force']]); // prettier-ignore
  return [actions, classLine(of, print), shearReductionLine(of, print), momentResistance(of, print), reduced];
}

export function bendingAxialWorking(check: Check, print: Printer): readonly WorkingLine[] {
  const of = reader(check);
  const rho = of.number('rho');
  const lines: WorkingLine[] = [
    given('axial force and moment', print, [[N, of.number('N'), 'force'], [M, of.number('M'), 'moment']]), // prettier-ignore
    classLine(of, print),
  ];
  if (rho > 0) lines.push(shearReductionLine(of, print), { what: 'yield strength', parts: [words('(1 −'), symbol('ρ'), words(')'), fy, words('for the whole section')], source: '6.2.10(3)' }); // prettier-ignore
  return [...lines, ...(of.word('by') === 'elastic' ? elastic(of, print) : plastic(of, print, rho))];
}

function elastic(of: Reader, print: Printer): readonly WorkingLine[] {
  return [
    sum(
      'stress',
      symbol('σ', 'x,Ed'),
      [fraction([N], [symbol('A')]), words('+'), fraction([M], [symbol('W', 'el')])],
      [fraction([print.number(of.number('N'), 'force')], [print.number(of.number('A'), 'area')]), words('+'), fraction([print.number(of.number('M'), 'moment')], [print.number(of.number('W'), 'modulus')])], // prettier-ignore
      print.number(of.number('sigma'), 'stress'),
      '6.2.9.2(1), (6.42)',
    ),
    given('limit', print, [[symbol('σ', 'Rd'), of.number('limit'), 'stress']], 'fy/γM0'),
  ];
}

function plastic(of: Reader, print: Printer, rho: number): readonly WorkingLine[] {
  const by = of.word('by');
  const beside = rho > 0 ? ' (1 − ρ)' : '';
  const n = symbol('n');
  const lines = [
    sum('plastic resistance', symbol('N', 'pl,Rd'), [fraction([symbol('A'), fy], [M0])], rho > 0 ? [] : [fraction([print.number(of.number('A'), 'area'), words('·'), print.number(of.number('fy'), 'stress')], [print.number(of.number('gammaM0'), 'number')])], print.number(of.number('NplRd'), 'force'), '(6.6)'), // prettier-ignore
    sum('part of it', n, [fraction([N], [symbol('N', `pl,Rd${beside}`)])], rho > 0 ? [] : [fraction([print.number(of.number('N'), 'force')], [print.number(of.number('NplRd'), 'force')])], print.number(of.number('n'), 'number'), '6.2.9.1(5)'), // prettier-ignore
    momentResistance(of, print),
  ];
  const Mc = symbol('M', `c,Rd${beside}`);
  if (by === 'linear')
    return [
      ...lines,
      sum('sum of utilisations', words('Σ'), [n, words('+'), fraction([M], [Mc])], [], print.result(of.number('ratio'), 'number'), '6.2.1(7), (6.2)'), // prettier-ignore
    ];
  const a = given('flanges and web', print, [[symbol('a'), of.number('a'), 'number']], '6.2.9.1(5)');
  const formula =
    by === 'I minor'
      ? [Mc, words('[1 − ('), fraction([n, words('−'), symbol('a')], [words('1 −'), symbol('a')]), words(')²]')]
      : [Mc, fraction([words('1 −'), n], [words('1 − 0.5'), symbol('a')])];
  const [Mc0, n0, a0] = [print.number(of.number('McRd'), 'moment'), print.number(of.number('n'), 'number'), print.number(of.number('a'), 'number')]; // prettier-ignore
  const numbers =
    by === 'I minor'
      ? [Mc0, words('[1 − ('), fraction([n0, words('−'), a0], [words('1 −'), a0]), words(')²]')]
      : [Mc0, words('·'), fraction([words('1 −'), n0], [words('1 − 0.5 ·'), a0])];
  const source =
    by === 'I major'
      ? '(6.36), not above M_c,Rd; M_c,Rd where (6.33) and (6.34) hold'
      : by === 'I minor'
        ? '(6.38); M_c,Rd where (6.35) or n ≤ a holds'
        : '(6.39), (6.40), not above M_c,Rd';
  return [
    ...lines,
    a,
    sum(
      'reduced moment resistance',
      symbol('M', 'N,Rd'),
      formula,
      rho > 0 || of.number('MNRd') >= of.number('McRd') ? [] : numbers,
      print.number(of.number('MNRd'), 'moment'),
      source,
    ),
  ];
}
