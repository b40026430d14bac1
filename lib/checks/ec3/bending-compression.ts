/**
 * N_Ed/(χ N_Rk/γM1) + k M_Ed/(χ_LT M_Rk/γM1) ≤ 1 with one moment: (6.61) with χ_y and k_yy (k_yz), (6.62) with χ_z and k_zy (k_zz)
 * of EN 1993-1-1 6.3.3(4). χ_LT = 1 about the minor axis and for members not susceptible to torsional deformations.
 * @param axial N_Ed/N_b,Rd about the axis   @param bending M_Ed/M_b,Rd
 */
export const interaction = (axial: number, k: number, bending: number): number => axial + k * bending;
