/**
 * An input as workbooks again, from its rows as they are kept: every cell at its place, so that the file uploaded anew gives
 * the same frames and results. One workbook; where sheets of one name came in several files, a zip with a workbook a file.
 */
import { Zip, ZipDeflate, ZipPassThrough } from 'fflate';
import { baseName, withoutExtension } from '@/lib/intake/files/names';
import type { RawPart } from '@/lib/intake/files/raw-sheet';
import { sheetsFromRows, type StoredInput } from '@/lib/intake/rows/input-rows';
import { packageParts, sheetXml } from '@/lib/reports/input-workbook/sheet-xml';

/** No clock: the same rows give the same bytes. */
const fixedTime = new Date(2020, 0, 1);

export interface InputFileWritten {
  /** `sheds B.xlsx`; several workbooks come as `sheds B.zip`. */
  readonly name: string;
  readonly bytes: Uint8Array;
}

/** @param stem the file's name without its ending   @throws {RangeError} for an input without any sheet */
export function inputWorkbook(input: StoredInput, stem: string): InputFileWritten {
  const parts = sheetsFromRows(input)
    .flatMap((sheet) => sheet.parts)
    .sort((a, b) => a.order - b.order);
  if (parts.length === 0) throw new RangeError('Expected an input with a sheet at least');
  const plain = fileName(stem);
  if (new Set(parts.map(nameOnSheet)).size === parts.length) return { name: `${plain}.xlsx`, bytes: workbookOf(parts) };
  const pack = new Pack();
  for (const [index, own] of byFile(parts).entries()) {
    // numbered, since sheets of one name are joined in the order of their files' names
    const number = String(index + 1).padStart(3, '0');
    pack.add(`${number} ${withoutExtension(baseName(own[0]?.file ?? ''))}.xlsx`, [workbookOf(own)], 'stored');
  }
  return { name: `${plain}.zip`, bytes: pack.bytes() };
}

/** What a spreadsheet takes as a sheet's name, in a form to compare: 31 characters, none of `: \ / ? * [ ]`. */
const nameOnSheet = ({ name }: RawPart): string => tabName(name).toLowerCase();

const tabName = (name: string): string =>
  name
    .replace(/[:\\/?*[\]]/g, ' ')
    .replace(/^'|'$/g, ' ')
    .slice(0, 31);

const fileName = (stem: string): string => stem.replace(/[\u0000-\u001f\\/:*?"<>|]/g, ' ').trim() || 'input';

/** Sheets by the file they stood in. Two files of one name (in a zip's folders) stay two: no sheet of theirs may be lost. */
function byFile(parts: readonly RawPart[]): RawPart[][] {
  const files: RawPart[][] = [];
  for (const part of parts) {
    const last = files.at(-1);
    const same = last?.[0]?.file === part.file && !last.some((other) => nameOnSheet(other) === nameOnSheet(part));
    if (last && same) last.push(part);
    else files.push([part]);
  }
  return files;
}

function workbookOf(parts: readonly RawPart[]): Uint8Array {
  const pack = new Pack();
  for (const [path, text] of packageParts(parts.map((part) => tabName(part.name)))) pack.add(path, [text]);
  for (const [index, part] of parts.entries()) pack.add(`xl/worksheets/sheet${index + 1}.xml`, sheetXml(part));
  return pack.bytes();
}

/** A zip put together piece by piece. */
class Pack {
  private readonly pieces: Uint8Array[] = [];
  private readonly zip = new Zip((fault, piece) => {
    if (fault) throw fault;
    this.pieces.push(piece);
  });

  add(path: string, content: Iterable<string | Uint8Array>, how: 'deflated' | 'stored' = 'deflated'): void {
    const entry = how === 'deflated' ? new ZipDeflate(path, { level: 6 }) : new ZipPassThrough(path);
    entry.mtime = fixedTime;
    this.zip.add(entry);
    for (const piece of content) entry.push(typeof piece === 'string' ? Buffer.from(piece) : piece);
    entry.push(new Uint8Array(0), true);
  }

  bytes(): Uint8Array {
    this.zip.end();
    return Buffer.concat(this.pieces);
  }
}
