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
  const T = new Float64Array(columns);
  T[1] = 1;
  let along = 0; // N − N₀
  let stretched = 0;
  const { lengths } = acting;
  for (let i = 0; i <= lengths.length; i++) {
    along -= acting.Px[i]!;
    T[3]! += acting.Py[i]!;
    bending[2 * columns + 3]! -= acting.M0[i]!;
    if (i === lengths.length) break;
    const l = lengths[i]!;
    const [n1, n2] = [-acting.qx[i]!, -acting.growX[i]! / 2];
    const [q0, q1] = [acting.qy[i]!, acting.growY[i]!];
    const straight = axial === null;
    const steps = straight ? 1 : stepsFor(k, axial + along, n1, n2, l);
    if (!(steps <= mostSteps)) return null;
    const h = l / steps;
    for (let step = 0; step < steps; step++) {
      const s = step * h;
      const N = straight ? [0, 0, 0] : [axial + along + s * (n1 + s * n2), n1 + 2 * s * n2, n2];
      const terms = straight ? 5 : termsFor(k, N, h);
      for (let c = 0; c < columns; c++) {
        const loaded = c === 3;
        series(bending, c, k, h, N, [T[c]!, loaded ? q0 + s * q1 : 0, loaded ? q1 / 2 : 0], loaded ? acting.curvature : 0, terms);
      }
      T[3]! += h * (q0 + s * q1 + (h * q1) / 2);
    }
    stretched += (l * (along + l * (n1 / 2 + (l * n2) / 3))) / k.EA;
    along += l * (n1 + l * n2);
  }
  const length = lengths.reduce((sum, l) => sum + l, 0);
  return { bending, gainT: T[3]!, gainN: along, gainU: stretched + acting.strain * length };
}

/** Steps so short that √(N/EI) × step is at most 1. */
function stepsFor({ EI, slip }: Stiffness, n0: number, n1: number, n2: number, l: number): number {
  const most = Math.max(Math.abs(n0), Math.abs(n0 + l * (n1 + l * n2)), Math.abs(n0 + (l / 2) * (n1 + (l / 2) * n2)));
  if (!(slip * most < 0.5)) return Infinity;
  return Math.max(1, Math.ceil(l * Math.sqrt(most / EI)));
}

/** Terms until (step × √(N/EI))ᵏ/k! is below rounding. */
function termsFor({ EI }: Stiffness, [n0, n1, n2]: readonly number[], h: number): number {
  const most = Math.abs(n0!) + h * (Math.abs(n1!) + h * Math.abs(n2!));
  const z = h * Math.sqrt((2 * most) / EI);
  let size = 1;
  let terms = 0;
  while (terms < 8 || (size > 1e-18 && terms < 40)) size *= z / ++terms;
  return terms;
}

/** One step of one column: v, φ, M at its end from those at its start. */
function series(
  y: Float64Array,
  column: number,
  { EI, slip }: Stiffness,
  h: number,
  [n0, n1, n2]: readonly number[],
  T: readonly number[],
  curvature: number,
  terms: number,
): void {
  let phi = y[columns + column]!;
  let M = y[2 * columns + column]!;
  let v = y[column]!;
  let [phiEnd, MEnd] = [phi, M];
  let [w1, w2] = [0, 0]; // the slope’s coefficients before this one
  let power = 1;
  for (let k = 0; k < terms; k++) {
    const t = (k < 3 ? T[k]! : 0) + n1! * w1 + n2! * w2;
    const w = (phi - slip * t) / (1 + slip * n0!);
    power *= h;
    const nextM = (t + n0! * w) / (k + 1);
    phi = (M / EI + (k === 0 ? curvature : 0)) / (k + 1);
    M = nextM;
    v += (w * power) / (k + 1);
    phiEnd += phi * power;
    MEnd += M * power;
    [w2, w1] = [w1, w];
  }
  y[column] = v;
  y[columns + column] = phiEnd;
  y[2 * columns + column] = MEnd;
}
