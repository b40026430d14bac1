'use client';
import { useId } from 'react';
import type { Verdict } from '@/lib/results/result';
import { useWidth } from '../ui/use-width';
import { ticks, tickText } from './axis';

interface SpreadProps {
  /** Governing ratio of every frame that has one. */
  readonly ratios: readonly number[];
  readonly nearLimit: number;
  readonly height?: number;
}

const step = 0.025;

/** How governing ratios are spread: frames in steps of 0.025, against the near limit and the limit at 1.00. */
export function Spread({ ratios, nearLimit, height = 226 }: SpreadProps) {
  const id = useId();
  const [box, width] = useWidth<HTMLDivElement>(400);
  const { bins, low, high, above } = spread(ratios, nearLimit);
  const top = Math.max(4, ...bins.map((bin) => bin.count));
  const left = 30;
  const [headroom, foot] = [22, height - 20];
  const x = (ratio: number) => left + ((ratio - low) / (high - low)) * (width - left - 8);
  const y = (count: number) => foot - (count / top) * (foot - headroom);
  const yTicks = ticks(0, top, height > 170 ? 4 : 3).filter((t) => t > 0 && Number.isInteger(t));
  const xTicks = ticks(low, high, width > 300 ? 8 : 5);
  const over = ratios.filter((ratio) => ratio > 1).length;
  return (
    <div ref={box} className="chart">
      <svg
        viewBox={`0 0 ${width} ${height}`}
        width="100%"
        role="img"
        aria-label={`Governing ratios of ${ratios.length} frames in steps of 0.025: ${over} above 1.00`}
      >
        <HatchPattern id={id} />
        {yTicks.map((t) => (
          <g key={t}>
            <path className="chart-grid" d={`M${left} ${y(t)}H${width - 8}`} />
            <text className="chart-text" x={left - 5} y={y(t) + 4} textAnchor="end">
              {t}
            </text>
          </g>
        ))}
        {bins.map((bin) => {
          const [a, b] = [x(bin.from), x(bin.to)];
          return (
            <g key={bin.from} className={`chart-bar chart-${bin.verdict}`} data-count={bin.count}>
              <rect
                x={a + 0.5}
                y={y(bin.count)}
                width={Math.max(b - a - 1, 0.5)}
                height={foot - y(bin.count)}
                fill={bin.verdict === 'near' ? `url(#${id})` : undefined}
              />
              {bin.count > 0 && <path className="chart-cap" d={`M${a + 0.5} ${y(bin.count) + 0.75}H${b - 0.5}`} />}
            </g>
          );
        })}
        <path className="chart-near-line" d={`M${x(nearLimit)} ${headroom - 8}V${foot}`} />
        <path className="chart-limit" d={`M${x(1)} ${headroom - 8}V${foot}`} />
        <text className="chart-text chart-near-text" x={x(nearLimit) - 5} y={headroom - 7} textAnchor="end">
          near {nearLimit.toFixed(2)}
        </text>
        <text className="chart-text chart-limit-text" x={x(1) + 5} y={headroom - 7}>
          limit 1.00
        </text>
        <path className="chart-axis" d={`M${left} ${foot}H${width - 8}`} />
        {xTicks.map((t) => (
          <text key={t} className="chart-text" x={x(t)} y={foot + 15} textAnchor="middle">
            {tickText(t, xTicks)}
          </text>
        ))}
      </svg>
      {above > 0 && (
        <p className="chart-note">
          {above} above {high.toFixed(2)} stand in the last step.
        </p>
      )}
    </div>
  );
}

interface Bin {
  readonly from: number;
  readonly to: number;
  readonly verdict: Exclude<Verdict, 'not checked'>;
  readonly count: number;
}

/**
 * Steps of 0.025 that never straddle 1.00 (a ratio of exactly 1.00 is near, so a step is open below, closed above) nor
 * the near limit (closed below). Above 1.6 everything stands in the last step.
 */
export function spread(ratios: readonly number[], nearLimit: number): { bins: Bin[]; low: number; high: number; above: number } {
  const largest = Math.max(1.1, ...ratios.filter(Number.isFinite));
  const smallest = Math.min(nearLimit - 0.1, ...ratios);
  const low = Math.max(0, Math.floor(smallest * 10) / 10);
  const high = Math.min(1.6, Math.ceil((largest + 0.02) * 10) / 10);
  const edges: number[] = [];
  for (let i = Math.round(low / step); i <= Math.round(high / step); i++) edges.push(Number((i * step).toFixed(3)));
  if (!edges.includes(nearLimit) && nearLimit > low) edges.push(nearLimit);
  edges.sort((a, b) => a - b);
  const counts = new Array<number>(edges.length - 1).fill(0);
  const limitAt = edges.indexOf(1);
  for (const ratio of ratios) {
    let at = 0;
    while (at < counts.length - 1 && ratio >= (edges[at + 1] ?? Infinity)) at++;
    if (ratio <= 1 && at === limitAt) at = limitAt - 1;
    counts[at] = (counts[at] ?? 0) + 1;
  }
  const bins = counts.map((count, i): Bin => {
    const from = edges[i] ?? 0;
    return { from, to: edges[i + 1] ?? 0, count, verdict: from >= 1 ? 'over' : from >= nearLimit - 1e-12 ? 'near' : 'within' };
  });
  return { bins, low, high, above: ratios.filter((ratio) => ratio > high).length };
}

/** The near hatch for charts. */
export function HatchPattern({ id }: { readonly id: string }) {
  return (
    <defs>
      <pattern id={id} width="4" height="4" patternUnits="userSpaceOnUse" patternTransform="rotate(-45)">
        <path className="hatch-ground" d="M0 0h4v4H0z" />
        <path className="hatch-line" d="M0 2h4" />
      </pattern>
    </defs>
  );
}
