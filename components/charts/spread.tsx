'use client';
import { useId } from 'react';
import { spreadBins, stacked, type SpreadFrame } from '@/lib/drawing/spread-bins';
import { useWidth } from '../ui/use-width';
import { ticks, tickText } from '@/lib/drawing/axis';

interface SpreadProps {
  /** Every frame that has a governing ratio. */
  readonly frames: readonly SpreadFrame[];
  /** Frames without a ratio, which stand in no step. */
  readonly without?: number;
  readonly nearLimit: number;
  readonly height?: number;
}

/** How governing ratios are spread: frames in steps of 0.025, against the near limit and the limit at 1.00. */
export function Spread({ frames, without = 0, nearLimit, height = 226 }: SpreadProps) {
  const id = useId();
  const [box, width] = useWidth<HTMLDivElement>(400);
  const { bins, low, high, above } = spreadBins(frames, nearLimit);
  const top = Math.max(4, ...bins.map((bin) => bin.count));
  const left = 30;
  const [headroom, foot] = [22, height - 20];
  const x = (ratio: number) => left + ((ratio - low) / (high - low)) * (width - left - 8);
  const y = (count: number) => foot - (count / top) * (foot - headroom);
  const yTicks = ticks(0, top, height > 170 ? 4 : 3).filter((t) => t > 0 && Number.isInteger(t));
  const xTicks = ticks(low, high, width > 300 ? 8 : 5);
  const over = frames.filter(({ ratio }) => ratio > 1).length;
  return (
    <div ref={box} className="chart">
      <svg
        viewBox={`0 0 ${width} ${height}`}
        width="100%"
        role="img"
        aria-label={`Governing ratios of ${frames.length} frames in steps of 0.025: ${over} above 1.00`}
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
        {bins.map(({ from, to, of }) => {
          const [a, b] = [x(from), x(to)];
          let foundation = 0;
          return stacked.map((verdict) => {
            const below = foundation;
            foundation += of[verdict];
            if (of[verdict] === 0) return null;
            return (
              <g key={`${from} ${verdict}`} className={`chart-bar chart-${verdict.replace(' ', '-')}`} data-count={of[verdict]}>
                <rect
                  x={a + 0.5}
                  y={y(foundation)}
                  width={Math.max(b - a - 1, 0.5)}
                  height={y(below) - y(foundation)}
                  fill={verdict === 'near' ? `url(#${id})` : undefined}
                />
                {verdict !== 'not checked' && <path className="chart-cap" d={`M${a + 0.5} ${y(foundation) + 0.75}H${b - 0.5}`} />}
              </g>
            );
          });
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
      {without > 0 && (
        <p className="chart-note">
          {without.toLocaleString('en-GB')} not checked {without === 1 ? 'has' : 'have'} no ratio and{' '}
          {without === 1 ? 'stands' : 'stand'} in no step.
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
