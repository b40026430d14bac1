import type { InputFile } from '@/lib/intake/intake';
import { fileKind } from '@/lib/intake/files/file-kind';
import { identityOf } from '@/lib/intake/files/identity';
import { limits } from '@/lib/intake/files/limits';
import { Meter } from '@/lib/intake/files/meter';
import { baseName, byName, sheetKey, withoutExtension } from '@/lib/intake/files/names';
import type { FilesRead, RawPart, RawSheet, ReadOptions } from '@/lib/intake/files/raw-sheet';
import { readCsv } from '@/lib/intake/files/read-csv';
import { type FileSheets, readXlsx } from '@/lib/intake/files/read-xlsx';
import { Refusal, tooLarge, unreadable } from '@/lib/intake/files/refusal';
import { partsOf } from '@/lib/intake/files/xlsx-parts';
import { openZip, type ZipEntry } from '@/lib/intake/files/zip-file';
import type { Problem } from '@/lib/problems/problem';

interface FileOutcome {
  readonly file: string;
  readonly read: FileSheets;
}

/**
 * Reads uploaded files into sheets: XLSX, CSV, and zips of these (sheets §1). Bad files never throw: each is a problem that
 * says what it is and what to do, and stops the batch, since half an upload is another batch.
 * @throws RangeError without any file
 */
export async function readFiles(files: readonly InputFile[], options: ReadOptions = {}): Promise<FilesRead> {
  const identity = identityOf(files);
  const meter = new Meter(options.shouldStop ?? (() => false), options.stopsAfter ?? 'the time allowed');
  const problems: Problem[] = [];
  const outcomes: FileOutcome[] = [];
  const sent = files.reduce((sum, file) => sum + file.bytes.byteLength, 0);
  if (sent > limits.sentBytes) {
    const size = Math.ceil(sent / 1024 / 1024);
    const refusal = tooLarge(`${size} MB were sent; 25 MB is the most that is read. Split the frames over several batches.`);
    return { sheets: [], problems: [problemOf(refusal, files.length === 1 ? identity.name : null)], identity };
  }
  for (const file of [...files].sort((a, b) => byName(baseName(a.name), baseName(b.name)))) {
    try {
      await readFile(baseName(file.name), file.bytes, meter, outcomes, problems);
    } catch (error) {
      problems.push(problemOf(error, baseName(file.name)));
    }
  }
  return { sheets: joined(outcomes), problems, identity };
}

async function readFile(
  name: string,
  bytes: Uint8Array,
  meter: Meter,
  outcomes: FileOutcome[],
  problems: Problem[],
): Promise<void> {
  if (fileKind(name, bytes) === 'text') {
    meter.chunk(bytes.byteLength);
    outcomes.push({ file: name, read: await readCsv(withoutExtension(name), () => slices(bytes), meter) });
    return;
  }
  const entries = await openZip(bytes);
  const workbook = packageKind(name, entries);
  if (workbook) {
    outcomes.push({ file: name, read: await readXlsx(partsOf(entries), meter) });
    return;
  }
  await readZipOfFiles(name, entries, meter, outcomes, problems);
}

async function readZipOfFiles(
  zip: string,
  entries: readonly ZipEntry[],
  meter: Meter,
  outcomes: FileOutcome[],
  problems: Problem[],
): Promise<void> {
  const files = entries.filter((entry) => !/(^|\/)__MACOSX\/|(^|\/)(\.|~\$|thumbs\.db$|desktop\.ini$)[^/]*$/i.test(entry.name));
  let found = 0;
  for (const entry of files.sort((a, b) => byName(baseName(a.name), baseName(b.name)) || byName(a.name, b.name))) {
    const name = baseName(entry.name);
    try {
      if (/\.(csv|tsv|txt)$/i.test(name)) {
        outcomes.push({ file: name, read: await readCsv(withoutExtension(name), unpacked(entry, meter), meter) });
      } else if (/\.(xlsx|xlsm|xls)$/i.test(name)) {
        const bytes = await whole(entry, meter);
        if (fileKind(name, bytes) === 'text') throw unreadable(`${name} is not a workbook.`);
        const inner = await openZip(bytes);
        if (!packageKind(name, inner)) throw unreadable(`${name} is a zip in a zip. Put the files themselves into one zip.`);
        outcomes.push({ file: name, read: await readXlsx(partsOf(inner), meter) });
      } else {
        problems.push(leftOut(name, zip));
        continue;
      }
      found += 1;
    } catch (error) {
      found += 1;
      problems.push(problemOf(error, name));
    }
  }
  if (found === 0) throw unreadable(`${zip} holds no .xlsx and no .csv file. Put the sheets themselves into the zip.`);
}

