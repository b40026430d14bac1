/** Result files on disk: a workbook, its sheets as CSV, the JSON. Also what streams them to a download. */
import { createWriteStream } from 'node:fs';
import { mkdir } from 'node:fs/promises';
import { join } from 'node:path';
import { Readable, type Writable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { reportSheets } from '@/lib/reports/workbook/report-sheets';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import { csvOf } from '@/lib/reports/workbook/write-csv';
import { writeXlsx } from '@/lib/reports/workbook/write-xlsx';
import { resultsJson } from '@/lib/results/json';

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

/** One file a sheet of the workbook, named like the sheet. */
export async function writeCsvFolder(source: ReportSource, folder: string): Promise<void> {
  await mkdir(folder, { recursive: true });
  for (const sheet of await reportSheets(source))
    await pipeline(Readable.from(csvOf(sheet)), createWriteStream(join(folder, `${sheet.name}.csv`)));
}
