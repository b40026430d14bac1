import { cellPosition } from '@/lib/intake/files/cell-address';
import type { Mark } from '@/lib/reports/marked-copy/marks';
import type { FilledStyles } from '@/lib/reports/marked-copy/patch-styles';
import { attribute, prefixOf, withAttribute } from '@/lib/reports/xml-text';

/**
 * Gives the marked cells of a worksheet a fill, as text: cells that are there change their style, cells and rows that are
 * not there are put in at their place, and nothing else moves.
 * @param marks by row and column
 * @returns null where the part holds what this cannot follow (comments, CDATA, no cells at all)
 */
export function fillCells(xml: string, marks: readonly Mark[], styles: FilledStyles): string | null {
  const p = prefixOf(xml, 'worksheet');
  const data = new RegExp(`<${p}sheetData(?:\\s[^>]*)?(?:/>|>)`).exec(xml);
  if (!data || xml.includes('<!--') || xml.includes('<![CDATA[')) return null;
  const start = data.index + data[0].length;
  if (data[0].endsWith('/>')) {
    const rows = newRows(marks, p, styles);
    return `${xml.slice(0, data.index)}${data[0].replace(/\s*\/>$/, '>')}${rows}</${p}sheetData>${xml.slice(start)}`;
  }
  const end = xml.indexOf(`</${p}sheetData`, start);
  if (end < 0) return null;
  return xml.slice(0, start) + patchRows(xml.slice(start, end), marks, p, styles) + xml.slice(end);
}

function patchRows(data: string, marks: readonly Mark[], p: string, styles: FilledStyles): string {
  const rowPattern = new RegExp(`<${p}row(?:\\s[^>]*?)?(?:/>|>)`, 'g');
  const out: string[] = [];
  let copied = 0;
  let next = 0;
  let number = 0;
  for (let found = rowPattern.exec(data); found; found = rowPattern.exec(data)) {
    const tag = found[0];
    const stated = Number(attribute(tag, 'r'));
    number = stated > 0 ? stated : number + 1;
    const before = takeWhile(marks, next, (mark) => mark.row < number);
    if (before.length > 0) out.push(data.slice(copied, found.index), newRows(before, p, styles));
    if (before.length > 0) copied = found.index;
    next += before.length;
    const here = takeWhile(marks, next, (mark) => mark.row === number);
    if (here.length === 0) continue;
    next += here.length;
    out.push(data.slice(copied, found.index));
    if (tag.endsWith('/>')) {
      out.push(tag.replace(/\s*\/>$/, '>'), newCells(here, p, styles), `</${p}row>`);
      copied = found.index + tag.length;
    } else {
      const close = data.indexOf(`</${p}row`, found.index);
      const inner = data.slice(found.index + tag.length, close < 0 ? data.length : close);
      out.push(tag, patchCells(inner, here, p, styles));
      copied = close < 0 ? data.length : close;
    }
    rowPattern.lastIndex = copied;
  }
  out.push(data.slice(copied), newRows(marks.slice(next), p, styles));
  return out.join('');
}

function patchCells(inner: string, marks: readonly Mark[], p: string, styles: FilledStyles): string {
  const cellPattern = new RegExp(`<${p}c(?:\\s[^>]*?)?/?>`, 'g');
  const out: string[] = [];
  let copied = 0;
  let next = 0;
  let column = -1;
  for (let found = cellPattern.exec(inner); found; found = cellPattern.exec(inner)) {
    const tag = found[0];
    column = cellPosition(attribute(tag, 'r') ?? '')?.column ?? column + 1;
    const before = takeWhile(marks, next, (mark) => mark.column < column);
    out.push(inner.slice(copied, found.index), newCells(before, p, styles));
    next += before.length;
    copied = found.index;
    const here = marks[next];
    if (here?.column !== column) continue;
    out.push(withAttribute(tag, 's', String(styles.filled(Number(attribute(tag, 's') ?? 0), here.severity))));
    copied += tag.length;
    next += 1;
  }
  out.push(inner.slice(copied), newCells(marks.slice(next), p, styles));
  return out.join('');
}

function newCells(marks: readonly Mark[], p: string, styles: FilledStyles): string {
  return marks.map((mark) => `<${p}c r="${mark.address}" s="${styles.filled(0, mark.severity)}"/>`).join('');
}

function newRows(marks: readonly Mark[], p: string, styles: FilledStyles): string {
  const rows = new Map<number, Mark[]>();
  for (const mark of marks) rows.set(mark.row, [...(rows.get(mark.row) ?? []), mark]);
  return [...rows].map(([row, cells]) => `<${p}row r="${row}">${newCells(cells, p, styles)}</${p}row>`).join('');
}

function takeWhile(marks: readonly Mark[], from: number, test: (mark: Mark) => boolean): readonly Mark[] {
  let to = from;
  for (let mark = marks[to]; mark && test(mark); mark = marks[to]) to += 1;
  return marks.slice(from, to);
}

/** Elements that stand after the drawing of notes in a worksheet (ECMA-376 part 1, 18.3.1.99, in order). */
const after = ['legacyDrawingHF', 'drawingHF', 'picture', 'oleObjects', 'controls', 'webPublishItems', 'tableParts', 'extLst'];

/** Names the drawing that shows the notes, at its place in the sheet; `relation` is its id in the sheet's relations. */
export function withNotesDrawing(xml: string, relation: string): string {
  const p = prefixOf(xml, 'worksheet');
  const end = xml.search(new RegExp(`</${p}worksheet\\s*>\\s*$`));
  const afterData = Math.max(0, xml.lastIndexOf('sheetData'));
  const places = after
    .map((name) => xml.slice(afterData).search(new RegExp(`<${p}${name}[\\s>/]`)))
    .filter((at) => at >= 0)
    .map((at) => at + afterData);
  const at = Math.min(...places, end);
  const r = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
  return `${xml.slice(0, at)}<${p}legacyDrawing xmlns:r="${r}" r:id="${relation}"/>${xml.slice(at)}`;
}
