import { libraryNumber, libraryUnit } from '@/lib/library/columns-of-library';
import { text, type ReportSheet } from '@/lib/reports/workbook/report-sheet';
import { candidateVerdict } from '@/lib/sizing/candidate-verdict';
import type { SizingFound } from '@/lib/sizing/sizing';
import type { System } from '@/lib/units/quantity';

/** Every candidate of every group as one sheet of a CSV file or a workbook. */
export function sizingSheet({ groups }: SizingFound, units: System, nearLimit: number): ReportSheet {
  const number = (heading: string, format = '0.0##') => ({ heading, format, width: 12 });
  const counted = (heading: string) => number(heading, '0');
  return {
    name: 'sizing',
    columns: [
      text('group by', 10),
      text('group', 16),
      text('range', 16),
      text('section', 22),
      text('chosen', 8),
      number(`mass [${libraryUnit('massPerLength', units)}]`),
      number(`A [${libraryUnit('area', units)}]`),
      number('ratio', '0.000'),
      text('verdict', 12),
      counted('frames over'),
      counted('frames not checked'),
      counted('frames not solved'),
      counted('frames looked at'),
      counted('frames'),
      text('worst frame', 16),
      text('governs', 40),
      text('not to be had', 40),
    ],
    *rows() {
      for (const { by, name, range, chosen, candidates } of groups) {
        for (const one of candidates) {
          const tried = one.unfit === null && one.lookedAt > 0;
          yield [
            by,
            name,
            range,
            one.name,
            one.name === chosen ? 'yes' : 'no',
            one.mass_kg_m === null ? null : Number(libraryNumber(one.mass_kg_m, 'massPerLength', units).toPrecision(10)),
            one.unfit !== null ? null : Number(libraryNumber(one.A_m2, 'area', units).toPrecision(10)),
            one.ratio,
            candidateVerdict(one, nearLimit),
            tried ? one.over : null,
            tried ? one.notChecked : null,
            tried ? one.notSolved : null,
            one.lookedAt,
            one.frames,
            one.frame,
            one.governs,
            one.unfit,
          ];
        }
      }
    },
  };
}
