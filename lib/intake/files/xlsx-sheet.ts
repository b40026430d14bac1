import { limits } from '@/lib/intake/files/limits';
import { cellPosition } from '@/lib/intake/files/cell-address';
import { showDate } from '@/lib/intake/files/date-format';
import { fillMerged } from '@/lib/intake/files/merged-cells';
import type { Meter } from '@/lib/intake/files/meter';
import type { RawCell, RawRow } from '@/lib/intake/files/raw-sheet';
import { tooLarge, unreadable } from '@/lib/intake/files/refusal';
import { detached } from '@/lib/intake/files/detached';
import type { DecimalMarks } from '@/lib/intake/files/decimal-marks';
import { plainText } from '@/lib/intake/files/xlsx-parts';
import { parseXml } from '@/lib/intake/files/xml-stream';

/** What the sheets of one workbook share. */
export interface WorkbookValues {
  readonly strings: readonly string[];
  readonly dateStyles: readonly (string | null)[];
  readonly date1904: boolean;
  /** Cells made once for each shared string and for repeated numbers: most cells of a batch repeat. */
  readonly textCells: (RawCell | null | undefined)[];
  readonly numberCells: Map<number, RawCell>;
  readonly inlineCells: Map<string, RawCell>;
  readonly marks: DecimalMarks;
}

/** Cells kept to be used again; when full they are let go, since what repeats stands close together. */
const cached = 100_000;

/**
 * Reads one worksheet as it is unpacked: stored values of formulas, merged blocks filled, blank rows left out.
 * A cell or a row without its address stands after the one before it.
 */
export async function readWorksheet(
  name: string,
  chunks: AsyncIterable<Uint8Array>,
  values: WorkbookValues,
  meter: Meter,
): Promise<RawRow[]> {
  const rows: RawRow[] = [];
  const merges: string[] = [];
  let row = 0;
  let column = -1;
  let ordered = true;
  let cells: (RawCell | null)[] = [];
  let cell: { type: string; style: number; formula: string | null; value: string | null } | null = null;
  /** Where text now goes: a value, a formula, inline text, or nowhere. */
  let into: 'v' | 'f' | 't' | null = null;
  let hint = false;

  const put = (found: RawCell | null): void => {
    if (found === null) return;
    if (column >= limits.columns) {
      throw tooLarge(`Sheet ${name} has more than ${limits.columns} columns. Remove those that are not needed.`, name);
    }
    while (cells.length < column) cells.push(null);
    cells[column] = found;
  };
  const endRow = (): void => {
    if (cells.length === 0) return;
    if (row > limits.rows)
      throw tooLarge(`Sheet ${name} has more than 1,000,000 rows. Split the frames over several batches.`, name);
    meter.keep(96 + 8 * cells.length);
    ordered &&= row > (rows.at(-1)?.row ?? 0);
    rows.push({ row, cells });
    cells = [];
  };

  await parseXml(chunks, {
    open(tag, attributes) {
      switch (tag) {
        case 'c': {
          column = columnOf(attributes['r']) ?? column + 1;
          const style = attributes['s'];
          cell = { type: attributes['t'] ?? 'n', style: style === undefined ? 0 : Number(style), formula: null, value: null };
          break;
        }
        case 'v':
          into = 'v';
          if (cell) cell.value ??= '';
          break;
        case 't':
          if (cell && !hint) {
            into = 't';
            cell.value ??= '';
          }
          break;
        case 'f':
          into = 'f';
          if (cell) cell.formula = '';
          break;
        case 'row': {
          const r = Number(attributes['r']);
          row = Number.isInteger(r) && r > 0 ? r : row + 1;
          column = -1;
          break;
        }
        case 'rPh':
          hint = true;
          break;
        case 'mergeCell':
          merges.push(attributes['ref'] ?? '');
          meter.keep(64);
          break;
        default:
      }
    },
    text(piece) {
      if (!cell || into === null) return;
      if (into === 'f') cell.formula = (cell.formula + piece).slice(0, 300);
      else cell.value = cell.value === null || cell.value === '' ? piece : cell.value + piece;
      if (cell.value !== null && cell.value.length > 4 * limits.cellCharacters) {
        throw unreadable(`Sheet ${name}, row ${row}: a cell holds more than 32,767 characters.`, name);
      }
    },
    close(tag) {
      switch (tag) {
        case 'v':
        case 't':
        case 'f':
          into = null;
          break;
        case 'rPh':
          hint = false;
          break;
        case 'c':
          if (cell) put(cellOf(cell, values, meter, name));
          cell = null;
          break;
        case 'row':
          endRow();
          break;
        default:
      }
    },
  });
  if (!ordered) rows.sort((a, b) => a.row - b.row);
  return fillMerged(rows, merges, meter);
}

