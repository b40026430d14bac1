import type { DrawingMethod } from './drawing-data';

/** First order, without imperfections: what a drawing says nothing of. */
export const plainMethod: DrawingMethod = {
  order: 1,
  criticalLoadFactor: null,
  imperfection: null,
  shearDeformation: false,
  reducedStiffness: false,
  loadScale: 1,
  iterations: 1,
  change: 0,
};
