import type { Verdict } from '@/lib/results/result';

interface VerdictMarkProps {
  readonly verdict: Verdict;
  readonly size?: number;
  /** Write the verdict's word beside the mark; without it the mark is decoration and the word must stand nearby. */
  readonly word?: boolean;
}

/** Class name of a verdict: within, near, over, not-checked. */
export const verdictClass = (verdict: Verdict) => verdict.replace(' ', '-');

/** Shape before colour: within plain with a level line, near hatched, over solid with a notch, not checked hollow and broken. */
export function VerdictMark({ verdict, size = 12, word = false }: VerdictMarkProps) {
  const mark = (
    <svg className={`vmark vmark-${verdictClass(verdict)}`} width={size} height={size} viewBox="0 0 12 12" aria-hidden="true">
      {shapes[verdict]}
    </svg>
  );
  if (!word) return mark;
  return (
    <span className={`verdict verdict-${verdictClass(verdict)}`}>
      {mark} {verdict}
    </span>
  );
}

const shapes: Readonly<Record<Verdict, React.ReactNode>> = {
  within: <rect className="vm-box" x="1" y="1" width="10" height="10" />,
  near: (
    <>
      <rect className="vm-box" x="1" y="1" width="10" height="10" />
      <path className="vm-hatch" d="M1 5 5 1M1 9 9 1M3 11 11 3M7 11 11 7" />
    </>
  ),
  over: <path className="vm-solid" d="M0 0 3.2 0 6 4.2 8.8 0 12 0V12H0z" />,
  'not checked': <rect className="vm-box" x="1" y="1" width="10" height="10" />,
};
