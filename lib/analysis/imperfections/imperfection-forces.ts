import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import { strengthScale } from '../plan-states';
import { columnsOf } from './columns';
import { gravityByNode } from './gravity-by-node';
import { notionalLoads } from './notional-loads';
import { swayForces } from './sway-imperfection';

/**
 * Forces that stand for a combination's imperfections towards +X, Fx, Fy by node, N, as they act at `loadScale` times its loads.
 * @param endForces of its first-order analysis, 6 a member   @param factors by case
 */
export type ImperfectionForces = (endForces: Float64Array, factors: Float64Array, loadScale: number) => Float64Array;

/** How the settings' imperfections are worked out for one frame; null where they are none (or nothing stands). */
export function imperfectionForces(frame: Frame, settings: Settings): ImperfectionForces | null {
  if (settings.imperfections === 'none') return null;
  const columns = columnsOf(frame);
  if (columns.length === 0) return null;
  if (settings.imperfections === 'EN 1993-1-1')
    return (endForces, _, loadScale) => {
      const forces = swayForces(frame, columns, endForces);
      if (loadScale !== 1) for (let i = 0; i < forces.length; i++) forces[i] = loadScale * forces[i]!;
      return forces;
    };
  const gravity = gravityByNode(frame);
  // 1.6 in α is what the loads of an ASD combination are raised by: not raised again
  const alpha = strengthScale(settings);
  return (_, factors) => notionalLoads(frame, gravity, factors, alpha);
}
