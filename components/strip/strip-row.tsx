import { memo } from 'react';
import { formatRatio } from '@/lib/units/format';
import type { Verdict } from '@/lib/results/result';
import { StripCell } from './strip-cell';
import { countVerdicts, stripTop, type StripFrame } from '@/lib/drawing/strip-data';
import { columnX, type StripLayout } from '@/lib/drawing/strip-layout';

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
      {(layout.groups ? groupStarts(frames, props.groupBefore, layout) : []).map(({ column, name }) => (
        <text key={column} aria-hidden="true" className="strip-group" x={columnX(layout, column)} y={foot - layout.height - 3}>
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
  const mark = frame.mark ? `, ${frame.mark}` : '';
  return `${frame.id}, ${frame.verdict ?? 'waiting'}${ratio}${mark}`;
}

/** Width of a group's name in the condensed cut, and what keeps it from the next, px. */
const nameWidth = (name: string): number => name.length * 5.6 + 12;

/** Where a group begins; a name is left out where the one before would run into it, or it into the row's tallies. */
function groupStarts(
  frames: readonly StripFrame[],
  before: string | null,
  layout: StripLayout,
): { column: number; name: string }[] {
  const starts: { column: number; name: string }[] = [];
  let last = before;
  let free = 0;
  frames.forEach((frame, column) => {
    const group = frame.group ?? null;
    const x = columnX(layout, column);
    const end = group === null ? x : x + nameWidth(group);
    if (group !== null && (group !== last || column === 0) && x >= free && end <= layout.width - layout.right + 12) {
      starts.push({ column, name: group });
      free = end;
    }
    last = group;
  });
  return starts;
}
