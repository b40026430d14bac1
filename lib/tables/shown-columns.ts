/** Which columns a view shows, in its order: those it names, else those a table shows unless chosen otherwise. */
import { tables, type Column, type View } from '@/lib/tables/view';

/** A family's parameter, which any table of frames may show as `p:NAME`. */
export interface ParameterColumn {
  readonly name: string;
  readonly quantity: string;
  readonly numeric: boolean;
}

export function shownColumns(view: Pick<View, 'table' | 'columns'>, parameters: readonly ParameterColumn[] = []): Column[] {
  const all = tables[view.table];
  if (view.columns === null) return all.filter((column) => column.shown === true);
  return view.columns.flatMap((key) => all.find((column) => column.key === key) ?? parameterColumn(key, parameters) ?? []);
}

function parameterColumn(key: string, parameters: readonly ParameterColumn[]): Column | undefined {
  if (!key.startsWith('p:')) return undefined;
  const found = parameters.find((one) => one.name.toLowerCase() === key.slice(2).toLowerCase());
  if (found === undefined) return undefined;
  return { key, label: found.name, kind: found.numeric ? 'number' : 'text', filter: true };
}
