import type { Check } from '@/lib/results/result';
import { fraction, root, symbol, type Printer, type WorkingLine, type WorkingPart } from '../working-parts';
import { imperfectionFactor, type Curve } from './reduction-factor';
import { annexBLines, criticalMomentLines, momentFactorLines, momentGradientLines } from './working-ec3-factors';
import { classLine, given, M1, reader, squared, sum, words, type Reader } from './working-ec3-parts';

const fy = symbol('f', 'y');
const lambda = symbol('λ̄');
const alphaOf = (curve: string): number => imperfectionFactor[curve as Curve];

export function flexuralWorking(check: Check, print: Printer): readonly WorkingLine[] {
  const of = reader(check);
  const axis = of.word('axis');
  const Ncr = symbol('N', `cr,${axis}`);
  const [phi, chi] = [print.number(of.number('phi'), 'number'), print.number(of.number('chi'), 'number')];
  const n = (name: string): WorkingPart => print.number(of.number(name), 'number');
  const curve = of.word('curve');
  return [
    given('compression', print, [[symbol('N', 'Ed'), of.number('N'), 'force']]),
    classLine(of, print),
    axis === 'T' ? torsional(of, print) : euler(of, print, axis),
    sum('slenderness', lambda, [root(fraction([symbol('A'), fy], [Ncr]))], [root(fraction([print.number(of.number('A'), 'area'), words('·'), print.number(of.number('fy'), 'stress')], [print.number(of.number('Ncr'), 'force')]))], n('lambda'), '6.3.1.2(1)'), // prettier-ignore
    { what: 'buckling curve', parts: [words(`${curve}:`), symbol('α'), words('='), print.number(alphaOf(curve), 'number')], source: 'Tables 6.1, 6.2' }, // prettier-ignore
    sum('Φ', symbol('Φ'), [words('0.5 [1 +'), symbol('α'), words('('), lambda, words('− 0.2) +'), squared('λ̄'), words(']')], [words('0.5 [1 +'), print.number(alphaOf(curve), 'number'), words('('), n('lambda'), words('− 0.2) + ('), n('lambda'), words(')²]')], phi, '6.3.1.2(1)'), // prettier-ignore
    sum('reduction factor', symbol('χ'), [fraction([words('1')], [symbol('Φ'), words('+'), root(squared('Φ'), words('−'), squared('λ̄'))])], [fraction([words('1')], [phi, words('+'), root(words('('), phi, words(')² − ('), n('lambda'), words(')²'))])], chi, '(6.49), not above 1'), // prettier-ignore
    sum('buckling resistance', symbol('N', 'b,Rd'), [fraction([symbol('χ'), symbol('A'), fy], [M1])], [fraction([chi, words('·'), print.number(of.number('A'), 'area'), words('·'), print.number(of.number('fy'), 'stress')], [n('gammaM1')])], print.number(of.number('NbRd'), 'force'), '(6.47)'), // prettier-ignore
  ];
}

function euler(of: Reader, print: Printer, axis: string): WorkingLine {
  return sum(
    `critical force, axis ${axis}`,
    symbol('N', `cr,${axis}`),
    [fraction([squared('π'), symbol('E'), symbol('I', axis)], [squared('L', 'cr')])],
    [fraction([squared('π'), print.number(of.number('E'), 'stress'), words('·'), print.number(of.number('I'), 'secondMoment')], [words('('), print.number(of.number('Lcr'), 'length'), words(')²')])], // prettier-ignore
    print.number(of.number('Ncr'), 'force'),
    '6.3.1.2(1)',
  );
}

function torsional(of: Reader, print: Printer): WorkingLine {
  return sum(
    'critical force, torsional',
    symbol('N', 'cr,T'),
    [fraction([words('1')], [squared('i', '0')]), words('('), symbol('G'), symbol('I', 't'), words('+'), fraction([squared('π'), symbol('E'), symbol('I', 'w')], [squared('L', 'T')]), words(')')], // prettier-ignore
    [fraction([words('1')], [print.number(of.number('i0squared'), 'area')]), words('('), print.number(of.number('G'), 'stress'), words('·'), print.number(of.number('I'), 'secondMoment'), words('+'), fraction([squared('π'), print.number(of.number('E'), 'stress'), words('·'), print.number(of.number('Iw'), 'warping')], [words('('), print.number(of.number('Lcr'), 'length'), words(')²')]), words(')')], // prettier-ignore
    print.number(of.number('Ncr'), 'force'),
    '6.3.1.4; EN 1993-1-3 (6.33a)',
  );
}

