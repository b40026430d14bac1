'use client';
import { createColumnHelper, rowSortingFeature, tableFeatures, useTable } from '@tanstack/react-table';
import { useMemo, useRef, useState, type KeyboardEvent } from 'react';
import type { System } from '@/lib/units/quantity';
import type { Cell, Column, Row, RowPage, View } from '@/lib/tables/view';
import { Empty, Notice } from '../ui/notice';
import { FilterSentence, type FilterSentenceProps } from './filter-sentence';
import { cellClass, HeadCell } from './head-cell';
import { TableCell } from './table-cell';
import { formatRatio } from '@/lib/units/format';
import { numberText, sentenceOf, shownColumns, tableNouns } from './table-words';

interface ResultTableProps extends Pick<FilterSentenceProps, 'facets' | 'onFacets' | 'onView'> {
  readonly view: View;
  /** Every column the table offers (lib/tables/view.ts and the family's parameters as `p:NAME`). */
  readonly columns: readonly Column[];
  /** undefined while the first page is being read. */
  readonly page: RowPage | undefined;
  readonly units: System;
  readonly nearLimit: number;
  /** Another page is being read; the old rows stay, dimmed. */
  readonly loading?: boolean;
  /** What went wrong and what to do. */
  readonly error?: string | null;
  /** Keyset paging: asked for with the page's own `previous` or `next`. */
  readonly onPage: (to: { readonly after: string } | { readonly before: string }) => void;
  /** Where a row leads (the frame's page, in this list); null = nowhere. */
  readonly hrefOf: (row: Row) => string | null;
  /** Opens a row by Enter or a double press; default: follows its link. */
  readonly onOpen?: (row: Row) => void;
  /** The view as a file: exactly these rows, columns and order. */
  readonly exports?: readonly { readonly label: string; readonly href: string }[];
}

const features = tableFeatures({ rowSortingFeature });
const helper = createColumnHelper<typeof features, Row>();
const none: Row[] = [];

/**
 * A server-driven table: a sentence that filters and sorts, 28 px rows, units in the head, totals at the foot.
 * Sorting, filtering and paging are the server's; this shows one page of it.
 */
export function ResultTable(props: ResultTableProps) {
  const { view, columns, page, units, nearLimit, loading = false, error, onView, onPage, hrefOf, onOpen, exports = [] } = props;
  const [selected, setSelected] = useState(-1);
  const body = useRef<HTMLTableSectionElement>(null);
  const shown = shownColumns(columns, view);
  const definitions = useMemo(
    () =>
      helper.columns(
        shownColumns(columns, view).map((column) =>
          helper.accessor((row) => row.cells[column.key] ?? null, {
            id: column.key,
            header: column.label,
            enableSorting: column.sort === true,
            cell: ({ row }) => (
              <TableCell
                column={column}
                row={row.original}
                units={units}
                nearLimit={nearLimit}
                href={linked(column, columns) ? hrefOf(row.original) : null}
              />
            ),
          }),
        ),
      ),
    [columns, view, units, nearLimit, hrefOf],
  );
  const table = useTable({
    features,
    columns: definitions,
    data: useMemo(() => (page ? [...page.rows] : none), [page]),
    getRowId: (row) => row.id,
    manualSorting: true,
    state: { sorting: view.sort ? [{ id: view.sort.column, desc: view.sort.descending }] : [] },
  });
  const rows = table.getRowModel().rows;
  const at = Math.min(selected, rows.length - 1);
  const open = (index: number) => {
    const row = rows[index];
    if (!row) return;
    if (onOpen) onOpen(row.original);
    else body.current?.rows[index]?.querySelector('a')?.click();
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.target instanceof HTMLElement && event.target.closest('a, button, input') && event.key === 'Enter') return;
    const steps: Record<string, number> = { ArrowDown: at + 1, ArrowUp: at - 1, Home: 0, End: rows.length - 1 };
    const to = steps[event.key];
    if (to !== undefined) {
      const index = Math.min(Math.max(to, 0), rows.length - 1);
      setSelected(index);
      body.current?.rows[index]?.scrollIntoView?.({ block: 'nearest' });
    } else if (event.key === 'Enter' && at >= 0) open(at);
    else return;
    event.preventDefault();
  };
  const name = sentenceOf(view, columns, units);
  return (
    <div className="result-table" aria-busy={loading || page === undefined}>
      <FilterSentence
        view={view}
        columns={columns}
        units={units}
        facets={props.facets}
        onFacets={props.onFacets}
        onView={onView}
      />
      {error && <Notice kind="error">{error}</Notice>}
      <div
        className="tbl-scroll"
        role="region"
        tabIndex={0}
        aria-label={`${name}. Arrow keys choose a row, Enter opens it.`}
        onKeyDown={onKeyDown}
      >
        <table className="tbl">
          <caption className="sr-only">{name}</caption>
          <thead>
            <tr>
              {table.getFlatHeaders().map((header) => {
                const column = shown.find((one) => one.key === header.column.id);
                return column ? <HeadCell key={header.id} column={column} view={view} units={units} onView={onView} /> : null;
              })}
            </tr>
          </thead>
          <tbody ref={body} className={loading ? 'tbl-waiting' : undefined}>
            {rows.map((row, index) => (
              <tr
                key={row.id}
                className={index === at ? 'tbl-selected' : undefined}
                aria-selected={index === at || undefined}
                onClick={() => setSelected(index)}
                onDoubleClick={() => open(index)}
              >
                {row.getAllCells().map((cell, i) => {
                  const column = shown[i];
                  return (
                    <td key={cell.id} className={column ? cellClass(column) : undefined}>
                      <table.FlexRender cell={cell} />
                    </td>
                  );
                })}
              </tr>
            ))}
          </tbody>
          {page && rows.length > 0 && <Totals page={page} shown={shown} view={view} units={units} nearLimit={nearLimit} />}
        </table>
        {page === undefined && !error && <p className="tbl-reading">Reading {tableNouns[view.table].toLowerCase()} …</p>}
        {page && rows.length === 0 && <NoRows page={page} view={view} onView={onView} />}
      </div>
      <div className="tbl-foot">
        {page && (
          <span>
            <b>{page.matching.toLocaleString('en-GB')}</b>
            {page.matching !== page.total && ` of ${page.total.toLocaleString('en-GB')}`} {tableNouns[view.table].toLowerCase()}
            {page.rows.length < page.matching && `, ${page.rows.length} shown`}
          </span>
        )}
        {page && (page.previous !== null || page.next !== null) && (
          <span className="tbl-pages">
            <button
              type="button"
              className="choice-plain"
              disabled={page.previous === null}
              onClick={() => page.previous !== null && onPage({ before: page.previous })}
            >
              ← previous rows
            </button>
            <button
              type="button"
              className="choice-plain"
              disabled={page.next === null}
              onClick={() => page.next !== null && onPage({ after: page.next })}
            >
              next rows →
            </button>
          </span>
        )}
        {exports.length > 0 && (
          <span className="tbl-exports">
            Export this view:{' '}
            {exports.map((file) => (
              <a key={file.href} className="link" href={file.href} download>
                {file.label}
              </a>
            ))}
          </span>
        )}
      </div>
    </div>
  );
}

