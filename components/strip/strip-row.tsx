import { memo } from 'react';
import { formatRatio } from '@/lib/units/format';
import type { Verdict } from '@/lib/results/result';
import { StripCell } from './strip-cell';
import { countVerdicts, stripTop, type StripFrame } from './strip-data';
import { columnX, type StripLayout } from './strip-layout';

interface StripRowProps {
  readonly frames: readonly StripFrame[];
  /** Index of the row's first frame, and of the one read, if it is in this row (else −1). */
  readonly from: number;
  readonly read: number;
  /** Group of the frame before this row, so that a name is written where a group begins. */
  readonly groupBefore: string | null;
  readonly layout: StripLayout;
  readonly only: Verdict | null;
  readonly idOf: string;
  readonly hatch: string;
  readonly nearLimit: number;
  readonly count: number;
}

/** A row of the strip: its first number, the line at 1.00, the cells on their baseline, and its tally. */
export const StripRow = memo(function StripRow(props: StripRowProps) {
  const { frames, from, read, layout, only, idOf, hatch, nearLimit, count } = props;
  const foot = layout.gap + layout.height;
  const ran = frames.findLastIndex((frame) => frame.state !== 'waiting');
  const end = ran < 0 ? layout.left : columnX(layout, ran) + layout.cell + 1;
  const start = layout.left;
  const one = foot - layout.height / stripTop;
  const tally = countVerdicts(frames);
  return (
    <svg
      className="strip-row"
      role="presentation"
      viewBox={`0 0 ${layout.width} ${layout.rowPitch}`}
      width="100%"
      data-from={from}
    >
      <text aria-hidden="true" className="strip-number" x={start - 6} y={foot} textAnchor="end">
        {from + 1}
      </text>
      {(layout.groups ? groupStarts(frames, props.groupBefore) : []).map(({ column, name }) => (
        <text key={column} aria-hidden="true" className="strip-group" x={columnX(layout, column)} y={foot - layout.height - 1.5}>
          {name}
        </text>
      ))}
      {ran >= 0 && <path className="strip-one" d={`M${start} ${one}H${end}`} />}
      {frames.map((frame, i) => (
        <StripCell
          key={from + i}
          frame={frame}
          index={from + i}
          x={columnX(layout, i)}
          width={layout.cell}
          height={layout.height}
          foot={foot}
          dim={only !== null && frame.verdict !== only}
          read={read === from + i}
          id={`${idOf}-${from + i}`}
          count={count}
          label={label(frame, nearLimit)}
          hatch={hatch}
        />
      ))}
      {ran >= 0 && <path className="strip-base" d={`M${start} ${foot}H${end}`} />}
      {(['over', 'near', 'not checked'] as const).map((verdict, i) =>
        tally[verdict] > 0 ? (
          <text
            key={verdict}
            aria-hidden="true"
            className={`strip-tally strip-tally-${verdict.replace(' ', '-')}`}
            x={layout.width - layout.right + 20 + i * 19}
            y={foot}
            textAnchor="end"
          >
            {tally[verdict]}
          </text>
        ) : null,
      )}
    </svg>
  );
});

/** "D05-10, over, 1.13": what a screen reader says of a cell. */
function label(frame: StripFrame, nearLimit: number): string {
  if (frame.state) return `${frame.id}, ${frame.state}`;
  const ratio = frame.ratio === null ? '' : `, ${formatRatio(frame.ratio, nearLimit)}`;
  return `${frame.id}, ${frame.verdict ?? 'waiting'}${ratio}`;
}

/** Where a group begins; a name is left out where the one before would run into it. */
function groupStarts(frames: readonly StripFrame[], before: string | null): { column: number; name: string }[] {
  const starts: { column: number; name: string }[] = [];
  let last = before;
  let free = 0;
  frames.forEach((frame, column) => {
    const group = frame.group ?? null;
    if (group !== null && (group !== last || column === 0) && column >= free) {
      starts.push({ column, name: group });
      free = column + Math.ceil((group.length * 6 + 8) / 15);
    }
    last = group;
  });
  return starts;
}
