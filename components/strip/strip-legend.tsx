'use client';
import type { Verdict } from '@/lib/results/result';
import { VerdictMark } from '../ui/verdict-mark';
import { verdictOrder, type VerdictCounts } from '@/lib/drawing/strip-data';

interface StripLegendProps {
  readonly counts: VerdictCounts;
  /** The verdict that alone stands out; null = all. */
  readonly only: Verdict | null;
  readonly onOnly: ((only: Verdict | null) => void) | null;
}

/** The four verdicts with their counts; pressing one leaves only its cells standing out. */
export function StripLegend({ counts, only, onOnly }: StripLegendProps) {
  return (
    <div className="strip-legend" role="group" aria-label="Frames by verdict">
      {verdictOrder.map((verdict) => {
        const inside = (
          <>
            <VerdictMark verdict={verdict} size={13} /> <b>{counts[verdict].toLocaleString('en-GB')}</b> {verdict}
          </>
        );
        return onOnly ? (
          <button
            key={verdict}
            type="button"
            aria-pressed={only === verdict}
            onClick={() => onOnly(only === verdict ? null : verdict)}
          >
            {inside}
          </button>
        ) : (
          <span key={verdict}>{inside}</span>
        );
      })}
    </div>
  );
}
