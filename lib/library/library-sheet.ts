/** A view of the section library as one sheet of a workbook or a CSV file. */
import { text, type ReportSheet } from '@/lib/reports/workbook/report-sheet';
import { ranges } from '@/lib/sections/library';
import type { System } from '@/lib/units/quantity';
import { columnsOfLibrary, libraryNumber, libraryUnit } from './columns-of-library';
import type { LibraryRow } from './library-view';

/** Rows and order as in the view, every property in its unit; a property that is not available is said to be so. */
export function librarySheet(rows: readonly LibraryRow[], units: System): ReportSheet {
  return {
    name: 'sections',
    columns: [
      text('designation', 22),
      text('range', 16),
      text('standard', 16),
      text('properties', 12),
      ...columnsOfLibrary.map(({ label, quantity }) => ({
        heading: `${label} [${libraryUnit(quantity, units)}]`,
        format: '0.0##',
        width: 12,
      })),
    ],
    *rows() {
      for (const { range, section } of rows) {
        yield [
          section.designation,
          range,
          ranges[range].standard,
          'derived',
          ...columnsOfLibrary.map(({ value, quantity }) => {
            const si = value(section);
            return si === null ? 'not available' : Number(libraryNumber(si, quantity, units).toPrecision(10));
          }),
        ];
      }
    },
  };
}
