/** Exactly a view's rows, columns and order as one sheet of a workbook or a CSV file. */
import type { ReportCell, ReportColumn, ReportSheet } from '@/lib/reports/workbook/report-sheet';
import { cellOf, quantityColumn, ratioColumn, text, verdictColumn } from '@/lib/reports/workbook/report-sheet';
import { checkQuantity, columnQuantity } from '@/lib/tables/column-quantity';
import { shownColumns, type ParameterColumn } from '@/lib/tables/shown-columns';
import type { Column, Row, View } from '@/lib/tables/view';
import { unitLabel } from '@/lib/units/batch-unit';
import type { System } from '@/lib/units/quantity';

interface Exported {
  readonly view: View;
  readonly units: System;
  readonly nearLimit: number;
  readonly parameters: readonly ParameterColumn[];
  readonly rows: () => AsyncIterable<Row>;
}

export function viewSheet({ view, units, nearLimit, parameters, rows }: Exported): ReportSheet {
  const columns = shownColumns(view, parameters);
  const unitPlace = columns.findLastIndex((column) => column.quantity === 'byCheck');
  const heads = columns.map((column) => head(column, units, nearLimit));
  if (unitPlace >= 0) heads.splice(unitPlace + 1, 0, text('unit', 8));
  return {
    name: view.table,
    columns: heads,
    async *rows() {
      for await (const row of rows()) {
        const cells = columns.map((column) => cell(column, row, units));
        if (unitPlace >= 0) cells.splice(unitPlace + 1, 0, unitOf(row, units));
        yield cells;
      }
    },
  };
}

function head(column: Column, units: System, nearLimit: number): ReportColumn {
  if (column.kind === 'ratio') return ratioColumn(nearLimit, column.label);
  if (column.kind === 'verdict') return verdictColumn(column.label);
  if (column.kind !== 'number') return text(column.label, column.kind === 'id' ? 14 : 18);
  const quantity = columnQuantity(column);
  return quantity === null
    ? { heading: column.label, width: 12, format: '0.000' }
    : quantityColumn(column.label, quantity, units);
}

function cell(column: Column, row: Row, units: System): ReportCell {
  const value = row.cells[column.key] ?? null;
  if (typeof value !== 'number') return value;
  const quantity = column.quantity === 'byCheck' ? checkQuantity(row) : columnQuantity(column);
  return quantity === null ? value : cellOf(value, quantity, units);
}

function unitOf(row: Row, units: System): string | null {
  const quantity = checkQuantity(row);
  return quantity === null ? null : unitLabel(quantity, units);
}
