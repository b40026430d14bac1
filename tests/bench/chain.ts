/**
 * chain.1000.io: sheets to workbook for 1,000 portals, against reading the same file and writing the same rows bare;
 * chain.1000.code.io: the same with a design code and generated combinations (65 of EN 1990).
 */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { PassThrough, Readable } from 'node:stream';
import ExcelJS from 'exceljs';
import { interleaved, median, ratio } from './rounds';
import { portalWorkbook } from './portals';
import { storedChain } from './stored-chain';

type Rows = { name: string; rows: (readonly (string | number | null)[])[] }[];

async function readBare(bytes: Uint8Array): Promise<number> {
  const reader = new ExcelJS.stream.xlsx.WorkbookReader(Readable.from([bytes]), {
    worksheets: 'emit',
    sharedStrings: 'cache',
    styles: 'cache',
    hyperlinks: 'ignore',
    entries: 'ignore',
  });
  let cells = 0;
  for await (const page of reader) {
    for await (const row of page) cells += (row.values as unknown[]).length;
  }
  return cells;
}

/** @param times the rows over again, as often */
async function writeBare(sheets: Rows, times: number): Promise<void> {
  const sink = new PassThrough();
  sink.resume();
  const book = new ExcelJS.stream.xlsx.WorkbookWriter({ stream: sink, useStyles: false, useSharedStrings: false });
  for (const sheet of sheets) {
    const page = book.addWorksheet(sheet.name);
    let since = 0;
    for (let time = 0; time < times; time += 1)
      for (const row of sheet.rows) {
        page.addRow(row).commit();
        since += 1;
        if (since % 256 === 0) await new Promise((resolve) => setImmediate(resolve));
      }
    page.commit();
  }
  await book.commit();
}

export const chainAgainstBare = async (rounds: number): Promise<Record<string, number>> => ({
  'chain.1000.io': await wholeAgainstBare(rounds, false),
});

export const codeChainAgainstBare = async (rounds: number): Promise<Record<string, number>> => ({
  'chain.1000.code.io': await wholeAgainstBare(rounds, true),
});

async function wholeAgainstBare(rounds: number, code: boolean): Promise<number> {
  const bytes = await portalWorkbook(1000, code);
  const folder = mkdtempSync(join(tmpdir(), 'tallyframe-bench-'));
  try {
    // with so many combinations the rows of all would not fit in memory: those of a fifth are written five times
    const times = code ? 5 : 1;
    const rows = await storedChain(code ? await portalWorkbook(1000 / times, code) : bytes, folder, true);
    const [whole = [], bare = []] = await interleaved(
      [
        { name: 'chain', work: async () => void (await storedChain(bytes, folder, false)) },
        {
          name: 'bare',
          work: async () => {
            await readBare(bytes);
            await writeBare(rows ?? [], times);
          },
        },
      ],
      rounds,
      'cpu',
    );
    console.log(`  chain ${median(whole).toFixed(2)} s, bare ${median(bare).toFixed(2)} s CPU`);
    return ratio(whole, bare);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
