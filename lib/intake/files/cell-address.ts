/** A1 address of a cell. @param row 1-based @param column 0-based, from A */
export function cellAddress(row: number, column: number): string {
  return `${columnLetters(column)}${row}`;
}

/** Letters of a column, 0 = A, 25 = Z, 26 = AA. */
export function columnLetters(column: number): string {
  if (!Number.isInteger(column) || column < 0) throw new RangeError(`Expected column to be a whole number from 0, got ${column}`);
  let letters = '';
  for (let rest = column + 1; rest > 0; rest = Math.floor((rest - 1) / 26)) {
    letters = String.fromCharCode(65 + ((rest - 1) % 26)) + letters;
  }
  return letters;
}

/** Row (1-based) and column (0-based) of an A1 address, `$` allowed; null if it is none. */
export function cellPosition(address: string): { row: number; column: number } | null {
  const match = /^\$?([A-Z]{1,3})\$?(\d{1,7})$/i.exec(address);
  if (!match) return null;
  const column = [...(match[1] ?? '').toUpperCase()].reduce((sum, c) => sum * 26 + c.charCodeAt(0) - 64, 0) - 1;
  return { row: Number(match[2]), column };
}
