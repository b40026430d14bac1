import { Readable } from 'node:stream';
import Papa from 'papaparse';
import { type CsvShape, csvShape, decodedText, type Source } from '@/lib/intake/files/csv-text';
import { DecimalMarks } from '@/lib/intake/files/decimal-marks';
import { detached } from '@/lib/intake/files/detached';
import { limits } from '@/lib/intake/files/limits';
import type { Meter } from '@/lib/intake/files/meter';
import type { RawCell, RawRow } from '@/lib/intake/files/raw-sheet';
import type { FileSheets } from '@/lib/intake/files/read-xlsx';
import type { Refusal } from '@/lib/intake/files/refusal';
import { tooLarge, unreadable } from '@/lib/intake/files/refusal';

const cachedTexts = 100_000;

/**
 * Reads one CSV file as a sheet. Row numbers count records, as a spreadsheet that opens the file does.
 * @throws Refusal
 */
export async function readCsv(name: string, source: Source, meter: Meter): Promise<FileSheets> {
  const shape = await csvShape(source);
  const rows: RawRow[] = [];
  const marks = new DecimalMarks();
  const known = new Map<string, RawCell>();
  let row = 0;

  const cellOf = (text: string): RawCell | null => {
    if (text.trim() === '') return null;
    const same = known.get(text);
    if (same) return same;
    if (text.length > limits.cellCharacters) {
      throw unreadable(`${name}, row ${row}: a cell holds more than 32,767 characters. Is a quotation mark left open?`, name);
    }
    meter.keep(80 + text.length);
    marks.see(text);
    const made: RawCell = { kind: 'text', text: detached(text) };
    if (text.length < 64) {
      if (known.size >= cachedTexts) known.clear();
      known.set(made.text, made);
    }
    return made;
  };
  const take = (record: readonly string[]): void => {
    row += 1;
    if (row === 1 && shape.hint) return;
    const cells: (RawCell | null)[] = [];
    record.forEach((text, column) => {
      const cell = cellOf(text);
      if (!cell) return;
      if (column >= limits.columns) {
        throw tooLarge(`${name} has more than ${limits.columns} columns. Remove those that are not needed.`, name);
      }
      while (cells.length < column) cells.push(null);
      cells[column] = cell;
    });
    if (cells.length === 0) return;
    if (row > limits.rows) throw tooLarge(`${name} has more than 1,000,000 rows. Split the frames over several batches.`, name);
    meter.keep(96 + 8 * cells.length);
    rows.push({ row, cells });
  };

  await eachRecord(name, source, shape, meter, take);
  // a comma that parts the cells cannot be the decimal mark as well
  return { decimalMark: shape.delimiter === ',' ? '.' : marks.most(), sheets: [{ name, rows }] };
}

/** Longest record: past it a quotation mark was left open, and looking for its end again and again would take for ever. */
const longestRecord = 2_000_000;

function eachRecord(
  name: string,
  source: Source,
  shape: CsvShape,
  meter: Meter,
  take: (record: readonly string[]) => void,
): Promise<void> {
  return new Promise((resolve, reject) => {
    let row = 0;
    let failed = false;
    const unfinished = { characters: 0 };
    const text = Readable.from(watched(name, decodedText(source, shape.encoding), meter, unfinished));
    const stop = (reason: unknown): void => {
      failed = true;
      text.destroy();
      reject(reason instanceof Error ? reason : unreadable(`${name} could not be read.`));
    };
    Papa.parse<string[]>(text, {
      delimiter: shape.delimiter,
      newline: '\n',
      chunk({ data, errors }, parser) {
        try {
          const quote = errors.find((e) => e.type === 'Quotes');
          if (quote) throw openQuote(name, row + (quote.row ?? 0) + 1);
          row += data.length;
          if (data.length > 0) unfinished.characters = 0;
          data.forEach(take);
        } catch (error) {
          stop(error);
          parser.abort(); // ends by calling complete
        }
      },
      complete: () => (failed ? undefined : resolve()),
      error: stop,
    });
  });
}

async function* watched(
  name: string,
  pieces: AsyncIterable<string>,
  meter: Meter,
  unfinished: { characters: number },
): AsyncGenerator<string> {
  for await (const piece of pieces) {
    meter.chunk(0);
    unfinished.characters += piece.length;
    if (unfinished.characters > longestRecord) {
      throw unreadable(`${name}: a row runs on for millions of characters. Is a quotation mark left open?`, name);
    }
    yield piece;
  }
}

const openQuote = (name: string, row: number): Refusal =>
  unreadable(
    `${name}, near row ${row}: a quotation mark is opened and not closed, or stands within a quoted cell without being doubled. Mend that row.`,
    name,
  );
