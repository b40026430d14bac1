/** Which columns a table offers and a view shows, the parameters of the batch's families among them. */
import { tables, type Column, type ColumnQuantity, type TableName, type View } from '@/lib/tables/view';

/** A family's parameter, which tables may show and filter by as `p:NAME`. */
export interface ParameterColumn {
  readonly name: string;
  /** As the Families sheet names it. */
  readonly quantity: string;
  readonly numeric: boolean;
}

/** How the Families sheet names quantities (sheets §3); those of text have none. */
const ofFamilies: Readonly<Record<string, ColumnQuantity>> = {
  length: 'length',
  angle: 'angle',
  force: 'force',
  moment: 'moment',
  'line load': 'lineLoad',
  'area load': 'areaLoad',
  'translation stiffness': 'springTranslation',
  'rotation stiffness': 'springRotation',
  temperature: 'temperature',
  number: 'number',
};

export function parameterQuantity(quantity: string): ColumnQuantity | undefined {
  return ofFamilies[quantity.toLowerCase()];
}

/** Every column a table offers; parameters are shown when they are chosen. */
export function offeredColumns(table: TableName, parameters: readonly ParameterColumn[]): Column[] {
  const withParameters = table === 'frames' || table === 'members' || table === 'checks';
  return [...tables[table], ...(withParameters ? parameters.map(parameterColumn) : [])];
}

/** The columns a view shows, in its order: those it names, else those a table shows unless chosen otherwise. */
export function shownColumns(view: Pick<View, 'table' | 'columns'>, parameters: readonly ParameterColumn[] = []): Column[] {
  const all = offeredColumns(view.table, parameters);
  if (view.columns === null) return all.filter((column) => column.shown === true);
  return view.columns.flatMap((key) => {
    const found = all.find((column) => column.key.toLowerCase() === key.toLowerCase());
    return found === undefined ? [] : { ...found, key };
  });
}

function parameterColumn({ name, quantity, numeric }: ParameterColumn): Column {
  const inUnits = numeric ? parameterQuantity(quantity) : undefined;
  const kind = numeric ? 'number' : 'text';
  return { key: `p:${name}`, label: name, kind, decimals: 3, shown: false, filter: true, ...(inUnits && { quantity: inUnits }) };
}
