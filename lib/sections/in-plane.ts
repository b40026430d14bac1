import type { Section } from '@/lib/model/frame';

/** The properties of a section for bending in the plane of the frame, SI; null = not known. */
export interface InPlane {
  readonly A_m2: number;
  /** Null where the section is turned and its I minor is not known: such a member cannot be analysed. */
  readonly I_m4: number | null;
  /** Elastic moduli of the top (local +y) and bottom face. */
  readonly Wtop_m3: number | null;
  readonly Wbottom_m3: number | null;
  /** Along local y: for a temperature gradient. */
  readonly depth_m: number | null;
  /** For the peak of elastic shear stress: a typed Av as given, else I·b/S. */
  readonly AvPeak_m2: number | null;
  /** For shear deformation: a typed Av as given, else by shape. */
  readonly AvShear_m2: number | null;
}

/**
 * In-plane properties of a section, turned 90° about its own axis or not. Turned: the minor-axis ones, with the smaller
 * W minor at both faces (a channel's toes may point either way) and the width as depth.
 */
export function inPlane(section: Section, turned: boolean): InPlane {
  const p = section.properties;
  if (!turned)
    return {
      A_m2: p.A_m2,
      I_m4: p.I_m4,
      Wtop_m3: p.Wtop_m3,
      Wbottom_m3: p.Wbottom_m3,
      depth_m: p.depth_m,
      AvPeak_m2: p.AvTyped_m2 ?? p.AvPeak_m2,
      AvShear_m2: p.AvTyped_m2 ?? p.AvShear_m2,
    };
  return {
    A_m2: p.A_m2,
    I_m4: p.Iminor_m4,
    Wtop_m3: p.Wminor_m3,
    Wbottom_m3: p.Wminor_m3,
    depth_m: p.width_m,
    AvPeak_m2: p.AvTyped_m2 ?? p.AvPeakTurned_m2,
    AvShear_m2: p.AvTyped_m2 ?? p.AvShearTurned_m2,
  };
}