/** The id that leads to the row's own page: the frame's, or a problem's cell. */
const linked = (column: Column, columns: readonly Column[]) =>
  column.key === (columns.some((one) => one.key === 'frame') ? 'frame' : 'cell');

interface TotalsProps {
  readonly page: RowPage;
  readonly shown: readonly Column[];
  readonly view: View;
  readonly units: System;
  readonly nearLimit: number;
}

/** Sums, and the worst ratio, over every row of the view. */
function Totals({ page, shown, view, units, nearLimit }: TotalsProps) {
  if (Object.keys(page.totals).length === 0) return null;
  return (
    <tfoot>
      <tr>
        {shown.map((column, i) => {
          const total = page.totals[column.key];
          const text = totalText(total ?? null, column, units, nearLimit);
          return i === 0 ? (
            <th key={column.key} scope="row">
              {text || `${page.matching.toLocaleString('en-GB')} ${tableNouns[view.table].toLowerCase()}`}
            </th>
          ) : (
            <td key={column.key} className={cellClass(column)}>
              {column.kind === 'ratio' && text !== '' && <span className="tbl-worst">worst </span>}
              {text}
            </td>
          );
        })}
      </tr>
    </tfoot>
  );
}

/** A ratio keeps on its side of the limit here too. */
function totalText(total: Cell, column: Column, units: System, nearLimit: number): string {
  if (typeof total !== 'number') return total ?? '';
  return column.kind === 'ratio' ? formatRatio(total, nearLimit) : numberText(total, column, null, units);
}

function NoRows({ page, view, onView }: { page: RowPage; view: View; onView: (view: View) => void }) {
  const noun = tableNouns[view.table].toLowerCase();
  if (view.filters.length === 0) return <Empty>This revision has no {noun}.</Empty>;
  return (
    <Empty strokes={1}>
      None of {page.total.toLocaleString('en-GB')} {noun} fits this sentence.{' '}
      <button type="button" className="choice-plain" onClick={() => onView({ ...view, filters: view.filters.slice(0, -1) })}>
        Take away the last filter
      </button>{' '}
      or{' '}
      <button type="button" className="choice-plain" onClick={() => onView({ ...view, filters: [] })}>
        all of them
      </button>
      .
    </Empty>
  );
}
