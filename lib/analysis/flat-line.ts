import type { MemberLine, Segment } from '@/lib/results/result';

/**
 * A member's line in a row of numbers: [segments, length], then by segment `segmentNumbers` of them: from, to, the degrees of
 * N, V, M, u and v, and their coefficients in rows of the lengths below. The same figures as in a `MemberLine`.
 */
export const headNumbers = 2;
export const degreeN = 2;
export const degreeV = 3;
export const degreeM = 4;
export const degreeU = 5;
export const degreeDeflection = 6;
export const ofN = 7;
export const ofV = 10;
export const ofM = 17;
export const ofU = 24;
export const ofDeflection = 28;
export const segmentNumbers = 37;

/** One segment's degrees. */
export function writeDegrees(to: Float64Array, o: number, N: number, V: number, M: number, u: number, v: number): void {
  to[o + degreeN] = N;
  to[o + degreeV] = V;
  to[o + degreeM] = M;
  to[o + degreeU] = u;
  to[o + degreeDeflection] = v;
}

/** The line that begins at `o`, as an object. */
export function lineFrom(numbers: Float64Array, o: number): MemberLine {
  const segments: Segment[] = [];
  for (let i = 0, s = o + headNumbers; i < numbers[o]!; i++, s += segmentNumbers)
    segments.push({
      from: numbers[s]!,
      to: numbers[s + 1]!,
      N: row(numbers, s + ofN, numbers[s + degreeN]!),
      V: row(numbers, s + ofV, numbers[s + degreeV]!),
      M: row(numbers, s + ofM, numbers[s + degreeM]!),
      u: row(numbers, s + ofU, numbers[s + degreeU]!),
      v: row(numbers, s + ofDeflection, numbers[s + degreeDeflection]!),
    });
  return { length: numbers[o + 1]!, segments };
}

function row(numbers: Float64Array, o: number, degree: number): number[] {
  const out = new Array<number>(degree + 1);
  for (let i = 0; i <= degree; i++) out[i] = numbers[o + i]!;
  return out;
}

/** A line's row; for rows of others see flat-lines.ts. @throws {RangeError} where a degree is higher than there is room for */
export function flattened({ length, segments }: MemberLine): Float64Array {
  const out = new Float64Array(headNumbers + segmentNumbers * segments.length);
  out[0] = segments.length;
  out[1] = length;
  segments.forEach(({ from, to, N, V, M, u, v }, i) => {
    const s = headNumbers + segmentNumbers * i;
    out[s] = from;
    out[s + 1] = to;
    const rows = [N, V, M, u, v] as const;
    const begins = [ofN, ofV, ofM, ofU, ofDeflection, segmentNumbers] as const;
    rows.forEach((coefficients, k) => {
      const room = begins[k + 1]! - begins[k]!;
      if (coefficients.length > room) throw new RangeError(`Expected at most ${room} coefficients, got ${coefficients.length}`);
      out[s + degreeN + k] = Math.max(0, coefficients.length - 1);
      out.set(coefficients, s + begins[k]!);
    });
  });
  return out;
}
