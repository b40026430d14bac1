import type { Section, ShapeDimensions } from '@/lib/model/frame';
import type { CoveredShape } from './classification';
import { epsilonOf } from './width-limits';

/**
 * Shear area Av in the plane of the frame, m² (EN 1993-1-1 6.2.6(3)), η = 1.0:
 * - rolled I along the web A − 2b tf + (tw + 2r) tf, not below η hw tw; rolled channel A − 2b tf + (tw + r) tf;
 * - welded, or not said how made: η hw tw;
 * - turned, along the flanges: welded A − hw tw; the clause names no rolled ones, for which 2 b tf is taken;
 * - rectangular hollow A h/(b + h) along the depth, A b/(b + h) turned; circular 2A/π.
 */
export function shearArea(shape: CoveredShape, dims: ShapeDimensions, made: Section['made'], turned: boolean, A: number): number {
  const [h, b, tw, tf, r] = [dims.h ?? 0, dims.b ?? 0, dims.tw ?? 0, dims.tf ?? 0, dims.r ?? 0];
  if (shape === 'chs') return (2 * A) / Math.PI;
  if (shape === 'rhs') return (A * (turned ? b : h)) / (b + h);
  const web = (h - 2 * tf) * tw;
  if (turned) return made === 'welded' ? A - web : Math.min(2 * b * tf, A - web);
  if (made !== 'rolled') return web;
  if (shape === 'channel') return A - 2 * b * tf + (tw + r) * tf;
  return Math.max(web, A - 2 * b * tf + (tw + 2 * r) * tf);
}

/** V_pl,Rd = Av (fy/√3)/γM0, N (EN 1993-1-1 (6.18)). */
export const shearResistance = (Av: number, fy: number, gammaM0: number): number => (Av * fy) / Math.sqrt(3) / gammaM0;

/** A web that may buckle in shear: its hw/tw and the limit 72 ε/η (EN 1993-1-1 6.2.6(6), (6.22)), η = 1.0. Null = it does not. */
export function shearBuckling(
  shape: CoveredShape,
  dims: ShapeDimensions,
  turned: boolean,
  fy: number,
): { readonly slenderness: number; readonly limit: number } | null {
  const [h, b, tw, tf, t] = [dims.h ?? 0, dims.b ?? 0, dims.tw ?? 0, dims.tf ?? 0, dims.t ?? 0];
  if (shape === 'chs' || (shape !== 'rhs' && turned)) return null;
  const slenderness = shape === 'rhs' ? ((turned ? b : h) - 2 * t) / t : (h - 2 * tf) / tw;
  const limit = 72 * epsilonOf(fy);
  return slenderness > limit ? { slenderness, limit } : null;
}
