/** Buckling curves of EN 1993-1-1 Tables 6.1 and 6.3. */
export type Curve = 'a0' | 'a' | 'b' | 'c' | 'd';

/** Imperfection factor α of a curve: Table 6.1 (α), Table 6.3 (α_LT). */
export const imperfectionFactor: Readonly<Record<Curve, number>> = { a0: 0.13, a: 0.21, b: 0.34, c: 0.49, d: 0.76 };

/** Φ and the reduction factor of a buckling curve. */
export interface Reduction {
  readonly phi: number;
  readonly chi: number;
}

/**
 * Φ = 0.5 [1 + α(λ̄ − λ̄0) + βλ̄²], χ = 1/(Φ + √(Φ² − βλ̄²)) ≤ 1 and ≤ 1/λ̄² where β < 1 (EN 1993-1-1 (6.49), (6.56), (6.57)).
 * Flexural buckling and 6.3.2.2: λ̄0 = 0.2, β = 1.
 */
export function reductionFactor(lambda: number, curve: Curve, plateau = 0.2, beta = 1): Reduction {
  const phi = 0.5 * (1 + imperfectionFactor[curve] * (lambda - plateau) + beta * lambda * lambda);
  if (lambda <= plateau) return { phi, chi: 1 };
  const chi = 1 / (phi + Math.sqrt(Math.max(0, phi * phi - beta * lambda * lambda)));
  return { phi, chi: Math.min(1, chi, beta < 1 ? 1 / (lambda * lambda) : 1) };
}
