'use client';
import { useState, type PointerEvent } from 'react';
import type { Verdict } from '@/lib/results/result';
import { formatRatio } from '@/lib/units/format';
import { VerdictMark } from '../ui/verdict-mark';
import { useWidth } from '../ui/use-width';
import { ticks, tickText } from '@/lib/drawing/axis';
import type { RatioPoint } from './charts-data';

interface RatioAgainstProps {
  /** Points with an x are drawn; x in the axis's unit. */
  readonly points: readonly RatioPoint[];
  readonly parameter: string;
  readonly unit: string;
  readonly nearLimit: number;
  readonly height?: number;
  /** Name of the point that is told of where none is pointed at; else the worst. */
  readonly chosen?: string | null;
  /** What there is none of where nothing can be drawn. */
  readonly none?: string;
}

/** Governing ratio against a parameter of the family; the worst frame's group is joined by a thin line in order of x. */
export function RatioAgainst({ points, parameter, unit, nearLimit, height = 226, chosen, none }: RatioAgainstProps) {
  const [box, width] = useWidth<HTMLDivElement>(440);
  const [read, setRead] = useState<RatioPoint | null>(null);
  const drawn = points.filter((p): p is RatioPoint & { x: number } => typeof p.x === 'number' && Number.isFinite(p.ratio));
  const axis = unit === '' || unit === '-' ? parameter : `${parameter}, ${unit}`;
  if (drawn.length === 0) return <p className="chart-note">{none ?? `No frame has a value of ${parameter} and a ratio.`}</p>;
  const [left, foot, head] = [36, height - 34, 8];
  const xs = drawn.map((p) => p.x);
  const [x0, x1] = padded(Math.min(...xs), Math.max(...xs));
  const largest = Math.max(1.1, ...drawn.map((p) => p.ratio));
  const high = Math.min(2, Math.ceil((largest + 0.02) * 5) / 5);
  const low = Math.max(0, Math.floor(Math.min(0.8, ...drawn.map((p) => p.ratio)) * 5) / 5);
  const X = (value: number) => left + ((value - x0) / (x1 - x0)) * (width - left - 8);
  const Y = (ratio: number) => foot - ((Math.min(ratio, high) - low) / (high - low)) * (foot - head);
  const [xTicks, yTicks] = [ticks(x0, x1, width > 350 ? 8 : 5), ticks(low, high, 5)];
  const worst = drawn.reduce((a, b) => (b.ratio > a.ratio ? b : a));
  const family = worst.group ? drawn.filter((p) => p.group === worst.group).sort((a, b) => a.x - b.x) : [];
  const pointAt = (event: PointerEvent<SVGSVGElement>) => {
    const bounds = event.currentTarget.getBoundingClientRect();
    const [px, py] = [event.clientX - bounds.left, event.clientY - bounds.top];
    let best: RatioPoint | null = null;
    let nearest = 14;
    for (const p of drawn) {
      const distance = Math.hypot(X(p.x) - px, Y(p.ratio) - py);
      if (distance < nearest) [best, nearest] = [p, distance];
    }
    setRead(best);
  };
  const taken = chosen ? drawn.find((p) => p.frame === chosen) : undefined;
  const told = read ?? taken ?? worst;
  const beyond = drawn.filter((p) => p.ratio > high);
  return (
    <div ref={box} className="chart">
      <svg
        viewBox={`0 0 ${width} ${height}`}
        width="100%"
        role="img"
        aria-label={`Governing ratio against ${axis}: worst ${worst.frame} with ${formatRatio(worst.ratio, nearLimit)} at ${worst.x}`}
        onPointerMove={pointAt}
        onPointerLeave={() => setRead(null)}
      >
        {yTicks.map((t) => (
          <g key={t}>
            <path className="chart-grid" d={`M${left} ${Y(t)}H${width - 8}`} />
            <text className="chart-text" x={left - 6} y={Y(t) + 4} textAnchor="end">
              {tickText(t, yTicks)}
            </text>
          </g>
        ))}
        {xTicks.map((t) => (
          <text key={t} className="chart-text" x={X(t)} y={foot + 15} textAnchor="middle">
            {tickText(t, xTicks)}
          </text>
        ))}
        <path className="chart-near-line" d={`M${left} ${Y(nearLimit)}H${width - 8}`} />
        <path className="chart-limit" d={`M${left} ${Y(1)}H${width - 8}`} />
        {family.length > 1 && <path className="chart-family" d={`M${family.map((p) => `${X(p.x)} ${Y(p.ratio)}`).join('L')}`} />}
        {(['within', 'near', 'over', 'not checked'] as const).map((verdict) => (
          <path
            key={verdict}
            className={`chart-points chart-points-${verdict.replace(' ', '-')}`}
            d={drawn
              .filter((p) => p.verdict === verdict)
              .map((p) => glyph(verdict, X(p.x), Y(p.ratio)))
              .join('')}
          />
        ))}
        {beyond.length > 0 && (
          <path className="chart-beyond" d={beyond.map((p) => `M${X(p.x) - 3} ${head - 4}l3 -3 3 3`).join('')} />
        )}
        <path className="chart-axis" d={`M${left} ${head}V${foot}H${width - 8}`} />
        <text className="chart-text" x={width - 8} y={height - 4} textAnchor="end">
          {axis}
        </text>
        {(read ?? taken) && (
          <circle className="chart-read" cx={X((read ?? taken)?.x ?? 0)} cy={Y((read ?? taken)?.ratio ?? 0)} r={7} />
        )}
      </svg>
      <p className="chart-note">
        {read ? '' : taken ? 'chosen: ' : 'worst: '}
        <b>{told.frame}</b> <VerdictMark verdict={told.verdict} size={10} /> {formatRatio(told.ratio, nearLimit)}, {parameter}{' '}
        {Number((told.x ?? 0).toPrecision(4))} {unit}
        {told.group ? `, ${told.group}` : ''}
        {beyond.length > 0 && `; ${beyond.length.toLocaleString('en-GB')} above ${high}, drawn on the upper edge`}
      </p>
    </div>
  );
}

function padded(low: number, high: number): [number, number] {
  const pad = high > low ? (high - low) * 0.06 : Math.max(Math.abs(high) * 0.1, 0.5);
  return [low - pad, high + pad];
}

/** A verdict's shape about a point: square, square with a stroke, notched block, hollow square. */
function glyph(verdict: Verdict, x: number, y: number): string {
  const [a, b] = [x - 3, y - 3];
  if (verdict === 'over') return `M${a} ${b}l1.6 0 1.4 2.2 1.4-2.2 1.6 0v6h-6z`;
  return `M${a} ${b}h6v6h-6z${verdict === 'near' ? `M${a} ${b + 6}l6-6` : ''}`;
}
