import type { Quantity } from '@/lib/units/quantity';
import type { Column, Row } from './view';

/** What a column's numbers are in; null for text, and where it differs from row to row. */
export function columnQuantity(column: Column): Quantity | null {
  return column.quantity === undefined || column.quantity === 'byCheck' ? null : column.quantity;
}

const ofChecks = ['stress', 'displacement', 'number', 'force', 'moment'] as const;

/** What a row of checks has its value and limit in. */
export function checkQuantity(row: Row): Quantity | null {
  const { quantity } = row.cells;
  return ofChecks.find((each) => each === quantity) ?? null;
}
