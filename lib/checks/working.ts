import type { Check } from '@/lib/results/result';
import { codeWorking } from './design-code/design-codes';
import { criticalLoadFactorWorking, movementWorking } from './working-movement';
import { fraction, printer, symbol, text, type Printer, type WorkingFormat, type WorkingLine } from './working-parts';
import { stabilityWorking } from './working-stability';
import { stressWorking } from './working-stress';

/**
 * The calculation of a check, as a checker can follow it: symbol, formula, numbers put in, result, clause. Made from the check's
 * own inputs only; the number it ends with is the check's, never computed again.
 *
 * A check that was not made gives what is known (a stability screening its figures) and the reason.
 */
export function workingOf(check: Check, format: WorkingFormat): readonly WorkingLine[] {
  const print = printer(format);
  const lines = [...linesOf(check, print)];
  if (check.verdict === 'not checked') lines.push({ what: 'not checked', parts: [text(check.reason ?? '')] });
  else if (check.ratio !== null && check.check !== 'stability') lines.push(ratioLine(check, print));
  return [...lines, { what: 'reference', parts: [text(check.reference)] }];
}

function linesOf(check: Check, print: Printer): readonly WorkingLine[] {
  if (check.check === 'stability') return check.inputs.N === undefined ? [] : stabilityWorking(check, print);
  if (check.check === 'critical load factor') return check.inputs.f === undefined ? [] : criticalLoadFactorWorking(check, print);
  const clause = codeWorking(check, print);
  if (clause !== null) return clause;
  if (check.verdict === 'not checked' || Object.keys(check.inputs).length === 0) return [];
  return check.quantity === 'stress' ? stressWorking(check, print) : movementWorking(check, print);
}

function ratioLine(check: Check, print: Printer): WorkingLine {
  const ratio = print.ratio(check.ratio ?? NaN);
  if (check.value === null || check.limit === null) return { what: 'ratio', parts: [ratio] };
  const quantity = check.quantity;
  const [value, limit] = [print.number(check.value, quantity), print.number(check.limit, quantity)];
  if (check.check === 'critical load factor')
    return {
      what: 'ratio',
      parts: [
        fraction([text('1')], [symbol('α', 'cr'), symbol('f')]),
        text('='),
        fraction([text('1')], [value]),
        text('='),
        ratio,
      ],
    };
  return { what: 'ratio', parts: [fraction([value], [limit]), text('='), ratio] };
}
