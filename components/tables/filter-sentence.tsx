'use client';
import { Fragment, useState } from 'react';
import type { System } from '@/lib/units/quantity';
import type { Column, Filter, View } from '@/lib/tables/view';
import { Choice, type Option } from '../ui/choice';
import { FilterNumber } from './filter-number';
import { shownColumns, sortWords, spoken, tableNouns } from './table-words';

export interface FilterSentenceProps {
  readonly view: View;
  /** Every column the table offers, family parameters (`p:NAME`) included. */
  readonly columns: readonly Column[];
  readonly units: System;
  /** Values of the columns that filter by a list, with counts; undefined while they are being read. */
  readonly facets: Readonly<Record<string, readonly Option[]>> | undefined;
  /** A list of values was opened: time to read facets. */
  readonly onFacets?: () => void;
  readonly onView: (view: View) => void;
}

/** A view as a sentence whose choices open in place: "Members where role is rafter and ratio is at least 0.80". */
export function FilterSentence({ view, columns, units, facets, onFacets, onView }: FilterSentenceProps) {
  /** A filter begun, its value not yet chosen. */
  const [draft, setDraft] = useState<string | null>(null);
  const offered = columns.filter((column) => column.filter);
  const columnOf = (key: string) => columns.find((column) => column.key === key);
  const set = (filters: readonly Filter[]) => onView({ ...view, filters: [...filters] });
  const replace = (index: number, filter: Filter | null) =>
    set(view.filters.flatMap((one, i) => (i === index ? (filter ? [filter] : []) : [one])));
  const names = (without: readonly string[]) =>
    offered.filter((column) => !without.includes(column.key)).map((column) => ({ value: column.key, label: spoken(column) }));
  const used = view.filters.map((filter) => filter.column);
  const all = view.filters.length === 0 && draft === null;
  const value = (column: Column, filter: Filter | null, give: (filter: Filter | null) => void) => (
    <FilterValue column={column} filter={filter} units={units} options={facets?.[column.key]} onOpen={onFacets} onFilter={give} />
  );
  return (
    <div className="sentence" role="group" aria-label="Filters">
      <p>
        <b>{tableNouns[view.table]}</b> {all ? (view.table === 'frames' ? 'of this revision, all' : 'of all frames') : 'where '}
        {view.filters.map((filter, index) => {
          const column = columnOf(filter.column);
          if (!column) return null;
          return (
            <Fragment key={`${index}:${filter.column}`}>
              {index > 0 && ' and '}
              <Choice
                label={`filter ${index + 1}`}
                options={[...names(used.filter((key) => key !== filter.column)), { value: '', label: 'take this filter away' }]}
                value={[filter.column]}
                onChange={([key]) => {
                  if (key === filter.column) return;
                  replace(index, null);
                  setDraft(key || null);
                }}
              />{' '}
              {value(column, filter, (next) => replace(index, next))}
              <button
                type="button"
                className="sentence-remove"
                aria-label={`Take away the filter on ${spoken(column)}`}
                onClick={() => replace(index, null)}
              >
                ×
              </button>
            </Fragment>
          );
        })}
        {draft !== null && columnOf(draft) && (
          <>
            {view.filters.length > 0 && ' and '}
            <Choice
              label="new filter"
              options={[...names(used), { value: '', label: 'take this filter away' }]}
              value={[draft]}
              onChange={([key]) => setDraft(key || null)}
            />{' '}
            {value(columnOf(draft)!, null, (next) => {
              setDraft(null);
              if (next) set([...view.filters, next]);
            })}
          </>
        )}{' '}
        {draft === null && names(used).length > 0 && (
          <Choice
            label="add a filter"
            text={all ? 'where …' : 'and …'}
            options={names(used)}
            value={[]}
            onChange={([key]) => setDraft(key ?? null)}
          />
        )}
      </p>
      <SortAndColumns view={view} columns={columns} onView={onView} />
    </div>
  );
}

