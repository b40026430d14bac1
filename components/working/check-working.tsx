import { isClause } from '@/lib/checks/design-code/clause-name';
import type { CheckLine } from '@/lib/results/check-line';
import { Working } from './working';

/** The calculation of a check of a frame; the reference stands in its heading unless a line of its own says it. */
export function CheckWorking({ check, nearLimit }: { readonly check: CheckLine; readonly nearLimit: number }) {
  return (
    <Working
      title={`${check.where}, ${check.check}`}
      reference={check.working.some((line) => line.what === 'reference') ? null : check.reference}
      lines={check.working}
      ratio={check.ratio}
      verdict={check.verdict}
      nearLimit={nearLimit}
      reason={check.reason}
      typeset={isClause(check.check)}
    />
  );
}
