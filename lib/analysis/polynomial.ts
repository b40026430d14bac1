import type { Polynomial } from '@/lib/results/result';

/** Value at s of c₀ + c₁ s + c₂ s² … (Horner). */
export function evaluate(p: Polynomial, s: number): number {
  let value = 0;
  for (let i = p.length - 1; i >= 0; i--) value = value * s + p[i]!;
  return value;
}

/** Highest degree whose roots are looked for: the deflected line under a linear load has degree 5. */
const most = 8;
// a row of coefficients and one of roots for each derivative, so that nothing is allocated while looking
const rows = Array.from({ length: most + 1 }, () => new Float64Array(most + 1));
const found = Array.from({ length: most + 1 }, () => new Float64Array(most + 2));

/**
 * Roots of p strictly within (0, length), ascending, each to the last digit: between neighbouring roots of its
 * derivative p is monotonic, so one change of sign is one root, found by Newton's steps kept inside it.
 * A polynomial that is nothing but rounding (every term at most `nothing` over the length) has none.
 *
 * @param p coefficients up to `degree`, at most 8   @param out the roots   @returns how many there are
 */
export function rootsWithin(p: ArrayLike<number>, degree: number, length: number, nothing: number, out: Float64Array): number {
  if (degree > most) throw new RangeError(`Expected a degree up to ${most}, got ${degree}`);
  let power = 1;
  for (let i = 0; i < degree; i++) power *= length;
  while (degree > 0 && Math.abs(p[degree]!) * power <= nothing) {
    degree--;
    power /= length;
  }
  if (degree <= 0) return 0;
  if (degree === 1) {
    out[0] = -p[0]! / p[1]!;
    return within(out, 1, length);
  }
  if (degree === 2) return quadratic(p[0]!, p[1]!, p[2]!, length, out);
  if (degree === 3) {
    for (let i = 0; i <= 3; i++) asked[i] = p[i]!;
    asked[4] = length;
    asked[5] = nothing;
    return cubic(out);
  }
  const q = rows[degree]!;
  for (let i = 0; i <= degree; i++) q[i] = p[i]!;
  const count = higher(degree, length, nothing);
  const roots = found[degree]!;
  for (let i = 0; i < count; i++) out[i] = roots[i]!;
  return count;
}

/** Roots of rows[degree] into found[degree], by way of its derivative's in the rows below. */
function higher(degree: number, length: number, nothing: number): number {
  const q = rows[degree]!;
  const slope = rows[degree - 1]!;
  for (let i = 1; i <= degree; i++) slope[i - 1] = i * q[i]!;
  const turns = found[degree - 1]!;
  const turnCount =
    degree - 1 > 2 && Math.abs(slope[degree - 1]!) * length ** (degree - 1) > nothing / length
      ? higher(degree - 1, length, nothing / length)
      : rootsWithin(slope, degree - 1, length, nothing / length, turns);
  const roots = found[degree]!;
  let count = 0;
  let a = 0;
  let fa = q[0]!;
  for (let i = 0; i <= turnCount; i++) {
    const b = i < turnCount ? turns[i]! : length;
    const fb = valueOf(q, degree, b);
    if (fa === 0 && a > 0) roots[count++] = a;
    else if (fa * fb < 0) roots[count++] = between(q, degree, slope, a, b, fa);
    a = b;
    fa = fb;
  }
  return within(roots, count, length);
}

export function valueOf(p: ArrayLike<number>, degree: number, s: number): number {
  let value = 0;
  for (let i = degree; i >= 0; i--) value = value * s + p[i]!;
  return value;
}

/** Leaves of ascending roots those within (0, length). */
function within(roots: Float64Array, count: number, length: number): number {
  let kept = 0;
  for (let i = 0; i < count; i++) {
    const root = roots[i]!;
    if (root > 0 && root < length) roots[kept++] = root;
  }
  return kept;
}

/** Both roots without cancellation. */
function quadratic(c: number, b: number, a: number, length: number, out: Float64Array): number {
  const square = b * b - 4 * a * c;
  if (square < 0) return 0;
  const t = -0.5 * (b + (b < 0 ? -1 : 1) * Math.sqrt(square));
  if (t === 0) return 0;
  const first = t / a;
  const second = c / t;
  out[0] = first < second ? first : second;
  out[1] = first < second ? second : first;
  return within(out, first === second ? 1 : 2, length);
}

/** The root in (a, b), where p changes sign once: Newton's steps, halving wherever one would leave the bracket. */
function between(p: Float64Array, degree: number, slope: Float64Array, a: number, b: number, fa: number): number {
  let x = (a + b) / 2;
  for (let pass = 0; pass < 100; pass++) {
    const fx = valueOf(p, degree, x);
    if (fx === 0) return x;
    if (fx < 0 === fa < 0) a = x;
    else b = x;
    const next = x - fx / valueOf(slope, degree - 1, x);
    const inside = next > a && next < b;
    const step = inside ? next : (a + b) / 2;
    if (step === x || b - a <= 2e-16 * b) break;
    const close = inside && Math.abs(step - x) <= 2e-16 * b;
    x = step;
    if (close) break;
  }
  return x;
}

const turns = new Float64Array(2);

/** What `cubic` is asked: c₀, c₁, c₂, c₃, length, nothing. In an array, for numbers handed on to a function cost memory. */
export const asked = new Float64Array(6);

/**
 * The same for c₀ + c₁ s + c₂ s² + c₃ s³ as `asked`, the commonest: the slope of a member under even loads. Newton's steps
 * begin where the straight line between the bracket's ends is nought.
 */
export function cubic(out: Float64Array): number {
  const c0 = asked[0]!;
  const c1 = asked[1]!;
  const c2 = asked[2]!;
  const c3 = asked[3]!;
  const length = asked[4]!;
  const nothing = asked[5]!;
  let turnCount: number;
  if (3 * Math.abs(c3) * length * length * length > nothing) turnCount = quadratic(c1, 2 * c2, 3 * c3, length, turns);
  else {
    turns[0] = -c1 / (2 * c2);
    turnCount = 2 * Math.abs(c2) * length * length > nothing ? within(turns, 1, length) : 0;
  }
  let count = 0;
  let a = 0;
  let fa = c0;
  for (let i = 0; i <= turnCount; i++) {
    const b = i < turnCount ? turns[i]! : length;
    const fb = c0 + b * (c1 + b * (c2 + b * c3));
    if (fa === 0 && a > 0) out[count++] = a;
    else if (fa * fb < 0) {
      let low = a;
      let high = b;
      let x = a + ((b - a) * fa) / (fa - fb);
      if (!(x > a && x < b)) x = (a + b) / 2;
      for (let pass = 0; pass < 100; pass++) {
        const fx = c0 + x * (c1 + x * (c2 + x * c3));
        if (fx === 0) break;
        if (fx < 0 === fa < 0) low = x;
        else high = x;
        const next = x - fx / (c1 + x * (2 * c2 + 3 * x * c3));
        const inside = next > low && next < high;
        const step = inside ? next : (low + high) / 2;
        if (step === x || high - low <= 2e-16 * high) break;
        // the next step would be of this one's square
        const close = inside && Math.abs(step - x) <= 1e-10 * (b - a);
        x = step;
        if (close) break;
      }
      out[count++] = x;
    }
    a = b;
    fa = fb;
  }
  return within(out, count, length);
}
