/** The larger of two figures of merit; NaN is worst of all. */
export function worse(a: number, b: number): number {
  return a >= b ? a : b > a ? b : NaN;
}
