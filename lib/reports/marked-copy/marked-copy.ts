import { unzipSync, type Zippable, zipSync } from 'fflate';
import { limits } from '@/lib/intake/files/limits';
import { fileKind } from '@/lib/intake/files/file-kind';
import { baseName, byName, withoutExtension } from '@/lib/intake/files/names';
import { readFiles } from '@/lib/intake/files/read-files';
import type { InputFile } from '@/lib/intake/intake';
import type { Problem } from '@/lib/problems/problem';
import { freshWorkbook } from '@/lib/reports/marked-copy/fresh-workbook';
import { patchWorkbook } from '@/lib/reports/marked-copy/patch-workbook';

export interface MarkedCopy {
  /** `sheds marked.xlsx`; several files come as `… marked.zip`. */
  readonly name: string;
  readonly bytes: Uint8Array;
  readonly contentType: string;
}

const xlsx = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';

/**
 * The user's own files back with each bad cell filled and a note in it (sheets §5). A workbook is patched, never rewritten;
 * one too large for that gives a new workbook of its bad rows; a CSV file becomes a workbook of the same sheet. Read again,
 * a marked copy gives the same frames (the large one's excerpt aside, which is only to be looked at).
 * @param files as they were sent   @param problems as reading them gave, every one
 * @param headingRows 1-based heading row by sheet name, for the excerpt
 */
export async function markedCopy(
  files: readonly InputFile[],
  problems: readonly Problem[],
  headingRows: ReadonlyMap<string, number> = new Map(),
): Promise<MarkedCopy> {
  const single = files.flatMap(unpackedFiles).sort((a, b) => byName(a.name, b.name));
  const names = new Set(single.map((file) => file.name));
  const copies: { name: string; bytes: Uint8Array }[] = [];
  for (const [i, file] of single.entries()) {
    // what belongs to no file, or to the zip as a whole, is listed in the first
    const own = problems.filter((p) => p.file === file.name || (i === 0 && (p.file === null || !names.has(p.file))));
    const bytes = await copyOf(file, own, headingRows);
    copies.push({ name: `${withoutExtension(file.name)} marked.xlsx`, bytes });
  }
  const [first] = copies;
  if (!first) throw new RangeError('Expected at least one file, got none');
  if (copies.length === 1) return { ...first, contentType: xlsx };
  const name = files.length === 1 ? baseName(files[0]?.name ?? '') : first.name;
  return {
    name: `${withoutExtension(name).replace(/ marked$/, '')} marked.zip`,
    bytes: packed(copies),
    contentType: 'application/zip',
  };
}

async function copyOf(
  file: InputFile,
  problems: readonly Problem[],
  headingRows: ReadonlyMap<string, number>,
): Promise<Uint8Array> {
  const read = await readFiles([file]);
  const parts = read.sheets.flatMap((sheet) => sheet.parts).sort((a, b) => a.order - b.order);
  const readable = parts.length > 0;
  const workbook = readable && isZip(file);
  if (workbook) {
    // a workbook that can be read but not followed part by part still gets its bad rows shown
    const patched = await patchWorkbook(file.name, file.bytes, problems).catch(() => null);
    if (patched) return patched;
  }
  return freshWorkbook(file.name, parts, problems, { badRowsOnly: workbook, headingRows });
}

function isZip(file: InputFile): boolean {
  try {
    return fileKind(file.name, file.bytes) === 'zip';
  } catch {
    return false;
  }
}

/** The sheet files of one upload: itself, or those of a zip that is no workbook. */
function unpackedFiles(file: InputFile): readonly InputFile[] {
  const own = [{ name: baseName(file.name), bytes: file.bytes }];
  if (!/\.zip$/i.test(file.name) || !isZip(file)) return own;
  let declared = 0;
  try {
    const inner = unzipSync(file.bytes, {
      filter: (entry) => /\.(csv|tsv|txt|xlsx)$/i.test(entry.name) && (declared += entry.originalSize) < limits.unpackedBytes,
    });
    const found = Object.entries(inner)
      .filter(([path]) => !/(^|\/)(__MACOSX\/|\.[^./])/.test(path))
      .map(([path, bytes]) => ({ name: baseName(path), bytes }));
    return found.length > 0 ? found : own;
  } catch {
    return own;
  }
}

function packed(copies: readonly { name: string; bytes: Uint8Array }[]): Uint8Array {
  const parts: Record<string, Uint8Array> = {};
  for (const { name, bytes } of copies) {
    let free = name;
    for (let n = 2; parts[free]; n += 1) free = name.replace(/\.xlsx$/, ` ${n}.xlsx`);
    parts[free] = bytes;
  }
  return zipSync(parts as Zippable, { level: 0, mtime: new Date(2000, 0, 1) });
}
