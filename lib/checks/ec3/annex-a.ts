/** What Table A.1 puts in, with bending about one axis only. Forces N, slendernesses, moduli m³. */
export interface AnnexAInput {
  readonly plastic: boolean;
  readonly N: number;
  readonly NcrY: number;
  readonly NcrZ: number;
  readonly chiY: number;
  readonly chiZ: number;
  readonly lambdaY: number;
  readonly lambdaZ: number;
  /** N_Ed/(N_Rk/γM1). */
  readonly npl: number;
  readonly WelY: number;
  readonly WplY: number;
  readonly WelZ: number;
  readonly WplZ: number;
}

/** Lateral-torsional part of Table A.1: a_LT = 1 − I_t/I_y ≥ 0, N_cr,T, λ̄0 (uniform moment), C1, ε_y. */
export interface AnnexATorsion {
  readonly aLT: number;
  readonly NcrT: number;
  readonly lambda0: number;
  readonly C1: number;
  readonly epsilonY: number;
}

export interface FactorsA {
  readonly muY: number;
  readonly muZ: number;
  readonly Cm: number;
  readonly CmLT: number;
  /** C_yy and C_zy, or C_yz and C_zz where bent about the minor axis; 1 in class 3. */
  readonly C61: number;
  readonly C62: number;
  /** k_yy and k_zy, or k_yz and k_zz. */
  readonly k61: number;
  readonly k62: number;
}

/** w = W_pl/W_el ≤ 1.5. */
const shapeFactor = (Wpl: number, Wel: number): number => Math.min(1.5, Wpl / Wel);

/** μ_i = (1 − N/N_cr,i)/(1 − χ_i N/N_cr,i). */
const mu = (N: number, Ncr: number, chi: number): number => (1 - N / Ncr) / (1 - (chi * N) / Ncr);

/**
 * C_my and C_mLT of Table A.1. λ̄0 ≤ 0.2 √C1 ⁴√((1 − N/N_cr,z)(1 − N/N_cr,TF)): C_my,0 and 1; else
 * C_my = C_my,0 + (1 − C_my,0) √ε_y a_LT/(1 + √ε_y a_LT), C_mLT = C_my² a_LT/√((1 − N/N_cr,z)(1 − N/N_cr,T)) ≥ 1.
 * N_cr,TF = N_cr,T: doubly symmetric.
 */
function withTorsion(Cm0: number, N: number, NcrZ: number, of: AnnexATorsion | null): { Cm: number; CmLT: number } {
  if (of === null) return { Cm: Cm0, CmLT: 1 };
  const left = (1 - N / NcrZ) * (1 - N / of.NcrT);
  if (of.lambda0 <= 0.2 * Math.sqrt(of.C1) * Math.pow(left, 0.25)) return { Cm: Cm0, CmLT: 1 };
  const weight = Math.sqrt(of.epsilonY) * of.aLT;
  const Cm = Cm0 + ((1 - Cm0) * weight) / (1 + weight);
  return { Cm, CmLT: Math.max(1, (Cm * Cm * of.aLT) / Math.sqrt(left)) };
}

/**
 * k_yy and k_zy of EN 1993-1-1 Table A.1, bending about the major axis alone (b_LT and d_LT, which need both moments, are nil).
 * Null where N is not below a critical force: no interaction then holds.
 * @param torsion null = not susceptible to torsional deformations
 */
export function majorFactorsA(of: AnnexAInput, Cm0: number, torsion: AnnexATorsion | null): FactorsA | null {
  const { N, NcrY, NcrZ } = of;
  if (N >= NcrY || N >= NcrZ || (torsion !== null && N >= torsion.NcrT)) return null;
  const [muY, muZ] = [mu(N, NcrY, of.chiY), mu(N, NcrZ, of.chiZ)];
  const { Cm, CmLT } = withTorsion(Cm0, N, NcrZ, torsion);
  const k = (Cm * CmLT) / (1 - N / NcrY);
  if (!of.plastic) return { muY, muZ, Cm, CmLT, C61: 1, C62: 1, k61: k * muY, k62: k * muZ };
  const [wy, wz] = [shapeFactor(of.WplY, of.WelY), shapeFactor(of.WplZ, of.WelZ)];
  const { yy, zy } = { yy: sameAxis(wy, Cm, of, of.WelY / of.WplY), zy: otherAxis(wy, wz, Cm, of, of.WelY / of.WplY) };
  return { muY, muZ, Cm, CmLT, C61: yy, C62: zy, k61: (k * muY) / yy, k62: ((k * muZ) / zy) * 0.6 * Math.sqrt(wy / wz) };
}

/** k_yz and k_zz of Table A.1, bending about the minor axis alone (c_LT and e_LT, which need M_y, are nil). Null as above. */
export function minorFactorsA(of: AnnexAInput, Cm0: number): FactorsA | null {
  const { N, NcrY, NcrZ } = of;
  if (N >= NcrY || N >= NcrZ) return null;
  const [muY, muZ] = [mu(N, NcrY, of.chiY), mu(N, NcrZ, of.chiZ)];
  const k = Cm0 / (1 - N / NcrZ);
  if (!of.plastic) return { muY, muZ, Cm: Cm0, CmLT: 1, C61: 1, C62: 1, k61: k * muY, k62: k * muZ };
  const [wy, wz] = [shapeFactor(of.WplY, of.WelY), shapeFactor(of.WplZ, of.WelZ)];
  const yz = otherAxis(wz, wy, Cm0, of, of.WelZ / of.WplZ);
  const zz = sameAxis(wz, Cm0, of, of.WelZ / of.WplZ);
  return { muY, muZ, Cm: Cm0, CmLT: 1, C61: yz, C62: zz, k61: ((k * muY) / yz) * 0.6 * Math.sqrt(wz / wy), k62: (k * muZ) / zz };
}

/** C_yy, C_zz = 1 + (w − 1)(2 − 1.6 C_m² λ̄max/w − 1.6 C_m² λ̄max²/w) n_pl ≥ W_el/W_pl. */
function sameAxis(w: number, Cm: number, of: AnnexAInput, least: number): number {
  const top = Math.max(of.lambdaY, of.lambdaZ);
  return Math.max(least, 1 + (w - 1) * (2 - ((1.6 * Cm * Cm) / w) * (top + top * top)) * of.npl);
}

/** C_zy, C_yz = 1 + (w − 1)(2 − 14 C_m² λ̄max²/w⁵) n_pl ≥ 0.6 √(w/w of the other axis) W_el/W_pl, w of the axis bent about. */
function otherAxis(w: number, other: number, Cm: number, of: AnnexAInput, least: number): number {
  const top = Math.max(of.lambdaY, of.lambdaZ);
  return Math.max(0.6 * Math.sqrt(w / other) * least, 1 + (w - 1) * (2 - (14 * Cm * Cm * top * top) / w ** 5) * of.npl);
}
