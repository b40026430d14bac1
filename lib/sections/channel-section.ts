import type { SectionProperties } from '@/lib/model/frame';
import { filletArea, filletCentroid, filletInertia } from './fillet';

/**
 * Properties of a channel with parallel flanges from its dimensions in m: web h × tw, flanges b × tf (b over the web),
 * two root fillets r. Exact for that outline but for torsion (junction term of El Darwish and Johnston for an L joint)
 * and warping (thin-wall theory). W minor is the smaller, at the toes; shear as for an I section.
 */
export function propertiesOfChannel(h: number, b: number, tw: number, tf: number, r: number): SectionProperties {
  const hw = h - 2 * tf;
  const a = filletArea(r);
  const c = filletCentroid(r);
  const own = filletInertia(r);
  const arm = h / 2 - tf - c;
  const A = h * tw + 2 * (b - tw) * tf + 2 * a;
  const I = (b * h ** 3 - (b - tw) * hw ** 3) / 12 + 2 * (own + a * arm ** 2);
  const ys = ((h * tw ** 2) / 2 + tf * (b ** 2 - tw ** 2) + 2 * a * (tw + c)) / A;
  const aboutBack = (h * tw ** 3) / 3 + (2 * tf * (b ** 3 - tw ** 3)) / 3 + 2 * (own + a * (tw + c) ** 2);
  const Iminor = aboutBack - A * ys ** 2;
  const Wpl = b * tf * (h - tf) + (tw * hw ** 2) / 4 + 2 * a * arm;
  const ho = h - tf;
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
    Wminor_m3: Iminor / Math.max(ys, b - ys),
    WplMinor_m3: plasticMinor(h, b, tw, tf, r, A, ys),
    It_m4: torsionOfChannel(h, b, tw, tf, r),
    Iw_m6: (ho ** 2 / 4) * (Iminor - A * (ys - tw / 2) ** 2 * ((ho ** 2 * A) / (4 * I) - 1)),
    t_m: Math.max(tf, tw),
  };
}

/** Wpl about the minor axis: twice the first moment of one half about the line that halves the area, found by bisection. */
function plasticMinor(h: number, b: number, tw: number, tf: number, r: number, A: number, ys: number): number {
  let low = 0;
  let high = b;
  for (let i = 0; i < 200 && high - low > 1e-15 * b; i++) {
    const middle = (low + high) / 2;
    if (areaFromBack(middle, h, tw, tf, r) < A / 2) low = middle;
    else high = middle;
  }
  const x = (low + high) / 2;
  // Σ |distance| dA = moment of all about the back − 2 × moment of the back half, since the two areas are equal.
  return A * ys - 2 * momentFromBack(x, h, tw, tf, r);
}

/** Area between the back of the web and a line at x from it. */
function areaFromBack(x: number, h: number, tw: number, tf: number, r: number): number {
  if (x <= tw) return h * x;
  return h * tw + 2 * tf * (x - tw) + 2 * filletTo(Math.min(x - tw, r), r).area;
}

/** Its first moment about the back. */
function momentFromBack(x: number, h: number, tw: number, tf: number, r: number): number {
  if (x <= tw) return (h * x * x) / 2;
  const part = filletTo(Math.min(x - tw, r), r);
  return (h * tw * tw) / 2 + tf * (x * x - tw * tw) + 2 * (part.area * tw + part.moment);
}

/** Area of a fillet from the web face to s from it, and its first moment about the web face. */
function filletTo(s: number, r: number): { area: number; moment: number } {
  if (r <= 0) return { area: 0, moment: 0 };
  const u = r - s;
  const root = Math.sqrt(Math.max(0, r * r - u * u));
  const circle = (Math.PI * r * r) / 4 - (u * root + r * r * Math.asin(u / r)) / 2;
  return { area: r * s - circle, moment: (r * s * s) / 2 - (r * circle - root ** 3 / 3) };
}

function torsionOfChannel(h: number, b: number, tw: number, tf: number, r: number): number {
  const w = tw / tf;
  const s = r / tf;
  const alpha = Math.max(0, -0.0908 + 0.2621 * w + 0.1231 * s - 0.0752 * w * s - 0.0945 * w * w);
  const D = 2 * (3 * r + tw + tf - Math.sqrt(2 * (2 * r + tw) * (2 * r + tf)));
  return (2 * b * tf ** 3 + (h - 2 * tf) * tw ** 3) / 3 + 2 * alpha * D ** 4 - 0.42 * tf ** 4;
}
