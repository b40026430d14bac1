import type { System } from '@/lib/units/quantity';
import type { Column, View } from '@/lib/tables/view';
import { headUnit } from './table-words';

const figures = (column: Column) => column.kind === 'number' || column.kind === 'ratio';
/** Class of a column’s cells: figures right, sentences on two lines, what was typed in mono. */
export const cellClass = (column: Column) =>
  `tc-${column.kind} ${figures(column) ? 'num' : ''} ${wordy.has(column.key) ? 'tc-wordy' : ''} ${asTyped.has(column.key) ? 'tc-cell-text' : ''}`;
/** Columns of sentences: they may take two lines. */
const wordy = new Set(['message', 'reason', 'title', 'frames']);
/** Cell references, and what stands in the cell. */
const asTyped = new Set(['cell', 'found']);
interface HeadCellProps {
  readonly column: Column;
  readonly view: View;
  readonly units: System;
  readonly onView: (view: View) => void;
}

/** A column’s name with its unit beneath; pressing it sorts, then turns the order, then goes back to sheet order. */
export function HeadCell({ column, view, units, onView }: HeadCellProps) {
  const sorted = view.sort?.column === column.key ? (view.sort.descending ? 'descending' : 'ascending') : null;
  const unit = headUnit(column, units);
  const first = figures(column);
  const press = () => {
    const descending = sorted === null ? first : sorted === 'ascending';
    const off = sorted !== null && (sorted === 'descending') !== first;
    onView({ ...view, sort: off ? null : { column: column.key, descending } });
  };
  return (
    <th scope="col" className={cellClass(column)} aria-sort={sorted ?? undefined}>
      {column.sort ? (
        <button type="button" className="tbl-sort" onClick={press}>
          {column.label}
          {sorted && <span aria-hidden="true"> {sorted === 'descending' ? '↓' : '↑'}</span>}
        </button>
      ) : (
        column.label
      )}
      {unit && <span className="unit">{unit}</span>}
    </th>
  );
}