/** True for a workbook, false for a plain zip. @throws Refusal for packages of other kinds */
function packageKind(name: string, entries: readonly ZipEntry[]): boolean {
  const paths = new Set(entries.map((entry) => entry.name.replace(/^\/+/, '').toLowerCase()));
  if (paths.has('encryptedpackage'))
    throw unreadable(`${name} is locked with a password. Save it without one and send it again.`);
  if (paths.has('xl/workbook.bin')) throw unreadable(`${name} is a binary workbook (.xlsb). Save it as .xlsx.`);
  if (paths.has('content.xml') && paths.has('mimetype')) throw unreadable(`${name} is an OpenDocument file. Save it as .xlsx.`);
  if (paths.has('word/document.xml') || paths.has('ppt/presentation.xml')) {
    throw unreadable(`${name} is a document, not a workbook. Save the sheets as .xlsx or .csv.`);
  }
  return paths.has('[content_types].xml') || paths.has('xl/workbook.xml');
}

async function* slices(bytes: Uint8Array): AsyncGenerator<Uint8Array> {
  for (let at = 0; at < bytes.byteLength; at += 65_536) yield bytes.subarray(at, at + 65_536);
}

/** A source that unpacks anew each time it is read; only the first time counts as unpacked bytes. */
function unpacked(entry: ZipEntry, meter: Meter): () => AsyncIterable<Uint8Array> {
  let first = true;
  return () => {
    const counting = first ? meter : meter.uncounted();
    first = false;
    return entry.chunks(counting);
  };
}

async function whole(entry: ZipEntry, meter: Meter): Promise<Uint8Array> {
  if (entry.size > limits.sentBytes) throw tooLarge(`${baseName(entry.name)} is larger than 25 MB, the most that is read.`);
  const pieces: Uint8Array[] = [];
  for await (const piece of entry.chunks(meter)) pieces.push(piece);
  return Buffer.concat(pieces);
}

/** Sheets of one name together, in the order of files and of sheets in them. */
function joined(outcomes: readonly FileOutcome[]): readonly RawSheet[] {
  const sheets = new Map<string, { name: string; parts: RawPart[] }>();
  let order = 0;
  for (const { file, read } of outcomes) {
    for (const { name, rows } of read.sheets) {
      const key = sheetKey(name);
      const sheet = sheets.get(key) ?? { name, parts: [] };
      sheet.parts.push({ name, file, order, decimalMark: read.decimalMark, rows });
      sheets.set(key, sheet);
      order += 1;
    }
  }
  return [...sheets.values()];
}

function problemOf(error: unknown, file: string | null): Problem {
  const refusal =
    error instanceof Refusal
      ? error
      : unreadable('The file could not be read. Open it in a spreadsheet and save it again as .xlsx.');
  return {
    severity: 'error',
    code: refusal.code,
    sheet: refusal.sheet,
    file,
    row: null,
    column: null,
    cell: null,
    frames: [],
    found: null,
    message: refusal.message,
    stopsAll: true,
  };
}

function leftOut(name: string, zip: string): Problem {
  const message = `${name} in ${zip} is neither .xlsx nor .csv and was left out.`;
  return {
    severity: 'warning',
    code: 'unreadable',
    sheet: null,
    file: name,
    row: null,
    column: null,
    cell: null,
    frames: [],
    found: null,
    message,
    stopsAll: false,
  };
}
