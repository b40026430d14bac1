import type { Transfer } from './piece';

/** A piece is at most this √(|N| l²/EI) long: its series then converge at once. */
export const longest = 2;

// 1/(2k + 4)! and 1/(2k + 5)!; 1/(k + 1)
const even = [1 / 24];
const odd = [1 / 120];
for (let k = 1; k < 12; k++) {
  even.push(even[k - 1]! / ((2 * k + 3) * (2 * k + 4)));
  odd.push(odd[k - 1]! / ((2 * k + 4) * (2 * k + 5)));
}
const share = Float64Array.from({ length: 32 }, (_, k) => 1 / (k + 1));

/**
 * Exact transfer along a prismatic piece: EI ψ′ = M (+ EI κ₀), M′ = Q + N v′, Q′ = q, v′ = ψ − M′/GAv (shear square to the
 * deflected axis: Engesser 1891). README §8.
 *
 * @param slip 1/GAv, 0 = no shear   @param N at its start, tension positive; N + n1 s + n2 s²   @param q0 q = q0 + q1 s
 * @param l m, √(|N| l²/EI) at most `longest`   @param kappa κ₀, free curvature
 */
export function transferAlong(
  EI: number,
  slip: number,
  l: number,
  N: number,
  n1: number,
  n2: number,
  q0: number,
  q1: number,
  kappa: number,
  out: Transfer,
): void {
  given[0] = EI;
  given[1] = slip;
  given[2] = l;
  given[3] = N;
  given[4] = n1;
  given[5] = n2;
  given[6] = q0;
  given[7] = q1;
  given[8] = kappa;
  transferGiven(out);
}

/** What `transferAlong` is asked for, in its order: numbers in a row are not made anew for every call. */
export const given = new Float64Array(9);

/** `transferAlong` of what stands in `given`. */
export function transferGiven(out: Transfer): void {
  if (given[4] === 0 && given[5] === 0) constant(out);
  else varying(out);
  out.Q_p = given[2]! * (given[6]! + 0.5 * given[2]! * given[7]!);
}

/** N constant: M″ = ωM + …, ω = N/(EI μ), μ = 1 + N/GAv, in C_k = Σ zⁱ/(2i + k)!, z = ωl² (Stumpff 1959): C_k = 1/k! + z C_{k+2}. */
function constant(out: Transfer): void {
  const EI = given[0]!, slip = given[1]!, l = given[2]!, N = given[3]!, q0 = given[6]!, q1 = given[7]!, kappa = given[8]!; // prettier-ignore
  const mu = 1 + N * slip;
  const bend = N / mu;
  const z = (bend * l * l) / EI;
  const size = z < 0 ? -z : z;
  let C4 = 0;
  let C5 = 0;
  for (let k = size < 0.05 ? 5 : size < 1 ? 7 : 11; k >= 0; k--) {
    C4 = C4 * z + even[k]!;
    C5 = C5 * z + odd[k]!;
  }
  const C3 = 1 / 6 + z * C5;
  const C2 = 0.5 + z * C4;
  const C1 = 1 + z * C3;
  const r0 = bend * kappa + q0 / mu;
  const r1 = q1 / mu;
  const b = l / EI;
  const ll = l * l;
  const v_V = b * ll * C3 - l * C1 * slip;
  const psi_V = b * l * C2;
  const M_p = ll * (r0 * C2 + r1 * l * C3);
  out.v_psi = l + bend * v_V;
  out.v_M = b * l * C2 - z * C2 * slip;
  out.v_Q = v_V / mu;
  out.v_p = 0.5 * kappa * ll + b * ll * l * (r0 * C4 + r1 * l * C5) - M_p * slip;
  out.psi_psi = 1 + bend * psi_V;
  out.psi_M = b * C1;
  out.psi_Q = psi_V / mu;
  out.psi_p = kappa * l + b * ll * (r0 * C3 + r1 * l * C4);
  out.M_psi = bend * l * C1;
  out.M_M = 1 + z * C2;
  out.M_Q = (l * C1) / mu;
  out.M_p = M_p;
}

/** N varies: the same by power series in s/l, term from term, with N as it is. */
function varying(out: Transfer): void {
  const EI = given[0]!, slip = given[1]!, l = given[2]!, N = given[3]!, n1 = given[4]!, n2 = given[5]!; // prettier-ignore
  const q0 = given[6]!, q1 = given[7]!, kappa = given[8]!; // prettier-ignore
  const a1 = n1 * l;
  const a2 = n2 * l * l;
  const b = l / EI;
  const per = 1 / (1 + N * slip);
  const terms = termsFor(((Math.abs(N) + Math.abs(a1) + Math.abs(a2)) * per * l * l) / EI);
  // w = v′, x the w before it, M and V = M′ of each column: ψ, M, Q at the start and the loads
  let w = per, x = 0, M = 0, V = N * per; // prettier-ignore
  let wM = 0, xM = 0, MM = 1, VM = 0; // prettier-ignore
  let wQ = -slip * per, xQ = 0, MQ = 0, VQ = per; // prettier-ignore
  let wp = 0, xp = 0, Mp = 0, Vp = 0; // prettier-ignore
  let v = 0, vM = 0, vQ = 0, vp = 0; // prettier-ignore
  let psi = 1, psiM = 0, psiQ = 0, psip = 0; // prettier-ignore
  let e = 0, eM = 1, eQ = 0, ep = 0; // prettier-ignore
  for (let k = 0; k < terms; k++) {
    const part = share[k]!;
    const lp = l * part;
    const bp = b * part;
    const B = bp * M;
    const BM = bp * MM;
    const BQ = bp * MQ;
    let Bp = bp * Mp;
    let Q = 0;
    if (k === 0) {
      Bp += kappa * l;
      Q = q0 * l;
    } else if (k === 1) Q = 0.5 * q1 * l * l;
    psi += B;
    psiM += BM;
    psiQ += BQ;
    psip += Bp;
    v += lp * w;
    vM += lp * wM;
    vQ += lp * wQ;
    vp += lp * wp;
    M = lp * V;
    MM = lp * VM;
    MQ = lp * VQ;
    Mp = lp * Vp;
    e += M;
    eM += MM;
    eQ += MQ;
    ep += Mp;
    V = per * (N * B + a1 * w + a2 * x);
    VM = per * (N * BM + a1 * wM + a2 * xM);
    VQ = per * (N * BQ + a1 * wQ + a2 * xQ);
    Vp = per * (Q + N * Bp + a1 * wp + a2 * xp);
    x = w;
    xM = wM;
    xQ = wQ;
    xp = wp;
    w = B - V * slip;
    wM = BM - VM * slip;
    wQ = BQ - VQ * slip;
    wp = Bp - Vp * slip;
  }
  out.v_psi = v;
  out.v_M = vM;
  out.v_Q = vQ;
  out.v_p = vp;
  out.psi_psi = psi;
  out.psi_M = psiM;
  out.psi_Q = psiQ;
  out.psi_p = psip;
  out.M_psi = e;
  out.M_M = eM;
  out.M_Q = eQ;
  out.M_p = ep;
}

/** Terms after which z^(k/2)/k! is below 1e-18. */
function termsFor(z: number): number {
  return z < 0.04 ? 12 : z < 0.13 ? 14 : z < 0.34 ? 16 : z < 0.73 ? 18 : z < 3.6 ? 24 : 30;
}
