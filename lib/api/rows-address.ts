import type { View } from '@/lib/tables/view';
import { api } from './addresses';

/** Rows of a table on one page of the screen. */
export const rowsAtOnce = 100;

/** Where a page of rows is read: the same for the server's first page and for the pages after it. */
export function rowsAddress(
  batch: number,
  letter: string,
  view: View,
  at: { readonly after?: string; readonly before?: string },
): string {
  const cursor: Readonly<Record<string, string>> =
    at.after !== undefined ? { after: at.after } : at.before !== undefined ? { before: at.before } : {};
  return api.table(batch, letter, view, { ...cursor, size: rowsAtOnce });
}
