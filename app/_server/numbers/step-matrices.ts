import type { NumberTable } from '@/components/numbers/numbers-data';
import { inUnits, unitText, type NumberUnits } from './number-units';

/** Directions of both ends in order: powers of length in a force (moment 1) and in a movement (rotation 0). */
export const sixth = [0, 1, 2, 3, 4, 5] as const;
const turns = (i: number): boolean => i % 3 === 2;
const forceLengths = (i: number): 0 | 1 => (turns(i) ? 1 : 0);
const moveLengths = (i: number): 0 | 1 => (turns(i) ? 0 : 1);

export const forceUnit = (i: number, units: NumberUnits): string => unitText(units, 1, forceLengths(i));
export const moveUnit = (i: number, units: NumberUnits): string => (turns(i) ? 'rad' : units.length);
export const asForce = (value: number, i: number, units: NumberUnits): number => inUnits(value, units, 1, forceLengths(i));
export const asMove = (value: number, i: number, units: NumberUnits): number => inUnits(value, units, 0, moveLengths(i));

interface Labels {
  readonly id: string;
  readonly title: string;
  readonly corner: string;
  readonly rows: readonly string[];
  readonly columns: readonly string[];
}

/** A 6 × 6 stiffness: a row a force, a column a movement, so that its entries are in the row's unit a unit of the column. */
export function stiffnessTable(matrix: readonly number[], labels: Labels, units: NumberUnits): NumberTable {
  return {
    id: labels.id,
    title: labels.title,
    corner: labels.corner,
    columns: sixth.map((j) => ({ label: labels.columns[j]!, unit: moveUnit(j, units) })),
    rows: sixth.map((i) => ({
      label: labels.rows[i]!,
      unit: forceUnit(i, units),
      cells: sixth.map((j) => inUnits(matrix[6 * i + j]!, units, 1, forceLengths(i) - moveLengths(j))),
    })),
  };
}

/** T: a row a local direction, a column a direction of a node. */
export function turnTable(matrix: readonly number[], labels: Labels): NumberTable {
  return {
    id: labels.id,
    title: labels.title,
    corner: labels.corner,
    columns: sixth.map((j) => ({ label: labels.columns[j]! })),
    rows: sixth.map((i) => ({ label: labels.rows[i]!, cells: sixth.map((j) => matrix[6 * i + j]!) })),
  };
}
