import type { Section } from '@/lib/model/frame';

/** Width-to-thickness ratios of a section's plates about its own axes (AISC 360-22 B4.1). */
export interface Plates {
  readonly shape: 'I' | 'channel' | 'rhs' | 'chs';
  /** I: b_f/2t_f; channel: b_f/t_f; box: flat of the walls b across its depth; round: D/t. */
  readonly flange: number;
  /** I, channel: h/t_w; box: flat of the walls h along its depth; round: 0. */
  readonly web: number;
  /** Limits of built-up shapes hold: welded, or not said how made (they are never the larger). */
  readonly builtUp: boolean;
  /** k_c = 4/√(h/t_w), not below 0.35 nor above 0.76 (Table B4.1a note [a]). */
  readonly kc: number;
}

/** λ_p and λ_r of a plate in flexure. */
export interface Limits {
  readonly p: number;
  readonly r: number;
}

export type PlateClass = 'compact' | 'noncompact' | 'slender';

/**
 * The plates of a section, or null where the shape is none that is covered. h of a rolled web is clear of the fillets, of any
 * other clear between the flanges; the flat of a box's wall is its outside less three thicknesses, or less its own corners
 * where they are smaller (B4.1a(d), B4.1b(d)).
 */
export function platesOf(section: Section): Plates | null {
  const { shape, dimensions: d, made } = section;
  if (d === null) return null;
  if (shape === 'I' || shape === 'channel') {
    const { h, b, tw, tf } = d;
    if (h === null || b === null || tw === null || tf === null) return null;
    const builtUp = made !== 'rolled';
    const web = (h - 2 * tf - (builtUp ? 0 : 2 * (d.r ?? 0))) / tw;
    return { shape, flange: (shape === 'I' ? b / 2 : b) / tf, web, builtUp, kc: kc(web) };
  }
  if (shape === 'rhs' && d.h !== null && d.b !== null && d.t !== null) {
    const corners = Math.min(3 * d.t, 2 * (d.r ?? 1.5 * d.t));
    return { shape, flange: (d.b - corners) / d.t, web: (d.h - corners) / d.t, builtUp: false, kc: 0 };
  }
  if (shape === 'chs' && d.d !== null && d.t !== null) return { shape, flange: d.d / d.t, web: 0, builtUp: false, kc: 0 };
  return null;
}

/** k_c = 4/√(h/t_w) within 0.35 and 0.76 (Tables B4.1a and B4.1b, note [a]). */
export function kc(web: number): number {
  return Math.min(0.76, Math.max(0.35, 4 / Math.sqrt(web)));
}

/**
 * λ_r of members in axial compression (Table B4.1a): flanges 0.56√(E/Fy), built-up I 0.64√(k_c E/Fy) (cases 1, 2), webs
 * 1.49√(E/Fy) (case 5), walls of boxes 1.40√(E/Fy) (case 6), round 0.11 E/Fy (case 9).
 * @param EperFy E/F_y
 */
export function compressionLimits(plates: Plates, EperFy: number): { readonly flange: number; readonly web: number } {
  const root = Math.sqrt(EperFy);
  switch (plates.shape) {
    case 'I':
      return { flange: plates.builtUp ? 0.64 * Math.sqrt(plates.kc) * root : 0.56 * root, web: 1.49 * root };
    case 'channel':
      return { flange: 0.56 * root, web: 1.49 * root };
    case 'rhs':
      return { flange: 1.4 * root, web: 1.4 * root };
    case 'chs':
      return { flange: 0.11 * EperFy, web: Infinity };
  }
}

/**
 * λ_p and λ_r in flexure (Table B4.1b): flanges 0.38 and 1.0√(E/Fy), built-up I about its major axis 0.38√(E/Fy) and
 * 0.95√(k_c E/F_L), F_L = 0.7 F_y (cases 10, 11, 13); webs 3.76 and 5.70 (case 15; none about the minor axis); boxes 1.12 and
 * 1.40 (case 17), their webs 2.42 and 5.70 (case 19); round 0.07 and 0.31 E/Fy (case 20).
 */
export function flexureLimits(
  plates: Plates,
  EperFy: number,
  minor: boolean,
): { readonly flange: Limits; readonly web: Limits | null } {
  const root = Math.sqrt(EperFy);
  switch (plates.shape) {
    case 'I':
    case 'channel': {
      const r = plates.builtUp && !minor && plates.shape === 'I' ? 0.95 * Math.sqrt(plates.kc / 0.7) * root : root;
      return { flange: { p: 0.38 * root, r }, web: minor ? null : { p: 3.76 * root, r: 5.7 * root } };
    }
    case 'rhs':
      return { flange: { p: 1.12 * root, r: 1.4 * root }, web: { p: 2.42 * root, r: 5.7 * root } };
    case 'chs':
      return { flange: { p: 0.07 * EperFy, r: 0.31 * EperFy }, web: null };
  }
}

/** Compact up to λ_p, noncompact up to λ_r, slender beyond (B4.1). */
export function plateClass(lambda: number, limits: Limits): PlateClass {
  if (lambda <= limits.p) return 'compact';
  return lambda <= limits.r ? 'noncompact' : 'slender';
}
