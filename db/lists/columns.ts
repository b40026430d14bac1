/** How each table of lib/tables/view.ts stands in the database: its columns in SQL, its keys and its indexes. */
import { noneHigh, noneLow } from '@/db/absent';
import type { Tallied } from '@/db/lists/tally';
import { verdictOf } from '@/db/verdict-rank';
import type { Cell, TableName } from '@/lib/tables/view';

export interface ListColumn {
  /** Expression on the table's alias t. */
  readonly sql: string;
  /** What a stored value reads as. */
  readonly read: (value: string | number | null) => Cell;
  /** What a filter's word is stored as; undefined = no row can have it. */
  readonly stored: (word: string) => string | number | undefined;
}

export interface ListIndex {
  readonly name: string;
  /** Column held to one value, or null. */
  readonly by: string | null;
  /** Column that it is then sorted by, null = sheet order. */
  readonly sort: string | null;
  /** How `sort` stands in it, while the key that ends it ascends. */
  readonly direction: 'asc' | 'desc';
  /**
   * How it is one where it is none of the table's own: `result`, by way of frame_result, a row a frame and result;
   * `peak`, by way of frame_peak: the largest and smallest of each frame say which frames a page's rows are of.
   */
  readonly way: 'own' | 'result' | 'peak';
}

export interface ListTable {
  readonly table: string;
  /** The primary key behind `revision`: sheet order. */
  readonly key: readonly string[];
  readonly columns: Readonly<Record<string, ListColumn>>;
  readonly indexes: readonly ListIndex[];
  readonly tally: Tallied | null;
  /** The index of the row's frame. */
  readonly frame: string;
}

const none = (value: string | number | null): Cell => (value === '' || value === noneLow || value === noneHigh ? null : value);
const text = (sql: string): ListColumn => ({ sql, read: none, stored: (word) => word });
const number = (sql: string): ListColumn => ({
  sql,
  read: none,
  stored: (word) => (word.trim() !== '' && Number.isFinite(Number(word)) ? Number(word) : undefined),
});
const words = (sql: string, list: readonly string[]): ListColumn => ({
  sql,
  read: (value) => list[Number(value)] ?? null,
  stored: (word) => (list.includes(word) ? list.indexOf(word) : undefined),
});
const verdict: ListColumn = {
  ...words('t.verdict', ['within', 'near', 'not checked', 'over']),
  read: (value) => verdictOf(Number(value)),
};
const kind = words('t.kind', ['case', 'combination']);
const frameId = text('(select f.frame_id from revision_frame f where f.revision = t.revision and f.frame = t.frame)');

const index = (name: string, by: string | null, sort: string | null, direction: 'asc' | 'desc' = 'asc'): ListIndex => ({
  name, by, sort, direction, way: 'own',
}); // prettier-ignore
const byResult: readonly ListIndex[] = [
  { ...index('frame_result', null, 'result'), way: 'result' },
  { ...index('frame_result', 'result', null), way: 'result' },
];
const peak = (sort: string): ListIndex => ({ ...index(`frame_peak_${sort}`, null, sort, 'desc'), way: 'peak' });

