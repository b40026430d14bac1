import type { Polynomial } from '@/lib/results/result';

/** Value at s of c₀ + c₁ s + c₂ s² … (Horner). */
export function evaluate(p: Polynomial, s: number): number {
  let value = 0;
  for (let i = p.length - 1; i >= 0; i--) value = value * s + p[i]!;
  return value;
}

export function derivative(p: Polynomial): number[] {
  const d: number[] = [];
  for (let i = 1; i < p.length; i++) d.push(i * p[i]!);
  return d;
}

/** Antiderivative with the constant c₀. */
export function integral(p: Polynomial, constant: number): number[] {
  const out = [constant];
  for (let i = 0; i < p.length; i++) out.push(p[i]! / (i + 1));
  return out;
}

/**
 * Roots of p strictly within (0, length), ascending, each to the last digit: between neighbouring roots of its
 * derivative p is monotonic, so one change of sign is one root, found by Newton's steps kept inside it.
 * A polynomial that is nothing but rounding (every term at most `nothing` over the length) has none.
 */
export function rootsWithin(p: Polynomial, length: number, nothing: number): number[] {
  let degree = p.length - 1;
  let power = length ** degree;
  while (degree > 0 && Math.abs(p[degree]!) * power <= nothing) {
    degree--;
    power /= length;
  }
  if (degree <= 0) return [];
  if (degree === 1) return within([-p[0]! / p[1]!], length);
  if (degree === 2) return quadratic(p[0]!, p[1]!, p[2]!, length);
  const q = p.slice(0, degree + 1);
  const slope = derivative(q);
  const turns = [0, ...rootsWithin(slope, length, nothing / length), length];
  const roots: number[] = [];
  for (let i = 1; i < turns.length; i++) {
    const a = turns[i - 1]!;
    const b = turns[i]!;
    const fa = evaluate(q, a);
    const fb = evaluate(q, b);
    if (fa === 0 && a > 0) roots.push(a);
    else if (fa * fb < 0) roots.push(between(q, slope, a, b, fa));
  }
  return within(roots, length);
}

function within(roots: readonly number[], length: number): number[] {
  return roots.filter((root) => root > 0 && root < length);
}

/** Both roots without cancellation. */
function quadratic(c: number, b: number, a: number, length: number): number[] {
  const square = b * b - 4 * a * c;
  if (square < 0) return [];
  const t = -0.5 * (b + (b < 0 ? -1 : 1) * Math.sqrt(square));
  if (t === 0) return [];
  const roots = [t / a, c / t].sort((p, q) => p - q);
  return within(roots[0] === roots[1] ? [roots[0]!] : roots, length);
}

/** The root in (a, b), where p changes sign once: Newton's steps, halving wherever one would leave the bracket. */
function between(p: Polynomial, slope: Polynomial, a: number, b: number, fa: number): number {
  let x = (a + b) / 2;
  for (let pass = 0; pass < 100; pass++) {
    const fx = evaluate(p, x);
    if (fx === 0) return x;
    if (fx < 0 === fa < 0) a = x;
    else b = x;
    const next = x - fx / evaluate(slope, x);
    const inside = next > a && next < b;
    const step = inside ? next : (a + b) / 2;
    if (step === x || b - a <= 2e-16 * b) break;
    const close = inside && Math.abs(step - x) <= 2e-16 * b;
    x = step;
    if (close) break;
  }
  return x;
}
