import type { Trial } from './buckling-trial';

/** λ either side of a change of sign, and f there. */
export interface Enclosure {
  readonly a: number;
  readonly fa: number;
  readonly b: number;
  readonly fb: number;
}
export type Signed = (lambda: number) => number;

/** f(λ) above zero below the first critical load, below zero beyond it; many critical loads passed weigh by their root. */
export function signed(at: (lambda: number) => Trial, reference: number): Signed {
  return function f(lambda: number): number {
    const { count, logSize } = at(lambda);
    // exactly on a pole of some piece: a hair beside it says as much
    if (!Number.isFinite(logSize)) return f(lambda * (1 + 1e-13));
    const size = Math.exp(Math.min(700, logSize - reference));
    return count === 0 ? size : -Math.max(Number.MIN_VALUE, size ** (1 / count));
  };
}

/** The first critical load from a λ that is near it. */
export function enclosedAround(f: Signed, near: number, cap: number): Enclosure | null {
  let [a, b] = [near, near];
  let fa = f(near);
  let fb = fa;
  for (let step = 0.002; fb > 0; step *= 3) {
    if (b > 2 * cap) return null;
    [a, fa] = [b, fb];
    b = near * (1 + step);
    fb = f(b);
  }
  for (let step = 0.002; fa <= 0; step *= 3) {
    [b, fb] = [a, fa];
    a = Math.max(0, near * (1 - step));
    fa = f(a);
  }
  return { a, fa, b, fb };
}

export const middle = ({ a, b, fa, fb }: Enclosure): number => (Math.abs(fa) < Math.abs(fb) ? a : b);

/** Closes in on the root of f, where it changes sign: inverse quadratic where that is safe, else halving (Chandrupatla 1997). */
export function enclosed(f: Signed, { a, fa, b, fb }: Enclosure, within: number): Enclosure {
  let x1 = b;
  let f1 = fb;
  let x2 = a;
  let f2 = fa;
  let x3 = a;
  let f3 = fa;
  let t = fb / (fb - fa);
  for (let pass = 0; pass < 120; pass++) {
    const x = x1 + t * (x2 - x1);
    const fx = f(x);
    if (fx > 0 === f1 > 0) {
      x3 = x1;
      f3 = f1;
    } else {
      x3 = x2;
      f3 = f2;
      x2 = x1;
      f2 = f1;
    }
    x1 = x;
    f1 = fx;
    const best = Math.abs(f1) < Math.abs(f2) ? x1 : x2;
    const tolerance = (0.5 * within * Math.abs(best)) / Math.abs(x2 - x1);
    if (tolerance > 0.5 || f1 === 0) break;
    const xi = (x1 - x2) / (x3 - x2);
    const phi = (f1 - f2) / (f3 - f2);
    if (phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi)
      t = (f1 / (f2 - f1)) * (f3 / (f2 - f3)) + ((x3 - x1) / (x2 - x1)) * (f1 / (f3 - f1)) * (f2 / (f3 - f2));
    else t = 0.5;
    t = Math.min(Math.max(t, tolerance), 1 - tolerance);
  }
  return f1 > 0 ? { a: x1, fa: f1, b: x2, fb: f2 } : { a: x2, fa: f2, b: x1, fb: f1 };
}
