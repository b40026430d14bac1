'use client';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import Link from 'next/link';
import { useCallback, useState } from 'react';
import { ResultTable } from '@/components/tables/result-table';
import { api, pages } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';
import { rowsAddress } from '@/lib/api/rows-address';
import { listToSearch } from '@/lib/api/view-address';
import { offeredColumns, type ParameterColumn } from '@/lib/tables/shown-columns';
import type { Row, RowPage, TableName } from '@/lib/tables/view';
import type { System } from '@/lib/units/quantity';
import { useView } from './use-view';

interface TableSheetProps {
  readonly batch: number;
  readonly letter: string;
  readonly table: TableName;
  readonly units: System;
  readonly nearLimit: number;
  readonly parameters: readonly ParameterColumn[];
  /** The person may make the next revision from what is shown. */
  readonly mayChange: boolean;
  /** The rows that the server read for the address the page was asked with. */
  readonly first: { readonly address: string; readonly page: RowPage };
}

interface Facets {
  readonly values: Readonly<Record<string, readonly { readonly value: string; readonly count: number }[]>>;
}

/** One of a revision's tables: the view in the address, its rows from the server. */
export function TableSheet({ batch, letter, table, units, nearLimit, parameters, mayChange, first }: TableSheetProps) {
  const { view, at, go, goPage } = useView(table);
  const [facetsWanted, setFacetsWanted] = useState(false);
  const address = rowsAddress(batch, letter, view, at);
  const rows = useQuery({
    queryKey: ['rows', address],
    queryFn: ({ signal }) => request<RowPage>(address, { signal }),
    initialData: address === first.address ? first.page : undefined,
    placeholderData: keepPreviousData,
  });
  const facets = useQuery({
    queryKey: ['facets', batch, letter, table],
    queryFn: ({ signal }) =>
      request<Facets>(api.facets(batch, letter, { ...view, filters: [], sort: null, columns: null }), { signal }),
    enabled: facetsWanted,
  });
  const [columns] = useState(() => offeredColumns(table, parameters));
  // A frame opened from here walks through the frames of this view, in its order; problems stand in no such order.
  const listSearch = table === 'problems' ? '' : listToSearch(view);
  const hrefOf = useCallback(
    (row: Row) => (row.frameIndex === null ? null : `${pages.frame(batch, letter, row.frameIndex + 1)}${listSearch}`),
    [batch, letter, listSearch],
  );
  return (
    <>
      {mayChange && table === 'members' && (
        <p className="change-members no-print">
          <Link className="link" href={pages.change(batch, letter, view)}>
            {view.filters.length === 0 ? 'Change a section' : 'Change the section of these members'}
          </Link>
        </p>
      )}
      <ResultTable
        view={view}
        columns={columns}
        page={rows.data}
        units={units}
        nearLimit={nearLimit}
        loading={rows.isPlaceholderData}
        error={rows.error?.message ?? null}
        facets={facets.data && withLabels(facets.data)}
        onFacets={() => setFacetsWanted(true)}
        onView={go}
        onPage={goPage}
        hrefOf={hrefOf}
        exports={[
          { label: 'CSV', href: api.exported(batch, letter, view, 'csv') },
          { label: 'XLSX', href: api.exported(batch, letter, view, 'xlsx') },
        ]}
      />
    </>
  );
}

function withLabels({ values }: Facets) {
  return Object.fromEntries(
    Object.entries(values).map(([column, list]) => [
      column,
      list.map(({ value, count }) => ({ value, label: value === '' ? '(none)' : value, count })),
    ]),
  );
}
