/**
 * Roots of polynomials c₀ + c₁ s + c₂ s² … on a stretch 0 < s < h: where a stress or a deflection has its extremes.
 * Degrees up to 12; no allocation while solving.
 */
const MOST = 12;

/** Value at s of a polynomial of the given degree (Horner). */
export function valueAt(c: ArrayLike<number>, degree: number, s: number): number {
  let value = 0;
  for (let k = degree; k >= 0; k--) value = value * s + (c[k] ?? 0);
  return value;
}

// One row of coefficients and of roots for each order of derivative: derivative k of the scaled polynomial.
const derivative = Array.from({ length: MOST + 1 }, () => new Float64Array(MOST + 1));
const rootsOf = Array.from({ length: MOST + 1 }, () => new Float64Array(2 * MOST + 2));

/**
 * Writes the roots within 0 < s < h into `out`, ascending, and returns how many.
 *
 * A root where the polynomial only touches zero is given as well (found as a root of the derivative with a value below
 * 1e-12 of the largest coefficient); a polynomial that is zero all along has none. Works on s/h, by the roots of the
 * derivatives: between two neighbouring ones the polynomial is monotone, so a change of sign brackets exactly one root,
 * found by Newton steps that never leave the bracket.
 * @throws {RangeError} for a degree above 12
 */
export function rootsWithin(c: ArrayLike<number>, degree: number, h: number, out: Float64Array): number {
  if (degree > MOST) throw new RangeError(`rootsWithin: expected a degree up to ${MOST}, got ${degree}`);
  if (!(h > 0)) return 0;
  const p = derivative[0] as Float64Array;
  let power = 1;
  let scale = 0;
  for (let k = 0; k <= degree; k++) {
    const value = (c[k] ?? 0) * power;
    p[k] = value;
    scale = Math.max(scale, Math.abs(value));
    power *= h;
  }
  if (scale === 0) return 0;
  // On 0 … 1 a leading term of a rounding error's size is a rounding error.
  while (degree > 0 && Math.abs(p[degree] as number) <= 1e-14 * scale) degree--;
  if (degree === 0) return 0;
  const count = solve(degree, 1e-12 * scale);
  const found = rootsOf[0] as Float64Array;
  for (let i = 0; i < count; i++) out[i] = (found[i] as number) * h;
  return count;
}

/** Roots of derivative[0] (of this degree) in (0, 1) into rootsOf[0]. */
function solve(degree: number, touch: number): number {
  const orders = Math.max(0, degree - 2);
  for (let order = 1; order <= orders; order++) {
    const from = derivative[order - 1] as Float64Array;
    const to = derivative[order] as Float64Array;
    for (let k = 0; k <= degree - order; k++) to[k] = (from[k + 1] as number) * (k + 1);
  }
  let count = quadratic(derivative[orders] as Float64Array, degree - orders, rootsOf[orders] as Float64Array);
  for (let order = orders - 1; order >= 0; order--) {
    const p = derivative[order] as Float64Array;
    count = between(p, degree - order, rootsOf[order + 1] as Float64Array, count, rootsOf[order] as Float64Array, touch);
  }
  return count;
}

/** Roots in (0, 1) of a polynomial whose derivative has the given roots. */
function between(
  p: Float64Array,
  degree: number,
  turns: Float64Array,
  turnCount: number,
  out: Float64Array,
  touch: number,
): number {
  let count = 0;
  let a = 0;
  let pa = p[0] as number;
  for (let i = 0; i <= turnCount; i++) {
    const b = i < turnCount ? (turns[i] as number) : 1;
    const pb = valueAt(p, degree, b);
    if (pa !== 0 && pb !== 0 && pa > 0 !== pb > 0) out[count++] = bracketed(p, degree, a, b, pa);
    else if (i < turnCount && Math.abs(pb) <= touch) out[count++] = b;
    a = b;
    pa = pb;
  }
  return count;
}

/** The root between a and b, where the polynomial changes sign: Newton, with bisection where a step would leave the bracket. */
function bracketed(p: Float64Array, degree: number, a: number, b: number, pa: number): number {
  let low = a;
  let high = b;
  let s = (a + b) / 2;
  for (let i = 0; i < 100; i++) {
    let value = 0;
    let slope = 0;
    for (let k = degree; k >= 0; k--) {
      slope = slope * s + value;
      value = value * s + (p[k] as number);
    }
    if (value === 0) return s;
    if (value > 0 === pa > 0) low = s;
    else high = s;
    const step = s - value / slope;
    const next = step > low && step < high ? step : (low + high) / 2;
    if (Math.abs(next - s) <= 1e-16 + 4e-16 * s || next === low || next === high) return next;
    s = next;
  }
  return s;
}

/** Roots in (0, 1) of c₀ + c₁ s + c₂ s², without cancellation. */
function quadratic(c: Float64Array, degree: number, out: Float64Array): number {
  const c0 = c[0] as number;
  const c1 = c[1] as number;
  const c2 = degree >= 2 ? (c[2] as number) : 0;
  let count = 0;
  if (c2 === 0) {
    if (c1 === 0) return 0;
    const s = -c0 / c1;
    if (s > 0 && s < 1) out[count++] = s;
    return count;
  }
  let D = c1 * c1 - 4 * c2 * c0;
  // a double root lost by rounding is still where the curve turns
  if (D < 0 && D > -1e-14 * (c1 * c1 + Math.abs(4 * c2 * c0))) D = 0;
  if (D < 0) return 0;
  const q = -(c1 + (c1 < 0 ? -1 : 1) * Math.sqrt(D)) / 2;
  const first = q / c2;
  const second = q === 0 ? first : c0 / q;
  const low = Math.min(first, second);
  const high = Math.max(first, second);
  if (low > 0 && low < 1) out[count++] = low;
  if (high > 0 && high < 1 && high !== low) out[count++] = high;
  return count;
}