interface FilterValueProps {
  readonly column: Column;
  readonly filter: Filter | null;
  readonly units: System;
  readonly options: readonly Option[] | undefined;
  readonly onOpen?: () => void;
  readonly onFilter: (filter: Filter | null) => void;
}

function FilterValue({ column, filter, units, options, onOpen, onFilter }: FilterValueProps) {
  if (column.kind === 'number' || column.kind === 'ratio')
    return <FilterNumber column={column} filter={filter?.op === 'range' ? filter : null} units={units} onFilter={onFilter} />;
  if (column.kind === 'id' && filter?.op !== 'in')
    return <FilterText column={column} text={filter?.op === 'contains' ? filter.text : ''} onFilter={onFilter} />;
  const values = filter?.op === 'in' ? filter.values : [];
  const fixed = column.kind === 'verdict' ? verdicts : column.kind === 'severity' ? severities : undefined;
  const known = options ?? fixed ?? [];
  const missing = values
    .filter((one) => !known.some((option) => option.value === one))
    .map((one) => ({ value: one, label: one }));
  return (
    <>
      is{' '}
      <Choice
        label={`${spoken(column)}, values`}
        several
        options={[...known, ...missing]}
        value={values}
        loading={options === undefined && !fixed}
        onOpen={onOpen}
        onChange={(next) => onFilter(next.length > 0 ? { column: column.key, op: 'in', values: [...next] } : null)}
      />
    </>
  );
}

function FilterText({ column, text, onFilter }: { column: Column; text: string; onFilter: (filter: Filter | null) => void }) {
  const [typed, setTyped] = useState<string | null>(null);
  const take = () => {
    if (typed === null || typed === text) return;
    onFilter(typed.trim() === '' ? null : { column: column.key, op: 'contains', text: typed.trim() });
    setTyped(null);
  };
  return (
    <>
      contains{' '}
      <input
        className="sentence-field"
        aria-label={`${spoken(column)} contains`}
        size={Math.max(6, (typed ?? text).length)}
        maxLength={200}
        value={typed ?? text}
        onChange={(event) => setTyped(event.target.value)}
        onBlur={take}
        onKeyDown={(event) => {
          if (event.key === 'Enter') take();
          if (event.key === 'Escape') setTyped(null);
        }}
      />
    </>
  );
}

function SortAndColumns({ view, columns, onView }: Pick<FilterSentenceProps, 'view' | 'columns' | 'onView'>) {
  const shown = shownColumns(columns, view);
  const sorts = columns.filter((column) => column.sort);
  const options = [
    { value: '', label: 'sheet order' },
    ...sorts.flatMap((column) => {
      const views = [true, false].map((descending) => ({ ...view, sort: { column: column.key, descending } }));
      return views.map((one) => ({
        value: `${one.sort.descending ? '-' : ''}${one.sort.column}`,
        label: sortWords(one, columns),
      }));
    }),
  ];
  const sorted = view.sort ? `${view.sort.descending ? '-' : ''}${view.sort.column}` : '';
  const sort = (value: string) => {
    const descending = value.startsWith('-');
    onView({ ...view, sort: value === '' ? null : { column: descending ? value.slice(1) : value, descending } });
  };
  return (
    <p className="sentence-tools choice-list-right">
      sorted by <Choice label="sorted by" options={options} value={[sorted]} onChange={([value]) => sort(value ?? '')} />
      <span className="sentence-rule" />
      <Choice
        label="columns"
        several
        text={`${shown.length} columns`}
        options={columns.map((column) => ({ value: column.key, label: column.label }))}
        value={shown.map((column) => column.key)}
        onChange={(keys) => {
          const order = columns.map((column) => column.key).filter((key) => keys.includes(key));
          if (order.length > 0) onView({ ...view, columns: order });
        }}
      />
    </p>
  );
}

const option = (value: string) => ({ value, label: value });
const verdicts: readonly Option[] = ['over', 'near', 'within', 'not checked'].map(option);
const severities: readonly Option[] = ['error', 'warning', 'note'].map(option);
