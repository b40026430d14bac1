import type { Verdict } from '@/lib/results/result';
import { verdictClass } from './verdict-mark';

interface LevelBarProps {
  readonly ratio: number | null;
  readonly verdict: Verdict;
  readonly width?: number;
}

/** Fill to the line: band to 1.00, fill to the ratio (cut at 1.25), a line at 1.00. Decoration: the ratio stands beside it. */
export function LevelBar({ ratio, verdict, width = 60 }: LevelBarProps) {
  const one = width / 1.25;
  const fill = ratio === null ? 0 : (Math.min(Math.max(ratio, 0), 1.25) / 1.25) * width;
  const notch = ratio !== null && ratio > 1;
  return (
    <svg
      className={`level level-${verdictClass(verdict)}`}
      width={width}
      height={10}
      viewBox={`0 0 ${width} 10`}
      aria-hidden="true"
    >
      {verdict === 'not checked' && ratio === null ? (
        <rect className="level-hollow" x=".5" y=".5" width={one - 1} height="9" />
      ) : (
        <>
          <rect className="level-band" width={one} height="10" />
          {notch ? (
            <path className="level-fill" d={`M0 0H${fill}L${fill - 2} 5 ${fill} 10H0z`} />
          ) : (
            <rect className="level-fill" width={fill} height="10" />
          )}
          {verdict === 'near' && <path className="level-hatch" d={hatch(fill)} />}
          {!notch && fill > 1 && <path className="level-cap" d={`M${fill - 0.75} 0V10`} />}
        </>
      )}
      <path className={notch ? 'level-one level-one-in' : 'level-one'} d={`M${one} 0V10`} />
    </svg>
  );
}

function hatch(width: number): string {
  let d = '';
  for (let x = -10; x < width; x += 4) {
    const from = Math.max(x, 0);
    const to = Math.min(x + 10, width);
    if (to > from) d += `M${from} ${10 - (from - x)}L${to} ${10 - (to - x)}`;
  }
  return d;
}
