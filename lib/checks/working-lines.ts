import { workingOf } from '@/lib/checks/working';
import { workingFormat } from '@/lib/checks/working-format';
import type { WorkingLine } from '@/lib/checks/working-parts';
import type { SettingOrigins, Settings } from '@/lib/model/settings';
import type { Check } from '@/lib/results/result';

interface WorkedUnder {
  readonly settings: Settings | null;
  readonly origins: SettingOrigins | null;
}

/** The calculation of a check in the batch's units, the limit's line closed by where its setting was given. */
export function workingLines(check: Check, { settings, origins }: WorkedUnder): WorkingLine[] {
  const lines = workingOf(check, workingFormat(settings?.units ?? 'metric', settings?.nearLimit ?? 0.9));
  const given = check.quantity === 'stress' ? origins?.stressFactor : undefined;
  if (given === undefined) return [...lines];
  const source = given.cell ?? (given.source === 'default' ? 'taken as default' : `from the ${given.source}`);
  return lines.map((line) => (line.what === 'limit' ? { ...line, source: `factor: ${source}` } : line));
}
