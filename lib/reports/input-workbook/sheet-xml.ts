/** A workbook's parts as XML text (ECMA-376 part 1, 18.3): cells only, no formats but that of a day. */
import { cellAddress, cellPosition, columnLetters } from '@/lib/intake/files/cell-address';
import type { RawCell, RawPart } from '@/lib/intake/files/raw-sheet';
import { isTyped } from '@/lib/intake/rows/cell-marks';
import { cellText, xmlText } from '@/lib/reports/xml-text';
import { readNumber } from '@/lib/units/read-number';

const head = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n';
const main = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
const relations = 'http://schemas.openxmlformats.org/package/2006/relationships';
const office = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
const types = 'application/vnd.openxmlformats-officedocument.spreadsheetml';
/** Characters of XML handed on at once. */
const piece = 1 << 16;

/** Everything of a workbook but its sheets, by path. */
export function packageParts(names: readonly string[]): readonly (readonly [path: string, xml: string])[] {
  const each = (make: (name: string, number: number) => string): string => names.map((name, i) => make(name, i + 1)).join('');
  const override = (path: string, type: string): string => `<Override PartName="/${path}" ContentType="${types}.${type}+xml"/>`;
  const relation = (id: string, type: string, target: string): string =>
    `<Relationship Id="${id}" Type="${office}/${type}" Target="${target}"/>`;
  return [
    [
      '[Content_Types].xml',
      `${head}<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types"><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Default Extension="xml" ContentType="application/xml"/>${override('xl/workbook.xml', 'sheet.main')}${override('xl/styles.xml', 'styles')}${each((_, n) => override(`xl/worksheets/sheet${n}.xml`, 'worksheet'))}</Types>`,
    ],
    [
      '_rels/.rels',
      `${head}<Relationships xmlns="${relations}">${relation('rId1', 'officeDocument', 'xl/workbook.xml')}</Relationships>`,
    ],
    [
      'xl/workbook.xml',
      `${head}<workbook xmlns="${main}" xmlns:r="${office}"><sheets>${each((name, n) => `<sheet name="${xmlText(name)}" sheetId="${n}" r:id="rId${n}"/>`)}</sheets></workbook>`,
    ],
    [
      'xl/_rels/workbook.xml.rels',
      `${head}<Relationships xmlns="${relations}">${each((_, n) => relation(`rId${n}`, 'worksheet', `worksheets/sheet${n}.xml`))}${relation(`rId${names.length + 1}`, 'styles', 'styles.xml')}</Relationships>`,
    ],
    [
      'xl/styles.xml',
      `${head}<styleSheet xmlns="${main}"><numFmts count="1"><numFmt numFmtId="164" formatCode="yyyy\\-mm\\-dd"/></numFmts><fonts count="1"><font><sz val="11"/><name val="Calibri"/></font></fonts><fills count="2"><fill><patternFill patternType="none"/></fill><fill><patternFill patternType="gray125"/></fill></fills><borders count="1"><border><left/><right/><top/><bottom/><diagonal/></border></borders><cellStyleXfs count="1"><xf numFmtId="0" fontId="0" fillId="0" borderId="0"/></cellStyleXfs><cellXfs count="2"><xf numFmtId="0" fontId="0" fillId="0" borderId="0" xfId="0"/><xf numFmtId="164" fontId="0" fillId="0" borderId="0" xfId="0" applyNumberFormat="1"/></cellXfs></styleSheet>`,
    ],
  ];
}

/** A sheet's XML in pieces, its cells at the rows and columns they stood at. */
export function* sheetXml(part: RawPart): Generator<string> {
  const merges = new Map<string, { row: number; column: number }>();
  let text = `${head}<worksheet xmlns="${main}"><sheetData>`;
  for (const { row, cells } of part.rows) {
    text += `<row r="${row}">`;
    for (let column = 0; column < cells.length; column += 1) {
      const cell = cells[column];
      if (!cell) continue;
      if (cell.mergedFrom === undefined) text += cellXml(cell, cellAddress(row, column), part);
      else widen(merges, cell.mergedFrom, row, column);
    }
    text += '</row>';
    if (text.length < piece) continue;
    yield text;
    text = '';
  }
  yield `${text}</sheetData>${mergesXml(merges)}</worksheet>`;
}

/** A merged block reaches as far as the last of its cells that is read. */
function widen(merges: Map<string, { row: number; column: number }>, master: string, row: number, column: number): void {
  const known = merges.get(master) ?? cellPosition(master) ?? { row, column };
  merges.set(master, { row: Math.max(known.row, row), column: Math.max(known.column, column) });
}

function mergesXml(merges: ReadonlyMap<string, { row: number; column: number }>): string {
  if (merges.size === 0) return '';
  const refs = [...merges].map(([master, { row, column }]) => `<mergeCell ref="${master}:${columnLetters(column)}${row}"/>`);
  return `<mergeCells count="${merges.size}">${refs.join('')}</mergeCells>`;
}

function cellXml(cell: RawCell, at: string, part: RawPart): string {
  switch (cell.kind) {
    case 'number':
      return `<c r="${at}"><v>${cell.text}</v></c>`;
    case 'boolean':
      return `<c r="${at}" t="b"><v>${cell.value ? 1 : 0}</v></c>`;
    case 'error':
      return `<c r="${at}" t="e"><v>${xmlText(cell.text)}</v></c>`;
    case 'formula':
      return `<c r="${at}"><f>${xmlText(cell.text.replace(/^=/, ''))}</f></c>`;
    case 'date': {
      const serial = dayNumber(cell.iso);
      return serial === null ? textXml(cell.text, at) : `<c r="${at}" s="1"><v>${serial}</v></c>`;
    }
    case 'text': {
      const value = numberMeant(cell.text, part);
      return value === null ? textXml(cell.text, at) : `<c r="${at}"><v>${value}</v></c>`;
    }
  }
}

function textXml(text: string, at: string): string {
  return `<c r="${at}" t="inlineStr"><is><t xml:space="preserve">${cellText(text)}</t></is></c>`;
}

/**
 * The number of a text that must not stay one. A text file's plain numbers are numbers; what could be an id of its own
 * (`01`, `1.50`) stays text. `1,234`, which only the decimal mark of its own file settles, is settled here.
 */
function numberMeant(text: string, { file, decimalMark }: RawPart): number | null {
  const read = readNumber(text, { decimalMark });
  if (read.kind !== 'number' || read.unit !== null) return null;
  const plain = decimalMark === ',' ? text.trim().replace(',', '.') : text.trim();
  if (!isTyped(file) && String(read.value) === plain) return read.value;
  return readNumber(text, { decimalMark: null }).kind === 'ambiguous' ? read.value : null;
}

/** Days since 1899-12-30, as workbooks count them; null for what is no day they know. */
function dayNumber(iso: string): number | null {
  const days = /^\d{4}-\d\d-\d\d$/.test(iso) ? Date.parse(`${iso}T00:00:00Z`) / 86_400_000 + 25_569 : NaN;
  return days > 60 ? days : null;
}
