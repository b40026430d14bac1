import type { OwnKind } from '@/lib/intake/own/own-thing';
import type { Problem } from '@/lib/problems/problem';

/** What is wrong with a record by the column it stands in; the name's is `name`. */
export function errorsByField(kind: OwnKind, problems: readonly Problem[]): Readonly<Partial<Record<string, string>>> {
  const errors: Record<string, string> = {};
  for (const { severity, column, message } of problems) {
    if (severity !== 'error') continue;
    const heading = (column ?? kind).replace(/\s*\[[^\]]*\]$/, '');
    errors[heading === kind ? 'name' : heading] ??= `${message.slice(0, 1).toUpperCase()}${message.slice(1)}.`;
  }
  return errors;
}