export const listTables: Readonly<Record<TableName, ListTable>> = {
  frames: {
    table: 'revision_frame',
    key: ['frame'],
    frame: 't.frame',
    tally: null,
    columns: {
      frame: text('t.frame_id'),
      title: text('t.title'),
      group: text('t.group_name'),
      family: text('t.family'),
      check: text('t.check_name'),
      subject: text("case when t.check_name <> '' then coalesce(t.subject, t.frame_id) end"),
      section: text('t.section'),
      combination: text('t.combination'),
      ratio: number('t.ratio'),
      verdict,
      criticalLoadFactor: number('t.critical_load_factor'),
      mass: number('t.mass'),
      count: number('t.count'),
      status: text('t.status'),
      reason: text('t.reason'),
    },
    indexes: [
      index('revision_frame_ratio', null, 'ratio', 'desc'),
      index('revision_frame_verdict', null, 'verdict', 'desc'),
      index('revision_frame_critical', null, 'criticalLoadFactor'),
      index('revision_frame_mass', null, 'mass', 'desc'),
      index('revision_frame_verdict_ratio', 'verdict', 'ratio', 'desc'),
      index('revision_frame_verdict', 'verdict', null),
      index('revision_frame_group', 'group', 'ratio', 'desc'),
      index('revision_frame_family', 'family', 'ratio', 'desc'),
      index('revision_frame_check', 'check', 'ratio', 'desc'),
      index('revision_frame_section', 'section', 'ratio', 'desc'),
      index('revision_frame_combination', 'combination', 'ratio', 'desc'),
      index('revision_frame_status', 'status', null),
    ],
  },
  members: {
    table: 'member_row',
    key: ['frame', 'member'],
    frame: 't.frame',
    tally: 'members',
    columns: {
      frame: frameId,
      member: text('t.member_id'),
      role: text('t.role'),
      section: text('t.section'),
      group: text('t.group_name'),
      length: number('t.length'),
      combination: text('t.combination'),
      N: number('t.n'),
      V: number('t.v'),
      M: number('t.m'),
      at: number('t.at'),
      deflection: number('t.deflection'),
      check: text('t.check_name'),
      ratio: number('t.ratio'),
      verdict,
    },
    indexes: [
      index('member_row_ratio', null, 'ratio', 'desc'),
      index('member_row_verdict', null, 'verdict', 'desc'),
      index('member_row_role', null, 'role'),
      index('member_row_section', null, 'section'),
      ...['verdict', 'role', 'section', 'group', 'check'].flatMap((by) => [
        index(`member_row_${by}_ratio`, by, 'ratio', 'desc'),
        index(`member_row_${by}`, by, null),
      ]),
    ],
  },
  checks: {
    table: 'check_row',
    key: ['frame', 'ordinal'],
    frame: 't.frame',
    tally: 'checks',
    columns: {
      frame: frameId,
      subject: text(`coalesce(t.subject, ${frameId.sql})`),
      role: text('t.role'),
      section: text('t.section'),
      check: text('t.check_name'),
      combination: text('t.combination'),
      at: number('t.at'),
      face: text('t.face'),
      value: number('t.value'),
      limit: number('t.limit_value'),
      ratio: number('t.ratio'),
      verdict,
      reason: text('t.reason'),
      reference: text('t.reference'),
      quantity: text('t.quantity'),
    },
    indexes: [
      index('check_row_ratio', null, 'ratio', 'desc'),
      index('check_row_verdict', null, 'verdict', 'desc'),
      index('check_row_check', null, 'check'),
      index('check_row_verdict', 'verdict', null),
      index('check_row_check', 'check', null),
      ...['verdict', 'check'].map((by) => index(`check_row_${by}_ratio`, by, 'ratio', 'desc')),
      ...['role', 'section', 'combination'].map((by) => index(`check_row_${by}`, by, 'ratio', 'desc')),
    ],
  },
  reactions: {
    table: 'reaction_row',
    key: ['frame', 'result', 'support'],
    frame: 't.frame',
    tally: 'reactions',
    columns: {
      frame: frameId,
      node: text('t.node'),
      result: text('t.result_name'),
      kind,
      fx: number('t.fx'),
      fy: number('t.fy'),
      mz: number('t.mz'),
    },
    indexes: [...byResult, ...['fx', 'fy', 'mz'].map(peak)],
  },
  movements: {
    table: 'movement_row',
    key: ['frame', 'result', 'node_index'],
    frame: 't.frame',
    tally: 'movements',
    columns: {
      frame: frameId,
      node: text('t.node'),
      place: text('t.place'),
      result: text('t.result_name'),
      kind,
      ux: number('t.ux'),
      uy: number('t.uy'),
      rz: number('t.rz'),
    },
    indexes: [...byResult, ...['ux', 'uy', 'rz'].map(peak)],
  },
  problems: {
    table: 'problem',
    key: ['ordinal'],
    frame: "(select f.frame from revision_frame f where f.revision = t.revision and f.frame_id = json_extract(t.frames, '$[0]'))",
    tally: null,
    columns: {
      severity: words('t.severity', ['error', 'warning', 'note']),
      code: text('t.code'),
      sheet: text('t.sheet'),
      cell: text('t.cell'),
      found: text('t.found'),
      message: text('t.message'),
      frames: { ...text('t.frames'), read: (value) => frameList(String(value)) },
    },
    indexes: [
      index('problem_severity', null, 'severity'),
      index('problem_code', null, 'code'),
      index('problem_severity', 'severity', null),
      index('problem_code', 'code', null),
      index('problem_sheet', 'sheet', null),
    ],
  },
};

/** The first twenty names, and how many more there are. */
function frameList(json: string): string | null {
  const frames = JSON.parse(json) as string[];
  if (frames.length === 0) return null;
  const more = frames.length - 20;
  return frames.slice(0, 20).join(', ') + (more > 0 ? ` and ${more} more` : '');
}

/** A family's parameter is shown, filtered and sorted as `p:NAME`. */
export const parameterOf = (column: string): string | null => (column.startsWith('p:') ? column.slice(2) : null);

/** @throws {RangeError} for a column that the table does not have */
export function columnOf(table: TableName, column: string): ListColumn {
  const found = listTables[table].columns[column];
  if (!found) throw new RangeError(`Expected a column of ${table}, got ${column}`);
  return found;
}
