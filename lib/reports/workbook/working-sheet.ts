/** Working: the calculation of every clause on the Members sheet, line by line, as text. */
import { isClause } from '@/lib/checks/design-code/clause-name';
import { workingOf } from '@/lib/checks/working';
import { workingFormat } from '@/lib/checks/working-format';
import { textOf } from '@/lib/checks/working-text';
import { text, verdictColumn, type ReportRow, type ReportSheet } from '@/lib/reports/workbook/report-sheet';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import { rowsOfFrames } from '@/lib/reports/workbook/rows-of-frames';
import type { Settings } from '@/lib/model/settings';

/** Whether a workbook has the sheet: where members are checked by a design code. */
export const hasWorking = ({ strengthCheck }: Settings): boolean => strengthCheck !== 'elastic stress';

export function workingSheet(source: ReportSource): ReportSheet {
  const format = workingFormat(source.settings.units, source.settings.nearLimit);
  return {
    name: 'Working',
    columns: [
      text('frame'),
      text('where'),
      text('check', 24),
      text('combination', 16),
      text('step', 26),
      text('calculation', 90),
      text('clause', 30),
      verdictColumn(),
    ],
    rows: () =>
      rowsOfFrames(source, { states: false }, function* (each): Iterable<ReportRow> {
        for (const check of each.evaluation?.checks ?? []) {
          if (!isClause(check.check)) continue;
          for (const line of workingOf(check, format))
            yield [
              each.id,
              check.subject,
              check.check,
              check.combination,
              line.what,
              textOf(line.parts),
              line.source ?? null,
              line.what === 'ratio' ? check.verdict : null,
            ];
        }
      }),
  };
}
