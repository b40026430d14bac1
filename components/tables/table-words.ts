import { checkQuantity } from '@/lib/tables/column-quantity';
import { unitLabel } from '@/lib/units/batch-unit';
import type { Quantity, System } from '@/lib/units/quantity';
import { decimalsIn } from '@/lib/units/decimals';
import { formatQuantity } from '@/lib/units/format';
import type { Cell, Column, ColumnQuantity, Filter, Row, TableName, View } from '@/lib/tables/view';

export const tableNouns: Readonly<Record<TableName, string>> = {
  frames: 'Frames',
  members: 'Members',
  checks: 'Checks',
  reactions: 'Reactions',
  movements: 'Movements',
  problems: 'Problems',
};

/** The columns a view shows, in its order; where it chooses none, those shown by default. */
export function shownColumns(columns: readonly Column[], view: View): readonly Column[] {
  const byKey = new Map(columns.map((column) => [column.key, column]));
  if (!view.columns) return columns.filter((column) => column.shown !== false);
  const chosen = view.columns.flatMap((key) => byKey.get(key) ?? []);
  return chosen.length > 0 ? chosen : columns.filter((column) => column.shown !== false);
}

/** Quantity of a cell: the column's, or that of the row's check. */
export function quantityOf(column: Column, row: Row | null): Quantity {
  const quantity: ColumnQuantity = column.quantity ?? 'number';
  if (quantity !== 'byCheck') return quantity;
  const told = row === null ? null : checkQuantity(row);
  if (told !== null) return told;
  const check = String(row?.cells.check ?? '');
  if (['deflection', 'sway', 'displacement', 'spread'].includes(check)) return 'displacement';
  return ['stability', 'critical load factor'].includes(check) ? 'number' : 'stress';
}

/** The unit under a column's head; '' where numbers are plain or each row has its own. */
export function headUnit(column: Column, units: System): string {
  if (column.kind !== 'number' || column.quantity === 'byCheck' || column.quantity === undefined) return '';
  return unitLabel(column.quantity, units);
}

/** A number cell's text in the units of the page. */
export function numberText(value: Cell, column: Column, row: Row | null, units: System): string {
  if (typeof value !== 'number') return value ?? '';
  const quantity = quantityOf(column, row);
  // a plain number among stresses and movements is a factor or a share, for which one decimal says too little
  const decimals = column.quantity === 'byCheck' && quantity === 'number' ? 2 : decimalsIn(units, quantity, column.decimals ?? 2);
  const text = formatQuantity(value, quantity, units, { decimals });
  // whole numbers run to a batch's mass, which nobody reads without its thousands apart
  return decimals === 0 ? text.replace(/\B(?=(\d{3})+$)/g, ',') : text;
}

/** An SI number of a filter as a person writes it, and without noise from the conversion. */
export function filterNumber(value: number, column: Column, units: System): string {
  const quantity = quantityOf(column, null);
  const text = formatQuantity(value, quantity, units, { significant: 6 })
    .replace(/(\.\d*?)0+$/, '$1')
    .replace(/\.$/, '');
  return column.kind === 'ratio' ? (Number.isInteger(value * 100) ? value.toFixed(2) : text) : text;
}

/** A column's name within a sentence: symbols keep their case. */
export const spoken = (column: Column): string =>
  column.label.length > 2 && /^[A-Z][a-z ]/.test(column.label)
    ? column.label[0]!.toLowerCase() + column.label.slice(1)
    : column.label;

function filterWords(filter: Filter, column: Column | undefined, units: System): string {
  const name = column ? spoken(column) : filter.column.replace(/^p:/, '');
  if (filter.op === 'in') return `${name} is ${list(filter.values)}`;
  if (filter.op === 'contains') return `${name} contains ${filter.text}`;
  const told = (value: number) => {
    if (!column) return String(value);
    const unit = headUnit(column, units);
    return filterNumber(value, column, units) + (unit ? ` ${unit}` : '');
  };
  if (filter.min !== null && filter.max !== null) return `${name} is between ${told(filter.min)} and ${told(filter.max)}`;
  if (filter.min !== null) return `${name} is at least ${told(filter.min)}`;
  return filter.max !== null ? `${name} is at most ${told(filter.max)}` : `${name} is any number`;
}

const list = (values: readonly string[]): string =>
  values.length < 2 ? (values[0] ?? '') : `${values.slice(0, -1).join(', ')} or ${values[values.length - 1]}`;

/**
 * The view in words: "Members where role is rafter and ratio is at least 0.80, sorted by sheet order". It is the
 * accessible name of the table and the text of the link that reproduces it.
 */
export function sentenceOf(view: View, columns: readonly Column[], units: System): string {
  const find = (key: string) => columns.find((column) => column.key === key);
  const filters = view.filters.map((filter) => filterWords(filter, find(filter.column), units));
  const where = filters.length > 0 ? ` where ${filters.join(' and ')}` : '';
  return `${tableNouns[view.table]}${where}, sorted by ${sortWords(view, columns)}`;
}

/** "sheet order", "ratio, highest first". */
export function sortWords(view: View, columns: readonly Column[]): string {
  if (!view.sort) return 'sheet order';
  const { column: key, descending } = view.sort;
  const column = columns.find((one) => one.key === key);
  const name = column ? spoken(column) : key.replace(/^p:/, '');
  const number = column?.kind === 'number' || column?.kind === 'ratio';
  return `${name}, ${number ? (descending ? 'highest first' : 'lowest first') : descending ? 'Z to A' : 'A to Z'}`;
}
