import type { Severity } from '@/lib/problems/problem';

/** Cross, wave, dash: a problem in a sheet has its own shapes, so that it is never taken for a verdict. */
export function SeverityMark({ severity, word = true }: { readonly severity: Severity; readonly word?: boolean }) {
  return (
    <span className={`severity severity-${severity}`}>
      <svg width="12" height="12" viewBox="0 0 12 12" aria-hidden="true">
        <path d={shapes[severity]} />
      </svg>
      {word ? ` ${severity}` : <span className="sr-only">{severity}</span>}
    </span>
  );
}

const shapes: Readonly<Record<Severity, string>> = {
  error: 'M2 2 10 10M10 2 2 10',
  warning: 'M1 7.4C2.6 3.6 4.4 3.6 6 6S9.4 8.4 11 4.6',
  note: 'M2 6H10',
};
