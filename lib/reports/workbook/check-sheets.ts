/** Members (the governing row of each member and check) and Movements. */
import { acceptedWords } from '@/lib/reports/accepted-words';
import { cellOf, quantityColumn, ratioColumn, text, verdictColumn } from '@/lib/reports/workbook/report-sheet';
import type { ReportRow, ReportSheet } from '@/lib/reports/workbook/report-sheet';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import { rowsOfFrames } from '@/lib/reports/workbook/rows-of-frames';
import { unitLabel } from '@/lib/units/batch-unit';

const movements = new Set(['deflection', 'sway', 'displacement', 'spread']);

function checkSheet(source: ReportSource, name: string, wanted: (check: string) => boolean): ReportSheet {
  const system = source.settings.units;
  const accepted = acceptedWords(source.issue?.acceptances ?? []);
  return {
    name,
    columns: [
      text('frame'),
      text('where'),
      text('role'),
      text('section', 14),
      text('check', 20),
      text('combination'),
      quantityColumn('at', 'length', system),
      text('face', 8),
      { heading: 'value (in unit)', format: '0.000', width: 12 },
      { heading: 'limit (in unit)', format: '0.000', width: 12 },
      text('unit', 7),
      ratioColumn(source.settings.nearLimit),
      verdictColumn(),
      text('not checked', 50),
      text('reference', 30),
      ...(source.issue ? [text('accepted', 60)] : []),
    ],
    rows: () =>
      rowsOfFrames(source, { states: false }, function* (each): Iterable<ReportRow> {
        for (const check of each.evaluation?.checks ?? []) {
          if (!wanted(check.check)) continue;
          const member = check.member === null ? undefined : each.frame?.members[check.member];
          yield [
            each.id,
            check.subject ?? each.id,
            member?.role ?? null,
            member ? (each.frame?.sections[member.section]?.name ?? null) : null,
            check.check,
            check.combination,
            cellOf(check.at, 'length', system),
            check.face,
            cellOf(check.value, check.quantity, system),
            cellOf(check.limit, check.quantity, system),
            unitLabel(check.quantity, system),
            check.ratio,
            check.verdict,
            check.reason,
            check.reference,
            ...(source.issue
              ? [accepted({ frame: each.id, subject: check.subject ?? each.id, check: check.check, verdict: check.verdict })]
              : []),
          ];
        }
      }),
  };
}

export const membersSheet = (source: ReportSource): ReportSheet =>
  checkSheet(source, 'Members', (check) => !movements.has(check));
export const movementsSheet = (source: ReportSource): ReportSheet =>
  checkSheet(source, 'Movements', (check) => movements.has(check));