/** Column of an address, read without a pattern: this runs for every cell. */
function columnOf(address: string | undefined): number | null {
  if (address === undefined) return null;
  let column = 0;
  let i = 0;
  for (; i < address.length; i += 1) {
    const code = address.charCodeAt(i);
    if (code < 65 || code > 90) break;
    column = column * 26 + code - 64;
  }
  return i === 0 || i > 3 ? (cellPosition(address)?.column ?? null) : column - 1;
}

function cellOf(
  { type, style, formula, value }: { type: string; style: number; formula: string | null; value: string | null },
  values: WorkbookValues,
  meter: Meter,
  sheet: string,
): RawCell | null {
  if (type === 's' && value !== null && value !== '') return sharedText(Number(value), values, meter, sheet);
  if (value === null || value === '') {
    // a formula whose value is the empty text says so by its type; one that was never computed has none
    if (formula === null || (type === 'str' && value === '')) return null;
    meter.keep(64 + formula.length);
    return { kind: 'formula', text: `=${formula}` };
  }
  switch (type) {
    case 'str':
    case 'inlineStr':
      return inlineText(value, values, meter);
    case 'b':
      return value === '1' || value === 'true' ? yes : no;
    case 'e':
      return { kind: 'error', text: value.slice(0, 40) };
    case 'd':
      return { kind: 'date', text: value.slice(0, 40), iso: value.slice(0, 10) };
    default:
      return numberCell(value.trim(), values.dateStyles[style] ?? null, values, meter);
  }
}

const yes: RawCell = { kind: 'boolean', value: true, text: 'TRUE' };
const no: RawCell = { kind: 'boolean', value: false, text: 'FALSE' };

function sharedText(index: number, values: WorkbookValues, meter: Meter, sheet: string): RawCell | null {
  const known = values.textCells[index];
  if (known !== undefined) return known;
  const text = values.strings[index];
  if (text === undefined)
    throw unreadable(`Sheet ${sheet} names a text that the workbook does not hold. Save it again as .xlsx.`, sheet);
  const made = textCell(text, values, meter);
  values.textCells[index] = made;
  return made;
}

function inlineText(stored: string, values: WorkbookValues, meter: Meter): RawCell | null {
  const known = values.inlineCells.get(stored);
  if (known) return known;
  const made = textCell(plainText(stored), values, meter);
  if (made && stored.length < 64) {
    if (values.inlineCells.size >= cached) values.inlineCells.clear();
    values.inlineCells.set(detached(stored), made);
  }
  return made;
}

function textCell(text: string, values: WorkbookValues, meter: Meter): RawCell | null {
  if (text.trim() === '') return null;
  meter.keep(80 + text.length);
  values.marks.see(text);
  return { kind: 'text', text: detached(text) };
}

function numberCell(stored: string, code: string | null, values: WorkbookValues, meter: Meter): RawCell | null {
  const value = Number(stored);
  if (!Number.isFinite(value)) return textCell(stored, values, meter);
  const known = code === null ? values.numberCells.get(value) : undefined;
  if (known) return known;
  meter.keep(128);
  if (code !== null) {
    const shown = showDate(value, code, values.date1904);
    return shown ? { kind: 'date', ...shown } : { kind: 'number', value, text: String(value) };
  }
  const made: RawCell = { kind: 'number', value, text: String(value) };
  if (values.numberCells.size >= cached) values.numberCells.clear();
  values.numberCells.set(value, made);
  return made;
}
