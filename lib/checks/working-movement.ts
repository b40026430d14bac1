import type { Check } from '@/lib/results/result';
import { fraction, root, symbol, text, type Printer, type WorkingLine, type WorkingPart } from './working-parts';

const num = (check: Check, name: string): number => {
  const value = check.inputs[name];
  return typeof value === 'number' ? value : NaN;
};

/** Working of a movement: what moved, by how much, and what its limit allows. */
export function movementWorking(check: Check, print: Printer): readonly WorkingLine[] {
  return [measured(check, print), limitLine(check, print)];
}

function measured(check: Check, print: Printer): WorkingLine {
  const what = check.combination ? `${check.check}, combination ${check.combination}` : check.check;
  const result = print.result(check.value ?? NaN, 'displacement');
  switch (check.check) {
    case 'sway': {
      const top = print.number(num(check, 'uxTop'), 'displacement');
      const bottom = print.number(num(check, 'uxBottom'), 'displacement');
      const formula = [text('|'), symbol('u', 'x,top'), text('−'), symbol('u', 'x,bottom'), text('| = |')];
      return { what, parts: [...formula, top, text('− ('), bottom, text(')| ='), result] };
    }
    case 'displacement':
      return { what, parts: [...displaced(check, print), text('='), result] };
    case 'spread': {
      const parts: WorkingPart[] = [text('change of distance between the nodes'), text('=')];
      return { what, parts: [...parts, print.number(num(check, 'change'), 'displacement'), text(', in size'), result] };
    }
    default: {
      const rule =
        check.inputs.rule === 'cantilever'
          ? `square to the member, relative to its root (${String(check.inputs.root)}), root rotation not deducted`
          : 'from the line between the moved ends';
      return { what, parts: [symbol('δ'), text('='), result, ...print.given(symbol('x'), check.at, 'length'), text(rule)] };
    }
  }
}

function displaced(check: Check, print: Printer): readonly WorkingPart[] {
  const ux = print.number(num(check, 'ux'), 'displacement');
  const uy = print.number(num(check, 'uy'), 'displacement');
  if (check.inputs.direction === 'x') return [text('|'), symbol('u', 'x'), text('| = |'), ux, text('|')];
  if (check.inputs.direction === 'y') return [text('|'), symbol('u', 'y'), text('| = |'), uy, text('|')];
  return [
    root(symbol('u', 'x', '2'), text('+'), symbol('u', 'y', '2')),
    text('='),
    root(text('('), ux, text(')² + ('), uy, text(')²')),
  ];
}

const lengths: Readonly<Record<string, string>> = { deflection: 'L', sway: 'h', spread: 'L' };

function limitLine(check: Check, print: Printer): WorkingLine {
  const { n, absolute, length } = check.inputs;
  const parts: WorkingPart[] = [];
  if (typeof n === 'number' && typeof length === 'number') {
    const letter = symbol(lengths[check.check] ?? 'L');
    const by = print.number(n, 'number');
    parts.push(fraction([letter], [by]), text('='), fraction([print.number(length, 'length')], [by]));
  }
  if (typeof absolute === 'number') {
    if (parts.length > 0) parts.push(text('or'));
    parts.push(print.number(absolute, 'displacement'));
    if (parts.length > 1) parts.push(text(', the smaller'));
  }
  return {
    what: 'limit',
    parts: [...parts, text('='), print.result(check.limit ?? NaN, 'displacement')],
    source: check.reference,
  };
}

/** Working of the critical load factor: α_cr f against 1. */
export function criticalLoadFactorWorking(check: Check, print: Printer): readonly WorkingLine[] {
  const alpha = check.inputs.alpha;
  const what = check.combination ? `critical load factor, combination ${check.combination}` : 'critical load factor';
  if (typeof alpha !== 'number') return [{ what, parts: [text('none: these loads cannot buckle the frame in its plane')] }];
  const alpha_cr = symbol('α', 'cr');
  const product = num(check, 'value');
  return [
    {
      what,
      parts: [
        alpha_cr,
        symbol('f'),
        text('='),
        print.number(alpha, 'number'),
        text('·'),
        print.number(num(check, 'f'), 'number'),
        text('='),
        print.result(product, 'number'),
      ],
      source: num(check, 'f') === 1 ? 'f: stress factor, 1 under a design code' : 'f: stress factor',
    },
    { what: 'limit', parts: [alpha_cr, symbol('f'), text('≥ 1, and ≥ 10 for a first-order analysis')] },
  ];
}