export function lateralWorking(check: Check, print: Printer): readonly WorkingLine[] {
  const of = reader(check);
  const n = (name: string): WorkingPart => print.number(of.number(name), 'number');
  const rolled = of.word('by') === 'rolled';
  const curve = of.word('curve');
  const W = `${of.word('Wname')},y`;
  const high = of.number('zg') > 0;
  const lines: WorkingLine[] = [
    given('moment', print, [[symbol('M', 'Ed'), of.number('M'), 'moment'], [symbol('L'), of.number('L'), 'length']], `${of.word('face')} face in compression, between restraints`), // prettier-ignore
    classLine(of, print),
    ...momentGradientLines(of, print),
    ...(high ? [given('height of the load', print, [[symbol('C', '2'), of.number('C2'), 'number'], [symbol('z', 'g'), of.number('zg'), 'dimension']])] : []), // prettier-ignore
    ...criticalMomentLines(of, print),
    sum('slenderness', symbol('λ̄', 'LT'), [root(fraction([symbol('W', W), fy], [symbol('M', 'cr')]))], [root(fraction([print.number(of.number('W'), 'modulus'), words('·'), print.number(of.number('fy'), 'stress')], [print.number(of.number('Mcr'), 'moment')]))], n('lambdaLT'), '6.3.2.2(1)'), // prettier-ignore
    { what: 'buckling curve', parts: [words(`${curve}:`), symbol('α', 'LT'), words('='), print.number(alphaOf(curve), 'number')], source: rolled ? 'Tables 6.3, 6.5; λ̄LT,0 = 0.4, β = 0.75' : 'Tables 6.3, 6.4' }, // prettier-ignore
  ];
  const LT = symbol('λ̄', 'LT');
  const sq = squared('λ̄', 'LT');
  const [Phi, beta] = [symbol('Φ', 'LT'), rolled ? [words('0.75')] : []];
  lines.push(
    sum('Φ_LT', Phi, [words('0.5 [1 +'), symbol('α', 'LT'), words('('), LT, words(rolled ? '− 0.4) +' : '− 0.2) +'), ...beta, sq, words(']')], [words('0.5 [1 +'), print.number(alphaOf(curve), 'number'), words('('), n('lambdaLT'), words(rolled ? '− 0.4) +' : '− 0.2) +'), ...(rolled ? [words('0.75 ·')] : []), words('('), n('lambdaLT'), words(')²]')], n('phiLT'), rolled ? '6.3.2.3(1)' : '6.3.2.2(1)'), // prettier-ignore
    sum('reduction factor', symbol('χ', 'LT'), [fraction([words('1')], [Phi, words('+'), root(squared('Φ', 'LT'), words('−'), ...beta, sq)])], [fraction([words('1')], [n('phiLT'), words('+'), root(words('('), n('phiLT'), words(rolled ? ')² − 0.75 · (' : ')² − ('), n('lambdaLT'), words(')²'))])], n('chiLT'), rolled ? '(6.57), not above 1 and 1/λ̄LT²' : '(6.56), not above 1'), // prettier-ignore
  );
  if (rolled)
    lines.push(
      given(
        'correction factor',
        print,
        [[symbol('k', 'c'), of.number('kc'), 'number']],
        'Table 6.6; 1/√C1 where loaded, not below 0.90 but for a force at the middle',
      ),
      sum('f', symbol('f'), [words('1 − 0.5 (1 −'), symbol('k', 'c'), words(') [1 − 2 ('), LT, words('− 0.8)²]')], [words('1 − 0.5 (1 −'), n('kc'), words(') [1 − 2 ('), n('lambdaLT'), words('− 0.8)²]')], n('f'), '6.3.2.3(2), not above 1'), // prettier-ignore
      sum('modified reduction factor', symbol('χ', 'LT,mod'), [fraction([symbol('χ', 'LT')], [symbol('f')])], [fraction([n('chiLT')], [n('f')])], n('chiLTmod'), '(6.58), not above 1 and 1/λ̄LT²'), // prettier-ignore
    );
  const reduction = rolled ? symbol('χ', 'LT,mod') : symbol('χ', 'LT');
  lines.push(
    sum('buckling resistance', symbol('M', 'b,Rd'), [fraction([reduction, symbol('W', W), fy], [M1])], [fraction([n('chiLTmod'), words('·'), print.number(of.number('W'), 'modulus'), words('·'), print.number(of.number('fy'), 'stress')], [n('gammaM1')])], print.number(of.number('MbRd'), 'moment'), '(6.55)'), // prettier-ignore
  );
  return lines;
}

