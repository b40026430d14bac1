import type { Frame, Role } from '@/lib/model/frame';

/** A member as part of its span. */
export interface SpanPiece {
  readonly member: number;
  /** Distance of its nearer end from the span's start, m. */
  readonly from_m: number;
  readonly length_m: number;
  /** True where the member is drawn against the direction of the span. */
  readonly reversed: boolean;
}

/** A physical member: one member, or several with the same span word, end to end. */
export interface Span {
  /** The span word as first typed, or the member's id. */
  readonly name: string;
  readonly kind: 'span' | 'member';
  readonly pieces: readonly SpanPiece[];
  readonly length_m: number;
  readonly startNode: number;
  readonly endNode: number;
  /** Role of the first piece that has one. */
  readonly role: Role | null;
  /** False where the pieces do not form one line from end to end. */
  readonly whole: boolean;
}

/** Ids match without regard to case and outer blanks. */
export const sameId = (a: string, b: string): boolean => a === b || a.trim().toLowerCase() === b.trim().toLowerCase();

/** Length of a member between its nodes, m. */
function memberLength(frame: Frame, member: number): number {
  const m = frame.members[member]!;
  const a = frame.nodes[m.start]!;
  const b = frame.nodes[m.end]!;
  return Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m);
}

const known = new WeakMap<Frame, readonly Span[]>();

/**
 * The spans of a frame, in the order of their first member; positions run in the direction in which that member is drawn.
 * Members of one span may be drawn in any order and direction. Worked out once a frame.
 */
export function spansOf(frame: Frame): readonly Span[] {
  let spans = known.get(frame);
  if (!spans) known.set(frame, (spans = findSpans(frame)));
  return spans;
}

function findSpans(frame: Frame): readonly Span[] {
  const spans: Span[] = [];
  const byWord = new Map<string, number[]>();
  frame.members.forEach((member, i) => {
    if (member.span === null) return;
    const key = member.span.trim().toLowerCase();
    const list = byWord.get(key);
    if (list) list.push(i);
    else byWord.set(key, [i]);
  });
  frame.members.forEach((member, i) => {
    const list = member.span === null ? null : (byWord.get(member.span.trim().toLowerCase()) ?? null);
    if (list && list[0] !== i) return;
    spans.push(member.span === null || !list ? alone(frame, i) : chained(frame, member.span, list));
  });
  return spans;
}

function alone(frame: Frame, i: number): Span {
  const m = frame.members[i]!;
  const length_m = memberLength(frame, i);
  const pieces = [{ member: i, from_m: 0, length_m, reversed: false }];
  return { name: m.id, kind: 'member', pieces, length_m, startNode: m.start, endNode: m.end, role: m.role, whole: true };
}

function chained(frame: Frame, name: string, list: readonly number[]): Span {
  const first = frame.members[list[0]!]!;
  // back from the first member's start to the start of the whole line
  const left = new Set(list.slice(1));
  let startNode = first.start;
  for (let back = joined(frame, left, startNode); back >= 0; back = joined(frame, left, startNode)) {
    left.delete(back);
    const m = frame.members[back]!;
    startNode = m.end === startNode ? m.start : m.end;
  }
  const waiting = new Set(list);
  const pieces: SpanPiece[] = [];
  let node = startNode;
  let from_m = 0;
  for (let next = joined(frame, waiting, node); next >= 0; next = joined(frame, waiting, node)) {
    waiting.delete(next);
    const m = frame.members[next]!;
    const reversed = m.start !== node;
    const length_m = memberLength(frame, next);
    pieces.push({ member: next, from_m, length_m, reversed });
    from_m += length_m;
    node = reversed ? m.start : m.end;
  }
  const role = list.map((i) => frame.members[i]!.role).find((r) => r !== null) ?? null;
  const whole = waiting.size === 0;
  return { name, kind: 'span', pieces, length_m: from_m, startNode, endNode: node, role, whole };
}

function joined(frame: Frame, among: ReadonlySet<number>, node: number): number {
  for (const i of among) {
    const m = frame.members[i]!;
    if (m.start === node || m.end === node) return i;
  }
  return -1;
}

/** Which ends of a span are free: no other member, and no support that holds or springs it. */
export function freeEnds(frame: Frame, span: Span): { readonly start: boolean; readonly end: boolean } {
  const pieces = new Set(span.pieces.map((piece) => piece.member));
  const free = (node: number): boolean =>
    !supported(frame, node) && !frame.members.some((m, i) => !pieces.has(i) && (m.start === node || m.end === node));
  return { start: free(span.startNode), end: free(span.endNode) };
}

/** Whether a support holds or springs a node in any direction. */
export function supported(frame: Frame, node: number): boolean {
  return frame.supports.some((s) => s.node === node && (s.ux !== 'free' || s.uy !== 'free' || s.rz !== 'free'));
}
