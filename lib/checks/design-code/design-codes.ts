import type { Settings } from '@/lib/model/settings';
import type { Check } from '@/lib/results/result';
import type { Printer, WorkingLine } from '../working-parts';
import { aiscAsd, aiscLrfd } from '../aisc/aisc';
import { ec3 } from '../ec3/ec3';
import { isClause } from './clause-name';
import type { DesignCode } from './clause-row';

/** The design codes that members can be checked by; a strength check that is not among them is refused by the reader. */
const codes: readonly DesignCode[] = [ec3, aiscLrfd, aiscAsd];

/** The code of a strength check; null = elastic stress, or none that is built. */
export const designCodeOf = (strengthCheck: Settings['strengthCheck']): DesignCode | null =>
  codes.find((code) => code.name === strengthCheck) ?? null;

/** The calculation of a design code's check; null for checks of stress, stability, movement and the critical load factor. */
export function codeWorking(check: Check, print: Printer): readonly WorkingLine[] | null {
  if (!isClause(check.check)) return null;
  for (const code of codes) {
    const lines = code.working(check, print);
    if (lines !== null) return lines;
  }
  return [];
}
