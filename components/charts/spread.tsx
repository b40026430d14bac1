'use client';
import { useId } from 'react';
import { spreadBins } from '@/lib/drawing/spread-bins';
import { useWidth } from '../ui/use-width';
import { ticks, tickText } from '@/lib/drawing/axis';

interface SpreadProps {
  /** Governing ratio of every frame that has one. */
  readonly ratios: readonly number[];
  readonly nearLimit: number;
  readonly height?: number;
}

/** How governing ratios are spread: frames in steps of 0.025, against the near limit and the limit at 1.00. */
export function Spread({ ratios, nearLimit, height = 226 }: SpreadProps) {
  const id = useId();
  const [box, width] = useWidth<HTMLDivElement>(400);
  const { bins, low, high, above } = spreadBins(ratios, nearLimit);
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
