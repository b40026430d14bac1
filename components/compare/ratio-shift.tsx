'use client';
import { useMemo } from 'react';
import { ticks, tickText } from '@/lib/drawing/axis';
import type { Verdict } from '@/lib/results/result';
import { useWidth } from '../ui/use-width';
import type { ChangeCell } from './change-strip';

interface RatioShiftProps {
  readonly cells: readonly ChangeCell[];
  readonly letters: { readonly before: string; readonly after: string };
  readonly nearLimit: number;
}

const verdicts = ['within', 'near', 'not checked', 'over'] as const satisfies readonly Verdict[];

/** Ratio after against ratio before, a glyph a frame by its verdict after; on the slanting line nothing moved. */
export function RatioShift({ cells, letters, nearLimit }: RatioShiftProps) {
  const [box, width] = useWidth<HTMLDivElement>(440);
  const points = useMemo(
    () =>
      cells.flatMap(({ before, after }) =>
        before && after && before.ratio !== null && after.ratio !== null && Number.isFinite(before.ratio + after.ratio)
          ? [{ x: before.ratio, y: after.ratio, verdict: after.verdict, was: before.verdict }]
          : [],
      ),
    [cells],
  );
  if (points.length === 0) return <p className="chart-note">No frame has a ratio in both revisions.</p>;
  const all = points.flatMap(({ x, y }) => [x, y]);
  const most = (list: readonly number[], by: (a: number, b: number) => number): number => list.reduce((a, b) => by(a, b));
  const low = Math.max(0, Math.floor(Math.min(0.8, most(all, Math.min)) * 5) / 5);
  // beyond twice the limit it does not matter by how much: such frames stand at the edge
  const high = Math.min(2, Math.ceil(Math.max(1.1, most(all, Math.max)) * 5) / 5);
  const [left, head] = [36, 8];
  const size = Math.min(width - left - 8, 340);
  const foot = head + size;
  const at = (ratio: number): number => ((Math.min(ratio, high) - low) / (high - low)) * size;
  const X = (ratio: number): number => round(left + at(ratio));
  const Y = (ratio: number): number => round(foot - at(ratio));
  const scale = ticks(low, high, 5);
  const count = (fits: (point: (typeof points)[number]) => boolean): number => points.filter(fits).length;
  const became = count(({ was, verdict }) => was !== 'over' && verdict === 'over');
  const back = count(({ was, verdict }) => was === 'over' && verdict !== 'over');
  return (
    <div ref={box} className="chart">
      <svg
        viewBox={`0 0 ${width} ${foot + 34}`}
        width="100%"
        role="img"
        aria-label={`Ratio in ${letters.after} against ratio in ${letters.before} of ${points.length.toLocaleString('en-GB')} frames: ${became} became over, ${back} no longer over`}
      >
        <path className="ratio-shift-over" d={`M${X(low)} ${Y(high)}H${X(1)}V${Y(1)}H${X(low)}Z`} />
        {scale.map((t) => (
          <g key={t}>
            <path className="chart-grid" d={`M${left} ${Y(t)}h${size}M${X(t)} ${head}v${size}`} />
            <text className="chart-text" x={left - 6} y={Y(t) + 4} textAnchor="end">
              {tickText(t, scale)}
            </text>
            <text className="chart-text" x={X(t)} y={foot + 15} textAnchor="middle">
              {tickText(t, scale)}
            </text>
          </g>
        ))}
        <path className="ratio-shift-same" d={`M${X(low)} ${Y(low)}L${X(high)} ${Y(high)}`} />
        <path className="chart-near-line" d={`M${left} ${Y(nearLimit)}h${size}`} />
        <path className="chart-limit" d={`M${left} ${Y(1)}h${size}M${X(1)} ${head}v${size}`} />
        {verdicts.map((verdict) => (
          <path
            key={verdict}
            className={`chart-points chart-points-${verdict.replace(' ', '-')}`}
            d={points.flatMap((p) => (p.verdict === verdict ? [glyph(verdict, X(p.x), Y(p.y))] : [])).join('')}
          />
        ))}
        <path className="chart-axis" d={`M${left} ${head}V${foot}h${size}`} />
        <text className="chart-limit-text" x={left + 6} y={head + 14}>
          became over
        </text>
        <text className="chart-text" x={left + size - 4} y={foot - 6} textAnchor="end">
          no longer over
        </text>
        <text className="chart-text" x={left + size} y={foot + 31} textAnchor="end">
          ratio in {letters.before}
        </text>
      </svg>
    </div>
  );
}

const round = (value: number): number => Math.round(value * 10) / 10;

/** A verdict's shape: square, square with a stroke, notched block, hollow square. */
function glyph(verdict: Verdict, x: number, y: number): string {
  const [a, b] = [round(x - 3), round(y - 3)];
  if (verdict === 'over') return `M${a} ${b}l1.6 0 1.4 2.2 1.4-2.2 1.6 0v6h-6z`;
  return `M${a} ${b}h6v6h-6z${verdict === 'near' ? `M${a} ${round(b + 6)}l6-6` : ''}`;
}
