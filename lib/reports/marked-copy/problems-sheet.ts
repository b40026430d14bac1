import type { Problem } from '@/lib/problems/problem';
import { problemHeadings, problemRow } from '@/lib/reports/marked-copy/marks';
import type { PackageParts } from '@/lib/reports/marked-copy/package-parts';
import { attribute, beforeEnd, prefixOf, xmlText } from '@/lib/reports/xml-text';

export const problemsSheetName = 'Problems found';
const main = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';
const relationships = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
const widths = [10, 22, 18, 7, 18, 8, 22, 24, 90];

/** Adds the list of all problems as the workbook's last sheet: those that have no cell stand only here. */
export function addProblemsSheet(parts: PackageParts, workbookPath: string, problems: readonly Problem[]): boolean {
  const workbook = parts.text(workbookPath);
  if (workbook === null) return false;
  const sheets = [...workbook.matchAll(/<(?:\w+:)?sheet\s[^>]*>/g)].map((m) => m[0]);
  const names = new Set(sheets.map((tag) => attribute(tag, 'name')?.toLowerCase()));
  const ids = sheets.map((tag) => Number(attribute(tag, 'sheetId') ?? 0));
  let name = problemsSheetName;
  for (let n = 2; names.has(name.toLowerCase()); n += 1) name = `${problemsSheetName} ${n}`;
  const path = parts.free('xl/worksheets/problems', 'xml');
  const relation = parts.relate(workbookPath, 'worksheet', path);
  const p = prefixOf(workbook, 'workbook');
  const line = `<${p}sheet xmlns:r="${relationships}" name="${name}" sheetId="${Math.max(0, ...ids) + 1}" r:id="${relation}"/>`;
  const patched = beforeEnd(workbook, 'sheets', line);
  if (patched === null) return false;
  parts.put(workbookPath, patched);
  parts.put(path, sheetXml(problems));
  parts.declare(path, 'application/vnd.openxmlformats-officedocument.spreadsheetml.worksheet+xml');
  return true;
}

function sheetXml(problems: readonly Problem[]): string {
  const rows = [problemHeadings, ...problems.map(problemRow)].map((cells, r) => {
    const inner = cells.map((text, c) => {
      const ref = `${String.fromCharCode(65 + c)}${r + 1}`;
      return text === ''
        ? ''
        : `<c r="${ref}" t="inlineStr"><is><t xml:space="preserve">${xmlText(text.slice(0, 30_000))}</t></is></c>`;
    });
    return `<row r="${r + 1}">${inner.join('')}</row>`;
  });
  const columns = widths.map((width, i) => `<col min="${i + 1}" max="${i + 1}" width="${width}" customWidth="1"/>`).join('');
  return `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>
<worksheet xmlns="${main}"><sheetViews><sheetView workbookViewId="0"><pane ySplit="1" topLeftCell="A2" activePane="bottomLeft" state="frozen"/></sheetView></sheetViews><cols>${columns}</cols><sheetData>${rows.join('')}</sheetData></worksheet>`;
}
