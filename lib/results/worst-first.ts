import type { Check } from '@/lib/results/result';
import { governingIndex } from '@/lib/results/verdict';

/** Checks by verdict, then by largest ratio, as the governing check is chosen. */
export function worstFirst(checks: readonly Check[]): Check[] {
  const left = [...checks];
  const sorted: Check[] = [];
  while (left.length > 0) sorted.push(...left.splice(governingIndex(left), 1));
  return sorted;
}
