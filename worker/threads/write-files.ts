/** Result files on disk: a workbook, its sheets as CSV, the JSON. Also what streams them to a download. */
import { createWriteStream } from 'node:fs';
import { mkdir } from 'node:fs/promises';
import { join } from 'node:path';
import { Readable, type Writable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { Zip, ZipDeflate } from 'fflate';
import { writeReport } from '@/lib/reports/pdf/write-report';
import type { ReportSheet } from '@/lib/reports/workbook/report-sheet';
import { reportSheets } from '@/lib/reports/workbook/report-sheets';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import { csvOf } from '@/lib/reports/workbook/write-csv';
import { writeXlsx } from '@/lib/reports/workbook/write-xlsx';
import { resultsJson } from '@/lib/results/json';
import { reportFonts } from './report-fonts';

// The workbook writer's zip library calls Buffer() in an old form; bundled, Node would warn of it at every workbook.
process.noDeprecation = true;

/** Entries of a zip carry no clock: the same results are the same bytes. */
const fixedTime = new Date(2020, 0, 1);

/** Writes the result workbook into a stream, at the stream's pace. */
export async function writeResultWorkbook(source: ReportSource, sink: Writable): Promise<void> {
  await writeXlsx(await reportSheets(source), sink);
}

export async function writeWorkbookFile(source: ReportSource, path: string): Promise<void> {
  const file = createWriteStream(path);
  const closed = new Promise<void>((resolve, reject) => file.on('close', resolve).on('error', reject));
  await Promise.race([writeResultWorkbook(source, file), closed]);
  file.end();
  await closed;
}

export async function writeJsonFile(source: ReportSource, path: string, options: { readonly all: boolean }): Promise<void> {
  await pipeline(Readable.from(resultsJson(source, options)), createWriteStream(path));
}

/** The calculation report of every frame as a draft, signed by nobody. */
export async function writeReportFile(source: ReportSource, path: string): Promise<void> {
  const nobody = { prepared: null, checked: null, approved: null, issued: null, supersedes: null, note: null };
  const cover = {
    ...nobody,
    number: null,
    office: '',
    project: '',
    projectNumber: null,
    batch: '',
    revision: '',
    acceptances: [],
    notIssued: [],
  };
  await writeReport({ source, cover, frames: 'all', fonts: reportFonts() }, createWriteStream(path));
}

/** A zip of one CSV file a sheet of the workbook, at the stream's pace. */
export async function writeResultCsvZip(source: ReportSource, sink: Writable): Promise<void> {
  const sheets = await reportSheets(source);
  await pipeline(Readable.from(zipped(sheets)), sink);
}

/** The pieces of a zip of the sheets, deflated one after the other. */
async function* zipped(sheets: readonly ReportSheet[]): AsyncGenerator<Uint8Array> {
  let ready: Uint8Array[] = [];
  const zip = new Zip((fault, piece) => {
    if (fault) throw fault;
    ready.push(piece);
  });
  for (const sheet of sheets) {
    const entry = new ZipDeflate(`${sheet.name}.csv`, { level: 6 });
    entry.mtime = fixedTime;
    zip.add(entry);
    for await (const text of csvOf(sheet)) {
      entry.push(Buffer.from(text));
      yield* ready;
      ready = [];
    }
    entry.push(new Uint8Array(0), true);
  }
  zip.end();
  yield* ready;
}

/** One file a sheet of the workbook, named like the sheet. */
export async function writeCsvFolder(source: ReportSource, folder: string): Promise<void> {
  await mkdir(folder, { recursive: true });
  for (const sheet of await reportSheets(source))
    await pipeline(Readable.from(csvOf(sheet)), createWriteStream(join(folder, `${sheet.name}.csv`)));
}
