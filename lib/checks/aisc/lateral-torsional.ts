/** A compact I or channel bent about its major axis, SI. */
export interface OpenSection {
  readonly E: number;
  readonly Fy: number;
  readonly Zx: number;
  readonly Sx: number;
  readonly ry: number;
  /** (F2-7). */
  readonly rts: number;
  readonly ho: number;
  readonly J: number;
  /** 1 for doubly symmetric I (F2-8a); (h_o/2)√(I_y/C_w) for channels (F2-8b). */
  readonly c: number;
}

/** F_y Z: the plastic moment (AISC 360-22 (F2-1), (F7-1), (F8-1)), N·m. */
export function plasticMoment(Fy: number, Z: number): number {
  return Fy * Z;
}

/** Effective radius of gyration r_ts, r_ts² = √(I_y C_w)/S_x (F2-7), m. */
export function effectiveRadius(Iy: number, Cw: number, Sx: number): number {
  return Math.sqrt(Math.sqrt(Iy * Cw) / Sx);
}

/** c of a channel, (h_o/2)√(I_y/C_w) (F2-8b). */
export function channelFactor(ho: number, Iy: number, Cw: number): number {
  return (ho / 2) * Math.sqrt(Iy / Cw);
}

/**
 * L_p = 1.76 r_y √(E/F_y) (F2-5) and L_r = 1.95 r_ts (E/0.7F_y) √(X + √(X² + 6.76 (0.7F_y/E)²)), X = J c/(S_x h_o) (F2-6), m.
 */
export function limitingLengths(of: OpenSection): { readonly Lp: number; readonly Lr: number } {
  const X = (of.J * of.c) / (of.Sx * of.ho);
  const yieldPerE = (0.7 * of.Fy) / of.E;
  return {
    Lp: 1.76 * of.ry * Math.sqrt(of.E / of.Fy),
    Lr: ((1.95 * of.rts) / yieldPerE) * Math.sqrt(X + Math.sqrt(X * X + 6.76 * yieldPerE * yieldPerE)),
  };
}

/** F_cr = C_b π² E/(L_b/r_ts)² √(1 + 0.078 (J c/(S_x h_o)) (L_b/r_ts)²) (F2-4), Pa. */
export function criticalStress(of: OpenSection, Lb: number, Cb: number): number {
  const ratio = (Lb / of.rts) ** 2;
  return ((Cb * Math.PI ** 2 * of.E) / ratio) * Math.sqrt(1 + ((0.078 * of.J * of.c) / (of.Sx * of.ho)) * ratio);
}

/**
 * Nominal moment of F2, N·m: M_p (F2-1) up to L_p; a straight line down to 0.7 F_y S_x at L_r, times C_b (F2-2); F_cr S_x
 * beyond (F2-3); never above M_p.
 */
export function lateralTorsionalMoment(of: OpenSection, Lp: number, Lr: number, Lb: number, Cb: number): number {
  const Mp = plasticMoment(of.Fy, of.Zx);
  if (Lb <= Lp) return Mp;
  if (Lb <= Lr) return inelasticMoment(Mp, 0.7 * of.Fy * of.Sx, Lp, Lr, Lb, Cb);
  return Math.min(Mp, criticalStress(of, Lb, Cb) * of.Sx);
}

/** C_b [M_p − (M_p − M_r)(L_b − L_p)/(L_r − L_p)] ≤ M_p ((F2-2), (F7-10)); M_r = 0.7 F_y S_x. */
export function inelasticMoment(Mp: number, Mr: number, Lp: number, Lr: number, Lb: number, Cb: number): number {
  return Math.min(Mp, Cb * (Mp - ((Mp - Mr) * (Lb - Lp)) / (Lr - Lp)));
}
