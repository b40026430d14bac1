/**
 * What a table of results can show, filter and sort: one description for the address, the query, the page and the export.
 * Values are SI in the database and in the address; units are chosen at the formatter (lib/units).
 */
import { z } from 'zod';

export type ColumnKind = 'text' | 'id' | 'number' | 'ratio' | 'verdict' | 'severity';

/** Quantities that a column may be in, for its unit under the head. */
export type ColumnQuantity =
  | 'length' | 'displacement' | 'force' | 'moment' | 'stress' | 'rotation' | 'mass' | 'number' | 'byCheck'
  | 'angle' | 'lineLoad' | 'areaLoad' | 'springTranslation' | 'springRotation' | 'temperature'; // prettier-ignore

export interface Column {
  readonly key: string;
  readonly label: string;
  readonly kind: ColumnKind;
  readonly quantity?: ColumnQuantity;
  /** Digits after the point for a number. */
  readonly decimals?: number;
  /** Shown unless chosen otherwise. */
  readonly shown?: boolean;
  /** Offered as filter: text and verdict by a list of values, numbers by at least / at most. */
  readonly filter?: boolean;
  /** Offered for sorting (each has its index). */
  readonly sort?: boolean;
}

export const tableNames = ['frames', 'members', 'checks', 'reactions', 'movements', 'problems'] as const;
export type TableName = (typeof tableNames)[number];

const frame: Column = { key: 'frame', label: 'Frame', kind: 'id', shown: true, filter: true, sort: true };
const verdict: Column = { key: 'verdict', label: 'Verdict', kind: 'verdict', shown: true, filter: true, sort: true };
const ratio: Column = { key: 'ratio', label: 'Ratio', kind: 'ratio', quantity: 'number', shown: true, filter: true, sort: true };
const n = (key: string, label: string, quantity: ColumnQuantity, decimals: number, more: Partial<Column> = {}): Column => ({
  key, label, kind: 'number', quantity, decimals, shown: true, ...more,
}); // prettier-ignore
const t = (key: string, label: string, more: Partial<Column> = {}): Column => ({
  key,
  label,
  kind: 'text',
  shown: true,
  ...more,
});

export const tables: Readonly<Record<TableName, readonly Column[]>> = {
  frames: [
    frame,
    t('title', 'Title', { shown: false }),
    t('group', 'Group', { filter: true }),
    t('family', 'Family', { filter: true, shown: false }),
    t('check', 'Governs', { filter: true }),
    t('subject', 'Where'),
    t('section', 'Section', { filter: true }),
    t('combination', 'Comb.', { filter: true }),
    ratio,
    verdict,
    n('criticalLoadFactor', 'α cr', 'number', 2, { filter: true, sort: true }),
    n('mass', 'Mass', 'mass', 0, { sort: true }),
    n('count', 'Number off', 'number', 0, { shown: false }),
    t('status', 'Status', { shown: false, filter: true }),
    t('reason', 'Not checked', { shown: true }),
  ],
  members: [
    frame,
    t('member', 'Member', { kind: 'id' }),
    t('role', 'Role', { filter: true, sort: true }),
    t('section', 'Section', { filter: true, sort: true }),
    t('group', 'Group', { filter: true, shown: false }),
    n('length', 'Length', 'length', 2),
    t('combination', 'Comb.'),
    n('N', 'N', 'force', 1),
    n('V', 'V', 'force', 1),
    n('M', 'M', 'moment', 1),
    n('at', 'at', 'length', 2),
    n('deflection', 'Deflection', 'displacement', 1, { shown: true }),
    t('check', 'Governs', { filter: true }),
    ratio,
    verdict,
  ],
  checks: [
    frame,
    t('subject', 'Where', { kind: 'id' }),
    t('role', 'Role', { filter: true }),
    t('section', 'Section', { filter: true }),
    t('check', 'Check', { filter: true, sort: true }),
    t('combination', 'Comb.', { filter: true }),
    n('at', 'at', 'length', 2),
    t('face', 'Face', { shown: false }),
    n('value', 'Value', 'byCheck', 1),
    n('limit', 'Limit', 'byCheck', 1),
    ratio,
    verdict,
    t('reason', 'Not checked'),
    t('reference', 'Reference', { shown: false }),
  ],
  reactions: [
    frame,
    t('node', 'Support', { kind: 'id', filter: true }),
    t('result', 'Case or comb.', { filter: true, sort: true }),
    t('kind', 'Kind', { filter: true }),
    n('fx', 'Fx', 'force', 1, { sort: true }),
    n('fy', 'Fy', 'force', 1, { sort: true }),
    n('mz', 'Mz', 'moment', 1, { sort: true }),
  ],
  movements: [
    frame,
    t('node', 'Node', { kind: 'id', filter: true }),
    t('place', 'Place', { filter: true }),
    t('result', 'Case or comb.', { filter: true, sort: true }),
    t('kind', 'Kind', { filter: true }),
    n('ux', 'ux', 'displacement', 1, { sort: true }),
    n('uy', 'uy', 'displacement', 1, { sort: true }),
    n('rz', 'rz', 'rotation', 5, { sort: true }),
  ],
  problems: [
    t('severity', 'Kind', { kind: 'severity', filter: true, sort: true }),
    t('code', 'Code', { filter: true, sort: true }),
    t('sheet', 'Sheet', { filter: true }),
    t('cell', 'Cell', { kind: 'id' }),
    t('found', 'Found', { kind: 'id' }),
    t('message', 'What it means, what to do'),
    t('frames', 'Frames'),
  ],
};

/** One filter: any of the values, or a range of numbers; 'contains' for ids. */
const filterSchema = z.discriminatedUnion('op', [
  z.object({ column: z.string().max(60), op: z.literal('in'), values: z.array(z.string().max(200)).min(1).max(200) }),
  z.object({ column: z.string().max(60), op: z.literal('range'), min: z.number().nullable(), max: z.number().nullable() }),
  z.object({ column: z.string().max(60), op: z.literal('contains'), text: z.string().min(1).max(200) }),
]);
export type Filter = z.infer<typeof filterSchema>;

/** `sort` null = sheet order. `parameters` (family parameters by name) may be shown and filtered as `p:NAME`. */
export const viewSchema = z.object({
  table: z.enum(tableNames),
  filters: z.array(filterSchema).max(20),
  sort: z.object({ column: z.string().max(60), descending: z.boolean() }).nullable(),
  columns: z.array(z.string().max(60)).max(60).nullable(),
});
export type View = z.infer<typeof viewSchema>;

export type Cell = string | number | null;
/** A row as the query gives it: SI values by column key, and the keys that links need. */
export interface Row {
  readonly id: string;
  readonly frameIndex: number | null;
  readonly cells: Readonly<Record<string, Cell>>;
}
export interface RowPage {
  readonly rows: readonly Row[];
  /** Rows that fit the filters, and all rows of the table. */
  readonly matching: number;
  readonly total: number;
  /** Opaque keyset cursors of the neighbours, null at the ends. */
  readonly next: string | null;
  readonly previous: string | null;
  readonly totals: Readonly<Record<string, Cell>>;
}
