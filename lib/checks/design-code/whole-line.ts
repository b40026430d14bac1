import type { MemberLine, Polynomial, Segment } from '@/lib/results/result';
import type { Span } from '../spans';

/**
 * The line of a physical member from the span's start to its end. A piece drawn against the span is turned round: N and V
 * stay, M, u and v change sign, since its top is the span's bottom.
 * @param lines of the span's pieces, in the order of span.pieces, each as its own member is drawn
 */
export function wholeLine(span: Span, lines: readonly MemberLine[]): MemberLine {
  const first = span.pieces[0]!;
  if (span.pieces.length === 1 && !first.reversed) return lines[0]!;
  const segments: Segment[] = [];
  span.pieces.forEach((piece, i) => {
    const line = lines[i]!;
    if (piece.reversed)
      for (let k = line.segments.length - 1; k >= 0; k--) segments.push(turned(line.segments[k]!, piece.from_m, line.length));
    else for (const s of line.segments) segments.push({ ...s, from: s.from + piece.from_m, to: s.to + piece.from_m });
  });
  return { length: span.length_m, segments };
}

function turned(s: Segment, from_m: number, length: number): Segment {
  const h = s.to - s.from;
  const back = (p: Polynomial, sign: number): Polynomial => backwards(p, h).map((c) => (c === 0 ? 0 : sign * c));
  return {
    from: from_m + length - s.to,
    to: from_m + length - s.from,
    N: back(s.N, 1),
    V: back(s.V, 1),
    M: back(s.M, -1),
    u: back(s.u, -1),
    v: back(s.v, -1),
  };
}

/** p(h − s) as a polynomial of s. */
function backwards(p: Polynomial, h: number): number[] {
  let out: number[] = [];
  // Horner with the factor (h − s)
  for (let k = p.length - 1; k >= 0; k--) {
    const next = new Array<number>(out.length + 1).fill(0);
    for (let j = 0; j < out.length; j++) {
      next[j]! += h * out[j]!;
      next[j + 1]! -= out[j]!;
    }
    next[0]! += p[k]!;
    out = next;
  }
  return out.slice(0, Math.max(1, p.length));
}
