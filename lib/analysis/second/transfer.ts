import type { Acting } from './second-loads';

/** EI, EA in N·m², N, and 1/GAv, as they are in the state at hand. */
export interface Stiffness {
  readonly EA: number;
  readonly EI: number;
  readonly slip: number;
}

/**
 * How what is at a member's start is carried to its end: v, φ, T, M at the end are v₀ + (row · [φ₀ T₀ M₀ 1]).
 * T is the force along local y of the *unmoved* member, M′ = T + N v′.
 */
export interface Transfer {
  /** Rows v, φ, M by columns φ₀, T₀, M₀, loads. */
  readonly bending: Float64Array;
  /** T at the end − T₀ and N at the end − N₀, N. */
  readonly gainT: number;
  readonly gainN: number;
  /** u at the end − u₀ − N₀ L/EA, m. */
  readonly gainU: number;
}

const columns = 4;
/** Above this many steps a member is far beyond what it can carry. */
const mostSteps = 1000;

/**
 * Carries the four solutions of
 *   v′ = φ − s M′,  φ′ = M/EI + κ,  M′ = T + N v′,  T′ = q_y,  N′ = −q_x,  u′ = N/EA + ε
 * (s = 1/GAv: the shear force square to the moved axis shears the member, Engesser 1891) along a member by Taylor's
 * series of the equations themselves: exact to rounding, N varying as the loads make it.
 *
 * @param axial N at the start in the geometry; null = first order (N does not bend)
 * @returns null where N is beyond all bounds
 */
export function transferOf(k: Stiffness, acting: Acting, axial: number | null): Transfer | null {
  const bending = new Float64Array(3 * columns);
  bending[columns] = 1; // φ₀
  bending[2 * columns + 2] = 1; // M₀
  let T = 0; // of the loads
  let along = 0; // N − N₀
  let stretched = 0;
  let length = 0;
  const { lengths, lines, places } = acting;
  for (let i = 0; i <= lengths.length; i++) {
    if (places.length > 0) {
      along -= places[3 * i]!;
      T += places[3 * i + 1]!;
      bending[2 * columns + 3]! -= places[3 * i + 2]!;
    }
    if (i === lengths.length) break;
    const l = lengths[i]!;
    const n1 = -lines[4 * i]!;
    const n2 = -lines[4 * i + 2]! / 2;
    const q0 = lines[4 * i + 1]!;
    const q1 = lines[4 * i + 3]!;
    const steps = axial === null ? 1 : stepsFor(k, axial + along, n1, n2, l);
    if (!(steps <= mostSteps)) return null;
    const h = l / steps;
    for (let step = 0; step < steps; step++) {
      const s = step * h;
      const N0 = axial === null ? 0 : axial + along + s * (n1 + s * n2);
      const N1 = axial === null ? 0 : n1 + 2 * s * n2;
      const N2 = axial === null ? 0 : n2;
      const terms = axial === null ? 5 : termsFor(k, N0, N1, N2, h);
      series(bending, 0, k, h, N0, N1, N2, 0, 0, 0, 0, terms);
      series(bending, 1, k, h, N0, N1, N2, 1, 0, 0, 0, terms);
      series(bending, 2, k, h, N0, N1, N2, 0, 0, 0, 0, terms);
      series(bending, 3, k, h, N0, N1, N2, T, q0 + s * q1, q1 / 2, acting.curvature, terms);
      T += h * (q0 + s * q1 + (h * q1) / 2);
    }
    stretched += (l * (along + l * (n1 / 2 + (l * n2) / 3))) / k.EA;
    along += l * (n1 + l * n2);
    length += l;
  }
  return { bending, gainT: T, gainN: along, gainU: stretched + acting.strain * length };
}

/** Steps so short that √(N/EI) × step is at most 1. */
function stepsFor({ EI, slip }: Stiffness, n0: number, n1: number, n2: number, l: number): number {
  const most = Math.max(Math.abs(n0), Math.abs(n0 + l * (n1 + l * n2)), Math.abs(n0 + (l / 2) * (n1 + (l / 2) * n2)));
  if (!(slip * most < 0.5)) return Infinity;
  return Math.max(1, Math.ceil(l * Math.sqrt(most / EI)));
}

/** Terms until (step × √(N/EI))ᵏ/k! is below rounding. */
function termsFor({ EI }: Stiffness, n0: number, n1: number, n2: number, h: number): number {
  const most = Math.abs(n0) + h * (Math.abs(n1) + h * Math.abs(n2));
  const z = h * Math.sqrt((2 * most) / EI);
  let size = 1;
  let terms = 0;
  while (terms < 8 || (size > 1e-18 && terms < 40)) size *= z / ++terms;
  return terms;
}

/** One step of one column: v, φ, M at its end from those at its start; N and T as polynomials of the step. */
function series(
  y: Float64Array,
  column: number,
  k: Stiffness,
  h: number,
  n0: number,
  n1: number,
  n2: number,
  t0: number,
  t1: number,
  t2: number,
  curvature: number,
  terms: number,
): void {
  const slip = k.slip;
  const soft = 1 / k.EI;
  const stiff = 1 / (1 + slip * n0);
  let phi = y[columns + column]!;
  let M = y[2 * columns + column]!;
  let v = y[column]!;
  let phiEnd = phi;
  let MEnd = M;
  // the slope’s coefficients before this one
  let w1 = 0;
  let w2 = 0;
  let power = 1;
  for (let i = 0; i < terms; i++) {
    const t = (i === 0 ? t0 : i === 1 ? t1 : i === 2 ? t2 : 0) + n1 * w1 + n2 * w2;
    const w = (phi - slip * t) * stiff;
    const by = 1 / (i + 1);
    const next = (t + n0 * w) * by;
    power *= h;
    phi = (M * soft + (i === 0 ? curvature : 0)) * by;
    M = next;
    v += w * power * by;
    phiEnd += phi * power;
    MEnd += M * power;
    w2 = w1;
    w1 = w;
  }
  y[column] = v;
  y[columns + column] = phiEnd;
  y[2 * columns + column] = MEnd;
}
