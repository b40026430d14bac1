/** Workbooks put together part by part, for tests: what no writer would write, and what some other writers do. */
import { type Zippable, zipSync } from 'fflate';
import type { InputFile } from '@/lib/intake/intake';
import type { RawRow } from '@/lib/intake/files/raw-sheet';

export interface Crafted {
  /** `<sheetData>` and what follows it, by sheet name. */
  readonly sheets: Readonly<Record<string, string>>;
  readonly sharedStrings?: string;
  readonly styles?: string;
  /** More parts, or others in place of the usual ones; null leaves a part out. */
  readonly parts?: Readonly<Record<string, string | Uint8Array | null>>;
}

const main = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
const relation = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
const head = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n';
const relations = (lines: readonly string[]): string =>
  `${head}<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships">${lines.join('')}</Relationships>`;

/** The parts of a workbook by path, in the order a spreadsheet writes them. */
export function craftedParts({ sheets, sharedStrings, styles, parts = {} }: Crafted): Record<string, Uint8Array> {
  const names = Object.keys(sheets);
  const line = (id: string, type: string, target: string): string =>
    `<Relationship Id="${id}" Type="${relation}/${type}" Target="${target}"/>`;
  const all: Record<string, string | Uint8Array | null> = {
    '[Content_Types].xml': `${head}<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types"><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Default Extension="xml" ContentType="application/xml"/><Override PartName="/xl/workbook.xml" ContentType="application/vnd.openxmlformats-officedocument.spreadsheetml.sheet.main+xml"/>${names.map((_, i) => `<Override PartName="/xl/worksheets/sheet${i + 1}.xml" ContentType="application/vnd.openxmlformats-officedocument.spreadsheetml.worksheet+xml"/>`).join('')}</Types>`,
    '_rels/.rels': relations([line('rId1', 'officeDocument', 'xl/workbook.xml')]),
    'xl/workbook.xml': `${head}<workbook xmlns="${main}" xmlns:r="${relation}"><sheets>${names
      .map((name, i) => `<sheet name="${name}" sheetId="${i + 1}" r:id="rId${i + 1}"/>`)
      .join('')}</sheets></workbook>`,
    'xl/_rels/workbook.xml.rels': relations([
      ...names.map((_, i) => line(`rId${i + 1}`, 'worksheet', `worksheets/sheet${i + 1}.xml`)),
      ...(sharedStrings === undefined ? [] : [line('rId98', 'sharedStrings', 'sharedStrings.xml')]),
      ...(styles === undefined ? [] : [line('rId99', 'styles', 'styles.xml')]),
    ]),
    ...Object.fromEntries(
      names.map((name, i) => [
        `xl/worksheets/sheet${i + 1}.xml`,
        `${head}<worksheet xmlns="${main}" xmlns:r="${relation}">${sheets[name] ?? ''}</worksheet>`,
      ]),
    ),
    ...(sharedStrings === undefined ? {} : { 'xl/sharedStrings.xml': `${head}<sst xmlns="${main}">${sharedStrings}</sst>` }),
    ...(styles === undefined ? {} : { 'xl/styles.xml': `${head}<styleSheet xmlns="${main}">${styles}</styleSheet>` }),
    ...parts,
  };
  return Object.fromEntries(
    Object.entries(all).flatMap(([path, content]) =>
      content === null ? [] : [[path, typeof content === 'string' ? new TextEncoder().encode(content) : content]],
    ),
  );
}

/** A crafted workbook as a file. */
export function craftedWorkbook(crafted: Crafted, name = 'batch.xlsx'): InputFile {
  return { name, bytes: zipSync(craftedParts(crafted) as Zippable) };
}

/** Rows as plain text by row number, blanks as '', for comparing. */
export function asText(rows: readonly RawRow[]): Record<number, string[]> {
  return Object.fromEntries(rows.map(({ row, cells }) => [row, cells.map((cell) => cell?.text ?? '')]));
}
