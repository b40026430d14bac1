import { formatQuantity } from '@/lib/units/format';
import { unitLabel } from '@/lib/units/batch-unit';
import type { System } from '@/lib/units/quantity';
import type { DrawingData } from './drawing-data';

export interface DimensionChain {
  readonly direction: 'x' | 'y';
  /** World coordinates, ascending. */
  readonly stops: readonly number[];
  readonly texts: readonly string[];
}

/** A length as a dimension says it: up to three decimals, no idle zeros. */
export function lengthText(si: number, units: System, unit = true): string {
  const text = formatQuantity(si, 'length', units, { decimals: units === 'us' ? 2 : 3 });
  const trimmed = text.includes('.') ? text.replace(/\.?0+$/, '') : text;
  return unit ? `${trimmed} ${unitLabel('length', units)}` : trimmed;
}

const near = 1e-3;
const distinct = (values: readonly number[]): number[] => {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted.filter((value, i) => i === 0 || value - (sorted[i - 1] ?? 0) > near);
};

/** Leaves out inner stops so near to the one before, or to the end, that their figures would run together. */
function apart(stops: readonly number[]): number[] {
  const last = stops[stops.length - 1] ?? 0;
  const least = (last - (stops[0] ?? 0)) * 0.07;
  const kept: number[] = [];
  for (const stop of stops) {
    const before = kept[kept.length - 1];
    if (before === undefined || stop === last || (stop - before >= least && last - stop >= least)) kept.push(stop);
  }
  return kept;
}

/**
 * Dimensions of a frame: bays between supports and the ends along the foot, levels of nodes up the side. More than
 * seven bays or five levels are given as a whole, since the tables hold every coordinate.
 */
export function dimensionChains(data: DrawingData): DimensionChain[] {
  const xs = data.nodes.map((node) => node.x);
  const ys = data.nodes.map((node) => node.y);
  if (xs.length === 0) return [];
  const ends = (values: readonly number[]) => [Math.min(...values), Math.max(...values)];
  const feet = data.supports.flatMap((support) => data.nodes[support.node]?.x ?? []);
  // a bracket hangs on one line of support, so its own nodes are dimensioned instead
  const bays = apart(distinct(distinct(feet).length > 1 ? [...feet, ...ends(xs)] : xs));
  const levels = apart(distinct(ys));
  const chain = (direction: 'x' | 'y', wanted: readonly number[], most: number): DimensionChain[] => {
    const stops = wanted.length > most ? [wanted[0]!, wanted[wanted.length - 1]!] : wanted;
    if (stops.length < 2) return [];
    return [{ direction, stops, texts: stops.slice(1).map((stop, i) => lengthText(stop - (stops[i] ?? 0), data.units)) }];
  };
  return [...chain('x', bays, 8), ...chain('y', levels, 6)];
}
