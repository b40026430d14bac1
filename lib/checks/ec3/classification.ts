import type { ShapeDimensions } from '@/lib/model/frame';
import { classWithin, epsilonOf, internalBent, internalPressed, outstandPressed, tube, type SectionClass } from './width-limits';

export type CoveredShape = 'I' | 'channel' | 'rhs' | 'chs';

/** The compressed plates of a section bent in the plane of the frame. */
export interface Plates {
  readonly A: number;
  /** Web between its fillets: c/t, all webs' c·t, c over the depth in the plane; null for a tube. */
  readonly web: { readonly slenderness: number; readonly area: number; readonly part: number } | null;
  /** Web in the axis of bending (an I turned): never bent, only pressed. */
  readonly webOnAxis: boolean;
  /** A turned channel's toes may point either way: its web may be its pressed face. */
  readonly webAsFlange: boolean;
  readonly flange: { readonly slenderness: number; readonly outstand: boolean } | null;
  /** d/t of a tube. */
  readonly wall: number | null;
}

/** What a section is classed as and why: the plate that decides, its c/t and its limit for class 3. */
export interface Classified {
  readonly class: SectionClass;
  readonly plate: 'web' | 'flange' | 'wall' | null;
  readonly slenderness: number;
  readonly limit: number;
}

const UNPRESSED: Classified = { class: 1, plate: null, slenderness: 0, limit: Infinity };

/** Plates of a section, c by EN 1993-1-1 Table 5.2: between fillets; of a hollow section outside − 3t at least. */
export function platesOf(shape: CoveredShape, dims: ShapeDimensions, turned: boolean, A: number): Plates {
  const [h, b, tw, tf, r, t, d] = [dims.h ?? 0, dims.b ?? 0, dims.tw ?? 0, dims.tf ?? 0, dims.r ?? 0, dims.t ?? 0, dims.d ?? 0];
  const none: Plates = { A, web: null, webOnAxis: false, webAsFlange: false, flange: null, wall: null };
  if (shape === 'chs') return { ...none, wall: d / t };
  if (shape === 'rhs') {
    const [depth, width] = turned ? [b, h] : [h, b];
    const corners = 2 * Math.min(r, 1.5 * t);
    const c = depth - corners;
    const web = { slenderness: c / t, area: 2 * c * t, part: c / depth };
    return { ...none, web, flange: { slenderness: (width - corners) / t, outstand: false } };
  }
  const c = h - 2 * tf - 2 * r;
  const outstand = shape === 'I' ? (b - tw) / 2 - r : b - tw - r;
  return {
    ...none,
    web: { slenderness: c / tw, area: c * tw, part: c / h },
    webOnAxis: shape === 'I' && turned,
    webAsFlange: shape === 'channel' && turned,
    flange: { slenderness: outstand / tf, outstand: true },
  };
}

/**
 * Class of a cross-section under N (tension positive) and M (EN 1993-1-1 5.5.2, Table 5.2).
 *
 * Where N presses more than M relieves (the whole section in compression) plates are taken as uniformly pressed. Else M is taken to
 * grow under N as it stands until the section is exhausted: α = 0.5 (1 + N/(Σ c t fy)); ψ of the web's edges with N/A as it stands
 * and the pressed face at fy. Flanges count as uniformly pressed (a flange bent in its own plane has higher limits).
 * @param Wel smaller elastic modulus   @param fy Pa; a lower stress where 5.5.2(9) eases ε, (fy/γM0)/σ_com,Ed being what eases
 */
export function classify(plates: Plates, fy: number, N: number, M: number, Wel: number, easing = 1): Classified {
  const pressed = N < 0;
  const bent = M !== 0;
  if (!pressed && !bent) return UNPRESSED;
  const epsilon = epsilonOf(fy) * Math.sqrt(Math.max(1, easing));
  let worst = UNPRESSED;
  const meet = (plate: 'web' | 'flange' | 'wall', slenderness: number, limits: readonly [number, number, number]): void => {
    const found = classWithin(slenderness, limits);
    if (found > worst.class || worst.plate === null) worst = { class: found, plate, slenderness, limit: limits[2] };
  };
  const { web, flange, wall } = plates;
  if (wall !== null) meet('wall', wall, tube(epsilon));
  if (flange) meet('flange', flange.slenderness, flange.outstand ? outstandPressed(epsilon) : internalPressed(epsilon));
  if (web) {
    const uniform = plates.webOnAxis ? pressed : plates.webAsFlange || (pressed && -N / plates.A >= Math.abs(M) / Wel);
    if (uniform) meet('web', web.slenderness, internalPressed(epsilon));
    else if (!plates.webOnAxis) {
      const alpha = Math.min(1, Math.max(0, 0.5 * (1 - N / (web.area * fy))));
      const mean = Math.min(1, -N / (plates.A * fy));
      const slope = (1 - mean) * web.part;
      // the whole web in tension is of class 1
      if (mean + slope > 0) meet('web', web.slenderness, internalBent(epsilon, alpha, (mean - slope) / (mean + slope)));
    }
  }
  return worst;
}

/** How far a section is surely of class 1 or 2: what spares classing every place of every state. */
export interface PlasticRange {
  /** Flanges and walls are, whatever presses them. */
  readonly always: boolean;
  /** The web is even when uniformly pressed. */
  readonly uniform: boolean;
  /** Compression up to which a web that is bent is, N. */
  readonly compression: number;
}

/** The range of `classify` in which its answer is class 1 or 2: 456ε/(13α − 1) turned round for N (Table 5.2). */
export function plasticRange(plates: Plates, fy: number): PlasticRange {
  const epsilon = epsilonOf(fy);
  const { web, flange, wall, webOnAxis } = plates;
  const flat = flange === null || flange.slenderness <= (flange.outstand ? outstandPressed : internalPressed)(epsilon)[1];
  const round = wall === null || wall <= tube(epsilon)[1];
  if (web === null) return { always: round, uniform: true, compression: Infinity };
  const uniform = web.slenderness <= internalPressed(epsilon)[1];
  const alpha = ((456 * epsilon) / web.slenderness + 1) / 13;
  // a shade less: places at the edge are classed one by one
  const most = (2 * alpha - 1) * web.area * fy * (1 - 1e-9);
  return {
    always: flat && (uniform || !plates.webAsFlange),
    uniform,
    compression: webOnAxis ? 0 : Math.max(0, alpha > 0.5 ? most : 0),
  };
}

/** Whether a place is surely of class 1 or 2 (N tension positive). */
export function surelyPlastic(range: PlasticRange, plates: Plates, N: number, M: number, Wel: number): boolean {
  if (!range.always) return false;
  if (range.uniform) return true;
  if (N >= 0) return range.compression > 0 || plates.webOnAxis;
  return -N <= range.compression && -N / plates.A < Math.abs(M) / Wel;
}
