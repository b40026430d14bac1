/** What Tables B.1 and B.2 put in: λ̄, N_Ed/(χ N_Rk/γM1) about both axes, class 3 (elastic) or 1, 2, a hollow section or an I. */
export interface AnnexBInput {
  readonly plastic: boolean;
  readonly hollow: boolean;
  readonly lambdaY: number;
  readonly lambdaZ: number;
  readonly nY: number;
  readonly nZ: number;
}

/** k_yy of Table B.1: C_my [1 + (λ̄y − 0.2) n_y] ≤ C_my (1 + 0.8 n_y); class 3: C_my (1 + 0.6 λ̄y n_y) ≤ C_my (1 + 0.6 n_y). */
export function kyyB({ plastic, lambdaY, nY }: AnnexBInput, Cmy: number): number {
  return plastic ? Cmy * Math.min(1 + (lambdaY - 0.2) * nY, 1 + 0.8 * nY) : Cmy * Math.min(1 + 0.6 * lambdaY * nY, 1 + 0.6 * nY);
}

/**
 * k_zz of Table B.1: I: C_mz [1 + (2λ̄z − 0.6) n_z] ≤ C_mz (1 + 1.4 n_z); hollow: C_mz [1 + (λ̄z − 0.2) n_z] ≤ C_mz (1 + 0.8 n_z);
 * class 3: C_mz (1 + 0.6 λ̄z n_z) ≤ C_mz (1 + 0.6 n_z).
 */
export function kzzB({ plastic, hollow, lambdaZ, nZ }: AnnexBInput, Cmz: number): number {
  if (!plastic) return Cmz * Math.min(1 + 0.6 * lambdaZ * nZ, 1 + 0.6 * nZ);
  return hollow
    ? Cmz * Math.min(1 + (lambdaZ - 0.2) * nZ, 1 + 0.8 * nZ)
    : Cmz * Math.min(1 + (2 * lambdaZ - 0.6) * nZ, 1 + 1.4 * nZ);
}

/** k_yz of Tables B.1 and B.2: 0.6 k_zz; class 3: k_zz. */
export const kyzB = (of: AnnexBInput, kzz: number): number => (of.plastic ? 0.6 : 1) * kzz;

/** k_zy of Table B.1, not susceptible to torsional deformations: 0.6 k_yy; class 3: 0.8 k_yy. */
export const kzyStiff = (of: AnnexBInput, kyy: number): number => (of.plastic ? 0.6 : 0.8) * kyy;

/**
 * k_zy of Table B.2, susceptible to torsional deformations: 1 − 0.1λ̄z n_z/(C_mLT − 0.25) ≥ 1 − 0.1 n_z/(C_mLT − 0.25), for
 * λ̄z < 0.4 0.6 + λ̄z ≤ 1 − 0.1λ̄z n_z/(C_mLT − 0.25); class 3: 0.05 in the place of 0.1 (and no case of λ̄z < 0.4).
 */
export function kzySoft({ plastic, lambdaZ, nZ }: AnnexBInput, CmLT: number): number {
  const part = ((plastic ? 0.1 : 0.05) * nZ) / (CmLT - 0.25);
  if (plastic && lambdaZ < 0.4) return Math.min(0.6 + lambdaZ, 1 - lambdaZ * part);
  return Math.max(1 - lambdaZ * part, 1 - part);
}
