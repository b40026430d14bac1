'use client';
import { usePathname, useSearchParams } from 'next/navigation';
import { useCallback, useMemo } from 'react';
import { viewFromParams, viewToSearch } from '@/lib/api/view-address';
import type { TableName, View } from '@/lib/tables/view';

export interface PageAt {
  readonly after?: string;
  readonly before?: string;
}

/** A table's view, kept in the address and nowhere else; the page of rows stands beside it. */
export function useView(table: TableName) {
  const path = usePathname();
  const params = useSearchParams();
  const text = params.toString();
  const view = useMemo(() => viewFromParams(table, new URLSearchParams(text)), [table, text]);
  const at = useMemo((): PageAt => {
    const read = new URLSearchParams(text);
    return { after: read.get('after') ?? undefined, before: read.get('before') ?? undefined };
  }, [text]);
  const go = useCallback((to: View) => window.history.pushState(null, '', `${path}${viewToSearch(to)}`), [path]);
  const goPage = useCallback(
    (to: PageAt) => {
      const search = viewToSearch(view);
      const [key, cursor] = to.after === undefined ? ['before', to.before ?? ''] : ['after', to.after];
      window.history.pushState(null, '', `${path}${search}${search === '' ? '?' : '&'}${key}=${encodeURIComponent(cursor)}`);
    },
    [path, view],
  );
  return { view, at, go, goPage };
}
