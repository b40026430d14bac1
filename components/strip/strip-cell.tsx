import { memo } from 'react';
import { checkMarkPaths } from '../checking/check-mark';
import { verdictClass } from '../ui/verdict-mark';
import { cellHeight, type StripFrame } from '@/lib/drawing/strip-data';

interface StripCellProps {
  readonly frame: StripFrame;
  readonly index: number;
  readonly x: number;
  readonly width: number;
  /** Height of the scale, 0 to 1.25, and the y of its foot. */
  readonly height: number;
  readonly foot: number;
  readonly dim: boolean;
  readonly read: boolean;
  readonly id: string;
  readonly count: number;
  readonly label: string;
  readonly hatch: string;
}

/** One frame: filled to its ratio, shaped by its verdict. `data-height` ÷ `data-full` × 1.25 is the ratio, up to 1.25. */
export const StripCell = memo(function StripCell(props: StripCellProps) {
  const { frame, index, x, width, height, foot, dim, read, id, count, label, hatch } = props;
  const state = frame.state ?? (frame.verdict ? verdictClass(frame.verdict) : 'waiting');
  const tall =
    state === 'in hand' ? cellHeight(null, height) : cellHeight(frame.verdict === 'not checked' ? null : frame.ratio, height);
  const top = foot - tall;
  return (
    <g
      id={id}
      role="option"
      aria-selected={read}
      aria-label={label}
      aria-posinset={index + 1}
      aria-setsize={count}
      className={`cell cell-${state.replace(' ', '-')} ${dim ? 'cell-dim' : ''}`}
      data-frame={frame.id}
      data-index={index}
      data-verdict={frame.state ? undefined : (frame.verdict ?? undefined)}
      data-ratio={frame.ratio ?? undefined}
      data-height={state === 'waiting' ? undefined : tall}
      data-full={height}
    >
      {state === 'over' ? (
        <path className="cell-body" d={notched(x, top, width, tall)} />
      ) : state === 'waiting' ? (
        <path className="cell-tick" d={`M${x + width * 0.25} ${foot - 0.5}h${width * 0.5}`} />
      ) : state === 'not-checked' || state === 'in hand' ? (
        <rect className="cell-body" x={x + 0.5} y={top + 0.5} width={width - 1} height={Math.max(tall - 0.5, 0)} />
      ) : (
        <rect
          className="cell-body"
          x={x}
          y={top}
          width={width}
          height={tall}
          fill={state === 'near' ? `url(#${hatch})` : undefined}
        />
      )}
      {(state === 'within' || state === 'near') && <path className="cell-level" d={`M${x} ${top + 0.75}h${width}`} />}
      {frame.mark && <Marked kind={frame.mark} x={x + width / 2} y={top} />}
      {read && <rect className="cell-read" x={x - 3.5} y={foot - height - 2} width={width + 7} height={height + 5} />}
    </g>
  );
});

/** A checker's hand over a cell's head. */
function Marked({ kind, x, y }: { readonly kind: keyof typeof checkMarkPaths; readonly x: number; readonly y: number }) {
  return (
    <g className="cell-mark" data-mark={kind} transform={`translate(${x - 4.5} ${Math.max(y - 10, 0)}) scale(0.75)`}>
      <path className="cell-mark-halo" d={checkMarkPaths[kind]} />
      <path d={checkMarkPaths[kind]} />
    </g>
  );
}

/** Solid, with a V cut in its head: 46 % wide, 20 % deep, 3 px at least. */
function notched(x: number, top: number, width: number, tall: number): string {
  const depth = Math.min(tall, Math.max(3, tall * 0.2));
  const [a, b, c] = [x + width * 0.27, x + width * 0.5, x + width * 0.73];
  return `M${x} ${top}H${a}L${b} ${top + depth} ${c} ${top}H${x + width}V${top + tall}H${x}z`;
}
