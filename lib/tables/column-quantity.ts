import type { Quantity } from '@/lib/units/quantity';
import type { ParameterColumn } from './shown-columns';
import type { Column, Row } from './view';

/** How the Families sheet names quantities (sheets §3), as quantities of lib/units; text has none. */
const ofFamilies: Readonly<Record<string, Quantity>> = {
  length: 'length',
  angle: 'angle',
  force: 'force',
  moment: 'moment',
  'line load': 'lineLoad',
  'area load': 'areaLoad',
  'translation stiffness': 'springTranslation',
  'rotation stiffness': 'springRotation',
  temperature: 'temperature',
  number: 'number',
};

export function parameterQuantity(quantity: string): Quantity | null {
  return ofFamilies[quantity.toLowerCase()] ?? null;
}

/** What a column's numbers are in; null for text, and where it differs from row to row. */
export function columnQuantity(column: Column, parameters: readonly ParameterColumn[] = []): Quantity | null {
  if (column.key.startsWith('p:')) {
    const name = column.key.slice(2).toLowerCase();
    const found = parameters.find((one) => one.name.toLowerCase() === name);
    return found === undefined ? null : parameterQuantity(found.quantity);
  }
  return column.quantity === undefined || column.quantity === 'byCheck' ? null : column.quantity;
}

/** What a row of checks has its value and limit in. */
export function checkQuantity(row: Row): Quantity | null {
  const { quantity } = row.cells;
  return quantity === 'stress' || quantity === 'displacement' || quantity === 'number' ? quantity : null;
}
