/** Highest degree that is brought down. */
const most = 18;

/**
 * Monic polynomials of each degree that are least within 0 … 1 and nothing at both ends: Chebyshev's, stretched so that
 * their outermost roots stand at the ends. `least[n]` is their size, cos(π/2n)^−n 2^(1 − 2n).
 */
const shapes: Float64Array[] = [];
const least = new Float64Array(most + 1);
for (let n = 0; n <= most; n++) {
  const p = new Float64Array(n + 1);
  p[0] = 1;
  const stretch = Math.cos(Math.PI / (2 * n));
  for (let k = 1; k <= n; k++) {
    const root = k === 1 ? 1 : k === n ? 0 : 0.5 + Math.cos(((2 * k - 1) * Math.PI) / (2 * n)) / (2 * stretch);
    for (let i = k; i > 0; i--) p[i] = p[i - 1]! - root * p[i]!;
    p[0] = -root * p[0]!;
  }
  shapes.push(p);
  least[n] = n < 2 ? 1 : 2 ** (1 - 2 * n) * stretch ** -n;
}

/**
 * Lowers the degree of c₀ + c₁ t + …, 0 ≤ t ≤ 1, as far as it changes by no more than `allowed` anywhere, and by nothing at
 * both ends (economisation, Lanczos 1938).
 *
 * @param c coefficients from `at` on, changed   @returns the degree left, or −1 where going down to `cap` changes more than `beyond`
 */
export function economise(c: Float64Array, at: number, degree: number, allowed: number, cap: number, beyond: number): number {
  let spent = 0;
  let n = degree;
  for (; n > 1; n--) {
    const last = c[at + n]!;
    // rounding of the others, not worth a change of shape
    if (Math.abs(last) <= 1e-6 * allowed) {
      c[at + n] = 0;
      continue;
    }
    spent += Math.abs(last) * least[n]!;
    if (spent > allowed) {
      if (n <= cap) break;
      if (spent > beyond) return -1;
    }
    const shape = shapes[n]!;
    for (let i = 1; i < n; i++) c[at + i] = c[at + i]! - last * shape[i]!;
  }
  while (n > 0 && c[at + n] === 0) n--;
  return n;
}
