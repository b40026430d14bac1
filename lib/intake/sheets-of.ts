/** For tests: sheets written as arrays, read as if they stood in a workbook (or a CSV set). */
import type { RawCell, RawSheet } from '@/lib/intake/files/raw-sheet';
import { numberAsId } from '@/lib/intake/ids';
import type { Intake } from '@/lib/intake/intake';
import { type IntakeOptions, readInput } from '@/lib/intake/read-input';
import type { Problem } from '@/lib/problems/problem';

export type TestCell =
  | string
  | number
  | boolean
  | null
  | { readonly date: string }
  | { readonly error: string }
  | { readonly formula: string }
  | { readonly merged: string; readonly value: string | number };
export type TestSheets = Record<string, TestCell[][]>;

function rawCell(cell: TestCell | undefined): RawCell | null {
  if (cell === null || cell === undefined || cell === '') return null;
  if (typeof cell === 'string') return { kind: 'text', text: cell };
  if (typeof cell === 'number') return { kind: 'number', value: cell, text: numberAsId(cell) };
  if (typeof cell === 'boolean') return { kind: 'boolean', value: cell, text: cell ? 'TRUE' : 'FALSE' };
  if ('date' in cell) return { kind: 'date', text: cell.date, iso: cell.date };
  if ('error' in cell) return { kind: 'error', text: cell.error };
  if ('formula' in cell) return { kind: 'formula', text: cell.formula };
  const master = rawCell(cell.value);
  return master && { ...master, mergedFrom: cell.merged };
}

function rawSheets(sheets: TestSheets, kind: 'xlsx' | 'csv' = 'xlsx'): RawSheet[] {
  return Object.entries(sheets).map(([name, rows], order) => {
    const raw = rows.flatMap((cells, i) =>
      cells.some((c) => c !== null && c !== '') ? [{ row: i + 1, cells: cells.map(rawCell) }] : [],
    );
    const file = kind === 'xlsx' ? 'batch.xlsx' : `${name}.csv`;
    return { name, parts: [{ name, file, order, decimalMark: null, rows: raw }] };
  });
}

const identity = { name: 'batch.xlsx', sha256: '0'.repeat(64), files: [] };

export function readSheets(sheets: TestSheets, options: IntakeOptions & { csv?: boolean } = {}): Intake {
  return readInput({ sheets: rawSheets(sheets, options.csv ? 'csv' : 'xlsx'), problems: [], identity }, options);
}

/** `error unknown-node Members!D3 F1`: a problem in one line, for comparing whole lists. */
function line(problem: Problem): string {
  return `${problem.severity} ${problem.code} ${problem.sheet}!${problem.cell ?? problem.column ?? '–'} ${problem.frames.join(',') || '–'}`;
}

export function lines(intake: Intake): string[] {
  return intake.problems.map(line);
}

/** Two sound frames: a propped cantilever F1 and a portal F2, metric, with every usual sheet. */
export function sound(): Record<string, TestCell[][]> & Record<'Setup' | 'Nodes' | 'Members' | 'Supports', TestCell[][]> {
  return {
    Setup: [
      ['setting', 'value'],
      ['material', 'S275'],
      ['deflection ratio', 250],
      ['sway ratio', 'none'],
    ],
    Nodes: [
      ['frame', 'node', 'x [m]', 'y [m]', 'place'],
      ['F1', 'A', 0, 0, null],
      ['F1', 'B', 6, 0, 'tip'],
      ['F2', 'A', 0, 0, 'base'],
      ['F2', 'B', 0, 4, 'eaves'],
      ['F2', 'C', 8, 4, 'eaves'],
      ['F2', 'D', 8, 0, 'base'],
    ],
    Members: [
      ['frame', 'member', 'start', 'end', 'section', 'role'],
      ['F1', 'AB', 'A', 'B', 'IPE 300', 'beam'],
      ['F2', 'AB', 'A', 'B', 'HE 200 A', 'column'],
      ['F2', 'BC', 'B', 'C', 'IPE 300', 'beam'],
      ['F2', 'CD', 'C', 'D', 'HE 200 A', 'column'],
    ],
    Supports: [
      ['frame', 'node', 'ux', 'uy', 'rz'],
      ['F1', 'A', 'fixed', 'fixed', 'fixed'],
      ['F1', 'B', null, 'fixed', null],
      ['F2', 'A', 'fixed', 'fixed', 'free'],
      ['F2', 'D', 'fixed', 'fixed', 'free'],
    ],
    'Load cases': [
      ['case', 'kind', 'self weight'],
      ['dead', 'dead', 1],
      ['wind', 'wind', null],
    ],
    'Node loads': [
      ['frame', 'case', 'node', 'Fx [kN]', 'Fy [kN]', 'Mz [kN·m]'],
      ['F2', 'wind', 'B', 10, null, null],
    ],
    'Member loads': [
      ['frame', 'case', 'member', 'load', 'axes', 'direction', 'value [kN/m]', 'end value', 'from', 'to'],
      ['F1', 'dead', 'AB', 'distributed', null, null, -5, null, null, null],
      ['F2', 'dead', 'BC', 'distributed', 'global', 'y', -8, null, null, null],
    ],
    Combinations: [
      ['combination', 'purpose', 'dead', 'wind'],
      ['C1', 'strength', 1, 1],
      ['S1', 'service', 1, null],
    ],
  };
}

/** The sound sheets with cells put in: `{ 'Members!E3': 'IPE 999' }`, and whole rows added with `Members+`. */
export function withCells(changes: Record<string, TestCell | TestCell[]>, base: TestSheets = sound()): TestSheets {
  for (const [where, value] of Object.entries(changes)) {
    const added = /^(.+)\+\d*$/.exec(where)?.[1];
    if (added !== undefined) {
      (base[added] ??= []).push(value as TestCell[]);
      continue;
    }
    const [, sheet = '', letters = 'A', row = '1'] = /^(.+)!([A-Z]+)(\d+)$/.exec(where) ?? [];
    const column = [...letters].reduce((sum, c) => sum * 26 + c.charCodeAt(0) - 64, 0) - 1;
    const cells = (base[sheet] ??= [])[Number(row) - 1];
    if (!cells) throw new RangeError(`Expected row ${row} on ${sheet}`);
    while (cells.length <= column) cells.push(null);
    cells[column] = value as TestCell;
  }
  return base;
}
