import type { Check } from '@/lib/results/result';
import type { Printer, WorkingLine } from '../working-parts';
import { clauses } from './ec3-rows';
import { bendingAxialWorking, bendingShearWorking, bendingWorking, forceWorking, shearWorking } from './working-ec3-section';
import { flexuralWorking, interactionWorking, lateralWorking } from './working-ec3-buckling';

const writers: Readonly<Record<string, (check: Check, print: Printer) => readonly WorkingLine[]>> = {
  [clauses.tension.check]: (check, print) => forceWorking(check, print, 't'),
  [clauses.compression.check]: (check, print) => forceWorking(check, print, 'c'),
  [clauses.bending.check]: bendingWorking,
  [clauses.shear.check]: shearWorking,
  [clauses.bendingShear.check]: bendingShearWorking,
  [clauses.bendingAxial.check]: bendingAxialWorking,
  [clauses.flexural.check]: flexuralWorking,
  [clauses.lateral.check]: lateralWorking,
  [clauses.interaction.check]: interactionWorking,
};

/**
 * The calculation of a row of EN 1993-1-1 from its own inputs: symbol, formula, numbers put in, result, clause. Null where the
 * check is another's; nothing where it was not checked.
 */
export function ec3Working(check: Check, print: Printer): readonly WorkingLine[] | null {
  if (!check.reference.startsWith('EN 1993-1-1')) return null;
  const write = writers[check.check];
  if (!write) return check.check === clauses.class.check || check.check === 'EN 1993-1-1' ? [] : null;
  return check.verdict === 'not checked' ? [] : write(check, print);
}
