import { spansOf, type Span } from '@/lib/checks/spans';
import type { Frame } from '@/lib/model/frame';

/** One member of a column, with its lower and upper node. */
export interface ColumnPiece {
  readonly member: number;
  readonly foot: number;
  readonly top: number;
}
/** A column: a span, or the pieces of one, that stands. */
export interface Column {
  readonly pieces: readonly ColumnPiece[];
  readonly foot: number;
  readonly top: number;
}

/** A column: by its role, or without a role within 20° of vertical (as the sway check takes it). */
export function isColumn(frame: Frame, span: Pick<Span, 'role' | 'startNode' | 'endNode'>): boolean {
  if (span.role !== null) return span.role === 'column';
  const a = frame.nodes[span.startNode]!;
  const b = frame.nodes[span.endNode]!;
  return Math.abs(b.x_m - a.x_m) <= Math.abs(b.y_m - a.y_m) * Math.tan((20 * Math.PI) / 180) * (1 + 1e-9);
}

/** The columns of a frame; a span of several pieces is one. One that lies flat (role column, no rise) stands for nothing. */
export function columnsOf(frame: Frame): readonly Column[] {
  const rise = (member: number): number =>
    frame.nodes[frame.members[member]!.end]!.y_m - frame.nodes[frame.members[member]!.start]!.y_m;
  const columns: Column[] = [];
  for (const span of spansOf(frame)) {
    if (!isColumn(frame, span)) continue;
    const pieces = span.pieces
      .filter((piece) => rise(piece.member) !== 0)
      .map(({ member }): ColumnPiece => {
        const { start, end } = frame.members[member]!;
        return rise(member) > 0 ? { member, foot: start, top: end } : { member, foot: end, top: start };
      });
    if (pieces.length === 0) continue;
    const height = (node: number): number => frame.nodes[node]!.y_m;
    const foot = pieces.reduce((low, piece) => (height(piece.foot) < height(low) ? piece.foot : low), pieces[0]!.foot);
    const top = pieces.reduce((high, piece) => (height(piece.top) > height(high) ? piece.top : high), pieces[0]!.top);
    columns.push({ pieces, foot, top });
  }
  return columns;
}