export function interactionWorking(check: Check, print: Printer): readonly WorkingLine[] {
  const of = reader(check);
  const turned = of.number('turned') === 1;
  const A = of.word('annex') === 'A';
  const axis = turned ? 'z' : 'y';
  const out = of.word('outMode');
  const optional = (names: readonly (readonly [WorkingPart, string])[]): (readonly [WorkingPart, number, 'number'])[] =>
    names.flatMap(([letter, name]) => (of.has(name) ? [[letter, of.number(name), 'number'] as const] : []));
  const k61 = symbol('k', turned ? 'yz' : 'yy');
  const k62 = symbol('k', turned ? 'zz' : 'zy');
  const n = (name: string): WorkingPart => print.number(of.number(name), 'number');
  const m = symbol('M', 'Ed');
  const MRd = symbol('M', of.number('susceptible') === 1 ? 'b,Rd' : `${axis},Rd`);
  const expression = (what: string, Nb: WorkingPart, k: WorkingPart, axial: string, factor: string, value: string, source: string): WorkingLine => // prettier-ignore
    sum(what, words('Σ'), [fraction([symbol('N', 'Ed')], [Nb]), words('+'), k, fraction([m], [MRd])], [n(axial), words('+'), n(factor), words('·'), n('m')], print.result(of.number(value), 'number'), source); // prettier-ignore
  const kSource = `Table A.1${of.number('susceptible') === 1 ? '' : ', not susceptible to torsional deformations'}`;
  return [
    given('compression and moment', print, [[symbol('N', 'Ed'), of.number('N'), 'force'], [m, of.number('M'), 'moment']]), // prettier-ignore
    classLine(of, print),
    given('buckling resistances', print, [[symbol('λ̄', 'y'), of.number('lambdaY'), 'number'], [symbol('χ', 'y'), of.number('chiY'), 'number'], [symbol('N', 'b,y,Rd'), of.number('NbyRd'), 'force'], [symbol('λ̄', out), of.number('lambdaZ'), 'number'], [symbol('χ', out), of.number('chiZ'), 'number'], [symbol('N', `b,${out},Rd`), of.number('NbzRd'), 'force']], '6.3.1'), // prettier-ignore
    given('moment resistance', print, [[symbol('χ', 'LT'), of.number('chiLT'), 'number'], [MRd, of.number('MbRd'), 'moment']], of.number('susceptible') === 1 ? '6.3.2' : 'W fy/γM1'), // prettier-ignore
    ...(A
      ? [
          given('moment factors', print, optional([[symbol('C', `m${axis},0`), 'Cm0'], [symbol('C', `m${axis}`), 'Cm'], [symbol('C', 'mLT'), 'CmLT']]), 'Tables A.1, A.2'), // prettier-ignore
          given('auxiliary terms', print, [...optional([[symbol('μ', 'y'), 'muY'], [symbol('μ', 'z'), 'muZ'], [symbol('n', 'pl'), 'npl'], [symbol('a', 'LT'), 'aLT'], [symbol('λ̄', '0'), 'lambda0'], [symbol('ε', 'y'), 'epsilonY'], [symbol('C', turned ? 'yz' : 'yy'), 'C61'], [symbol('C', turned ? 'zz' : 'zy'), 'C62']]), [symbol('N', 'cr,y'), of.number('NcrY'), 'force'], [symbol('N', 'cr,z'), of.number('NcrZ'), 'force']], 'Table A.1'), // prettier-ignore
          given('interaction factors', print, [[k61, of.number('k61'), 'number'], [k62, of.number('k62'), 'number']], kSource), // prettier-ignore
        ]
      : [...momentFactorLines(of, print, axis), ...annexBLines(of, print)]),
    expression('about y', symbol('N', 'b,y,Rd'), k61, 'nY', 'k61', 'r61', '(6.61)'),
    expression('about z', symbol('N', `b,${out},Rd`), k62, 'nZ', 'k62', 'r62', '(6.62)'),
  ];
}
