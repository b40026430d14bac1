import { formatNumber } from '@/lib/units/format';
import { powerText } from '@/lib/units/power-text';
import type { NumberCell, NumberTable } from './numbers-data';

/**
 * Decimals for numbers of one kind: six figures of the largest, and four of the smallest that is no rounding of it, so that
 * decimal points stand under one another and nothing that matters reads 0.
 */
export function decimalsFor(values: readonly number[]): number {
  const sizes = values.map(Math.abs).filter((size) => size > 0 && Number.isFinite(size));
  if (sizes.length === 0) return 0;
  const most = Math.max(...sizes);
  const counted = sizes.filter((size) => size > most * 1e-7);
  const least = Math.min(...counted);
  const wanted = Math.max(0, Math.min(Math.max(5 - power(most), 3 - power(least)), 12));
  // what was typed with fewer has no more: 1.35 is not 1.35000
  const needed = counted.reduce((sum, size) => Math.max(sum, placesOf(size)), 0);
  return Math.min(wanted, needed);
}

/** Decimals of a number to nine figures. */
function placesOf(size: number): number {
  const [digits = '', exponent = '0'] = size.toPrecision(9).split('e');
  const places = digits.includes('.') ? digits.replace(/0+$/, '').split('.')[1]!.length : 0;
  return Math.max(0, places - Number(exponent));
}

const power = (size: number): number => Math.floor(Math.log10(size));

/** How the numbers of each column of a table are shown. */
export function columnText({ columns, rows, mixed }: NumberTable): ((cell: NumberCell) => string)[] {
  const numbers = (column: number) => rows.flatMap(({ cells }) => (typeof cells[column] === 'number' ? [cells[column]] : []));
  const together = columns.flatMap((column, i) => (column.apart || column.power ? [] : numbers(i)));
  const decimals = decimalsFor(together);
  return columns.map((column, i) => {
    const own = column.apart ? decimalsFor(numbers(i)) : decimals;
    return (cell) => {
      if (cell === null) return '';
      if (typeof cell === 'string') return cell;
      if (cell === 0 || column.power) return powerText(cell);
      return formatNumber(cell, { decimals: mixed ? decimalsFor([Number(cell.toPrecision(6))]) : own });
    };
  });
}

/**
 * A table as tab-separated text that pastes into a spreadsheet: a heading row and a heading column with units, numbers with
 * every digit they have.
 */
export function tableText({ title, corner, columns, rows }: NumberTable): string {
  const headed = (label: string, unit: string | null | undefined) => (unit ? `${label} [${unit}]` : label);
  const lines = [
    [plain(`${title}: ${corner}`), ...columns.map(({ label, unit }) => plain(headed(label, unit)))],
    ...rows.map(({ label, unit, cells }) => [plain(headed(label, unit)), ...cells.map(copied)]),
  ];
  return lines.map((line) => line.join('\t')).join('\n');
}

/** Every digit; text that a spreadsheet would take for a formula is kept text. */
function copied(cell: NumberCell): string {
  return typeof cell === 'number' ? String(cell) : plain(cell ?? '');
}

function plain(text: string): string {
  const single = text.replace(/[\t\r\n]+/g, ' ');
  return /^[=+\-@]/.test(single) ? `'${single}` : single;
}
