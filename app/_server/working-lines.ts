import 'server-only';
import type { WorkingLine } from '@/lib/checks/working-parts';
import type { RevisionRecord } from '@/db/queries/revisions';
import { workingOf } from '@/lib/checks/working';
import { workingFormat } from '@/lib/checks/working-format';
import type { Check } from '@/lib/results/result';

/** The calculation of a check in the batch's units, the limit's line closed by where its setting was given. */
export function workingLines(check: Check, { units, settings, origins }: RevisionRecord): WorkingLine[] {
  const lines = workingOf(check, workingFormat(units, settings?.nearLimit ?? 0.9));
  const given = check.quantity === 'stress' ? origins?.stressFactor : undefined;
  if (given === undefined) return [...lines];
  const source = given.cell ?? (given.source === 'default' ? 'taken as default' : `from the ${given.source}`);
  return lines.map((line) => (line.what === 'limit' ? { ...line, source: `factor: ${source}` } : line));
}
