/**
 * Elastic torsional buckling stress of a doubly symmetric shape that twists about its shear centre,
 * F_e = (π² E C_w/L_cz² + G J)/(I_x + I_y) (AISC 360-22 E4(a), (E4-2)), Pa.
 */
export function torsionalBucklingStress(
  of: {
    readonly E: number;
    readonly G: number;
    readonly J: number;
    readonly Cw: number;
    readonly Ix: number;
    readonly Iy: number;
  },
  Lcz: number,
): number {
  return ((Math.PI ** 2 * of.E * of.Cw) / (Lcz * Lcz) + of.G * of.J) / (of.Ix + of.Iy);
}
