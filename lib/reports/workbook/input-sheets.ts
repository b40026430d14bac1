/** Input as read, and Problems. */
import { text } from '@/lib/reports/workbook/report-sheet';
import type { ReportRow, ReportSheet } from '@/lib/reports/workbook/report-sheet';
import type { ReportSource } from '@/lib/reports/workbook/report-source';

export function inputSheet(source: ReportSource): ReportSheet {
  const widest = Math.max(1, source.inputWidth ? source.inputWidth() : widestOf(source.inputRows()));
  return {
    name: 'Input as read',
    columns: [
      text('sheet'),
      { heading: 'row', format: '0', width: 8 },
      ...Array.from({ length: widest }, (_, index) => text(`cell ${index + 1}`)),
    ],
    *rows(): Iterable<ReportRow> {
      for (const row of source.inputRows()) yield [row.sheet, row.row, ...row.cells];
    },
  };
}

function widestOf(rows: ReturnType<ReportSource['inputRows']>): number {
  let widest = 0;
  for (const row of rows) widest = Math.max(widest, row.cells.length);
  return widest;
}

export function problemsSheet(source: ReportSource): ReportSheet {
  return {
    name: 'Problems',
    columns: [
      text('severity'),
      text('code', 18),
      text('sheet', 16),
      text('cell', 8),
      text('column', 16),
      text('found', 16),
      text('what it means, what to do', 80),
      text('frames', 30),
    ],
    *rows(): Iterable<ReportRow> {
      for (const each of source.problems) {
        yield [
          each.severity,
          each.code,
          each.sheet,
          each.cell,
          each.column,
          each.found,
          each.message,
          each.frames.join(', ').slice(0, 32_000),
        ];
      }
    },
  };
}
