import { Meter } from '@/lib/intake/files/meter';
import { partsOf, readWorkbook, relationsOf, type Parts } from '@/lib/intake/files/xlsx-parts';
import { openZip } from '@/lib/intake/files/zip-file';
import type { Problem } from '@/lib/problems/problem';
import { bySheet, type Mark, marksOf } from '@/lib/reports/marked-copy/marks';
import { PackageParts } from '@/lib/reports/marked-copy/package-parts';
import { notedCells, plainComments, plainDrawing, withNotes, withShapes } from '@/lib/reports/marked-copy/patch-notes';
import { fillCells, withNotesDrawing } from '@/lib/reports/marked-copy/patch-sheet';
import { FilledStyles, plainStyles } from '@/lib/reports/marked-copy/patch-styles';
import { addProblemsSheet } from '@/lib/reports/marked-copy/problems-sheet';

/** Above this a workbook is not patched (it is held in memory as text): 40 MB unpacked, some 400,000 filled cells. */
const patchedBytes = 40_000_000;
/** Notes in one sheet; beyond them cells are filled, and the list says the rest. */
const mostNotes = 2_000;

/**
 * The user's own workbook with each bad cell filled and a note in it, and the list of all problems as a last sheet.
 * Only styles, the marked cells, notes and the list change: charts, widths, formulas and everything else stay as they were.
 * @returns null where the workbook is too large for this or written in a way that cannot be followed
 */
export async function patchWorkbook(file: string, bytes: Uint8Array, problems: readonly Problem[]): Promise<Uint8Array | null> {
  const entries = await openZip(bytes);
  if (entries.reduce((sum, entry) => sum + entry.size, 0) > patchedBytes) return null;
  const found = partsOf(entries);
  const meter = new Meter(() => false, '');
  const workbook = await readWorkbook(found, meter);
  const parts = new PackageParts(bytes);

  const stylesPath = workbook.styles ?? parts.free('xl/styles', 'xml');
  const stylesXml = workbook.styles === null ? plainStyles : parts.text(stylesPath);
  if (stylesXml === null) return null;
  let styles: FilledStyles;
  try {
    styles = new FilledStyles(stylesXml);
  } catch {
    return null;
  }
  const problemsOf = bySheet(problems, file);
  for (const sheet of workbook.sheets) {
    const marks = marksOf(problemsOf.get(sheet.name) ?? []);
    if (marks.length === 0) continue;
    const xml = parts.text(sheet.path);
    const filled = xml === null ? null : fillCells(xml, marks, styles);
    if (filled === null) return null;
    parts.put(sheet.path, filled);
    if (!(await addNotes(parts, found, meter, sheet.path, marks.slice(0, mostNotes)))) return null;
  }
  parts.put(stylesPath, styles.patched());
  if (workbook.styles === null) {
    parts.relate(workbook.path, 'styles', stylesPath);
    parts.declare(stylesPath, 'application/vnd.openxmlformats-officedocument.spreadsheetml.styles+xml');
  }
  return addProblemsSheet(parts, workbook.path, problems) ? parts.packed() : null;
}

/** Notes go into the sheet's own comments and drawing where it has them, else into new ones. */
async function addNotes(parts: PackageParts, found: Parts, meter: Meter, path: string, marks: readonly Mark[]): Promise<boolean> {
  const relations = [...(await relationsOf(found, path, meter)).values()];
  const ownComments = relations.find((r) => r.type === 'comments')?.target;
  const commentsPath = ownComments ?? parts.free('xl/comments', 'xml');
  const comments = ownComments === undefined ? plainComments : parts.text(commentsPath);
  if (comments === null) return false;
  const noted = withNotes(comments, marks);
  if (noted === null) return false;
  parts.put(commentsPath, noted);
  if (ownComments === undefined) {
    parts.relate(path, 'comments', commentsPath);
    parts.declare(commentsPath, 'application/vnd.openxmlformats-officedocument.spreadsheetml.comments+xml');
  }

  const ownDrawing = relations.find((r) => r.type === 'vmldrawing')?.target;
  const shown = ownComments === undefined ? new Set<string>() : notedCells(comments);
  const unshown = marks.filter((mark) => !shown.has(mark.address));
  const sheet = parts.text(path);
  if (sheet === null) return false;
  const named = /<(?:\w+:)?legacyDrawing\s/.test(sheet);
  if (ownDrawing !== undefined && named) {
    const drawing = parts.text(ownDrawing);
    const patched = drawing === null ? null : withShapes(drawing, unshown);
    if (patched === null) return false;
    parts.put(ownDrawing, patched);
    return true;
  }
  const drawingPath = parts.free('xl/drawings/vmlDrawing', 'vml');
  parts.put(drawingPath, withShapes(plainDrawing, marks) ?? plainDrawing);
  parts.declare(drawingPath, 'application/vnd.openxmlformats-officedocument.vmlDrawing');
  const relation = parts.relate(path, 'vmlDrawing', drawingPath);
  parts.put(path, withNotesDrawing(sheet, relation));
  return true;
}
