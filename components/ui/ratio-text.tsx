import { formatRatio } from '@/lib/units/format';
import type { Verdict } from '@/lib/results/result';
import { verdictClass } from './verdict-mark';

interface RatioTextProps {
  readonly ratio: number | null;
  readonly verdict: Verdict | null;
  readonly nearLimit: number;
}

/** A ratio with two decimals, never rounded across a boundary of its verdict. */
export function RatioText({ ratio, verdict, nearLimit }: RatioTextProps) {
  const look = ratio === null ? 'none' : verdict ? verdictClass(verdict) : 'within';
  return <span className={`ratio ratio-${look}`}>{formatRatio(ratio, nearLimit)}</span>;
}
