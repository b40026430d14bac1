import type { SectionProperties } from '@/lib/model/frame';
import { filletArea, filletCentroid, filletInertia } from './fillet';

/**
 * Properties of a doubly symmetric I section from its dimensions in m: two flanges b × tf, a web tw, four root fillets r.
 *
 * A, I, W, Wpl are exact for that outline. Torsion constant with the junction term of El Darwish and Johnston
 * (It = ⅔ b tf³ + ⅓ (h − 2tf) tw³ + 2 α D⁴ − 0.42 tf⁴), warping constant Iw = Iminor (h − tf)² / 4.
 * Shear: peak I·tw/S along the depth, (2/3)·2·b·tf turned; for deformation h·tw, (5/6)·2·b·tf turned.
 */
export function propertiesOfI(h: number, b: number, tw: number, tf: number, r: number): SectionProperties {
  const hw = h - 2 * tf;
  const a = filletArea(r);
  const c = filletCentroid(r);
  const own = filletInertia(r);
  const armMajor = h / 2 - tf - c;
  const armMinor = tw / 2 + c;
  const A = 2 * b * tf + hw * tw + 4 * a;
  const I = (b * h ** 3 - (b - tw) * hw ** 3) / 12 + 4 * (own + a * armMajor ** 2);
  const Iminor = (2 * tf * b ** 3 + hw * tw ** 3) / 12 + 4 * (own + a * armMinor ** 2);
  const Wpl = b * tf * (h - tf) + (tw * hw ** 2) / 4 + 4 * a * armMajor;
  const WplMinor = (tf * b ** 2) / 2 + (hw * tw ** 2) / 4 + 4 * a * armMinor;
  return {
    A_m2: A,
    I_m4: I,
    Wtop_m3: (2 * I) / h,
    Wbottom_m3: (2 * I) / h,
    depth_m: h,
    width_m: b,
    AvTyped_m2: null,
    AvPeak_m2: (I * tw) / (Wpl / 2),
    AvPeakTurned_m2: (2 / 3) * 2 * b * tf,
    AvShear_m2: h * tw,
    AvShearTurned_m2: (5 / 6) * 2 * b * tf,
    Wpl_m3: Wpl,
    Iminor_m4: Iminor,
    Wminor_m3: (2 * Iminor) / b,
    WplMinor_m3: WplMinor,
    It_m4: torsionOfI(h, b, tw, tf, r),
    Iw_m6: (Iminor * (h - tf) ** 2) / 4,
    t_m: Math.max(tf, tw),
  };
}

function torsionOfI(h: number, b: number, tw: number, tf: number, r: number): number {
  const w = tw / tf;
  const s = r / tf;
  // A negative junction term (a web far thinner or thicker than its flange) is left out: the safe side is not lost.
  const alpha = Math.max(0, -0.042 + 0.2204 * w + 0.1355 * s - 0.0865 * s * w - 0.0725 * w * w);
  const D = ((tf + r) ** 2 + (r + tw / 4) * tw) / (2 * r + tf);
  return (2 * b * tf ** 3 + (h - 2 * tf) * tw ** 3) / 3 + 2 * alpha * D ** 4 - 0.42 * tf ** 4;
}
