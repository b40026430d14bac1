/** Which cell of the sheets gives a member its section: its own, a family's template, a variant's parameter or that parameter's default. */
import type { FrameEntry } from '@/lib/intake/batch';
import { cellAddress } from '@/lib/intake/files/cell-address';
import { evaluate, type Parameters } from '@/lib/intake/expressions/evaluate';
import { Expressions, isExpression } from '@/lib/intake/expressions/expression';
import type { Node } from '@/lib/intake/expressions/parse';
import { ExpressionFault } from '@/lib/intake/expressions/tokens';
import { idKey } from '@/lib/intake/ids';
import type { FrameSeen } from '@/lib/intake/read-input';
import { type Row, rawCell } from '@/lib/intake/table';
import { wordKey } from '@/lib/intake/words';

export interface SectionSource {
  /** The sheet's place, its row (1-based) and column (0-based). */
  readonly part: number;
  readonly row: number;
  readonly column: number;
  /** "Variants E4": how a person finds it. */
  readonly cell: string;
  /** The parameter whose cell it is; null = the section column of Members. */
  readonly parameter: string | null;
  /** A row of Members for several frames (a family's or `*`), of which a row for one frame takes the place. */
  readonly template: Row | null;
}

/** One text for sources that are one cell. */
export const sourceKey = ({ part, row, column }: SectionSource): string => `${part} ${row} ${column}`;

const expressions = new Expressions();

/** @param member its place in the frame  @returns why its section cannot be changed by a cell, as the end of a sentence */
export function sectionSource(seen: FrameSeen, member: number): SectionSource | { readonly why: string } {
  const row = seen.memberRows[member];
  const cell = row && rawCell(row, 'section');
  const column = row?.part.byName.get('section');
  if (!row || !cell || !column) return { why: 'its row names no section' };
  if (cell.kind === 'text' && isExpression(cell.text)) return ofExpression(seen, cell.text);
  const shared = idKey(rawCell(row, 'frame')?.text ?? '') !== seen.entry.key;
  return at(row, column.index, null, shared ? row : null);
}

function at(row: Row, column: number, parameter: string | null, template: Row | null): SectionSource {
  const { order, name } = row.part.raw;
  const cell = `${name} ${cellAddress(row.raw.row, column)}`;
  return { part: order, row: row.raw.row, column, cell, parameter, template };
}

function ofExpression({ entry, batch }: FrameSeen, text: string): SectionSource | { readonly why: string } {
  const { node } = expressions.read(text);
  const { variant } = entry;
  if (!node || !variant) return { why: `it is worked out by ${text}` };
  const leaf = chosen(node, entry.reading.parameters ?? new Map());
  if (leaf?.kind === 'value') {
    return { why: `it is written in the expression ${text} of the family ${variant.family.name}. Change the family’s sheets` };
  }
  if (leaf?.kind !== 'name') return { why: `it is worked out by ${text}. Change the family’s sheets` };
  const parameter = variant.family.parameters.get(wordKey(leaf.name));
  if (parameter?.quantity !== 'section') {
    return { why: `it is the parameter ${leaf.name}, which is a ${parameter?.quantity ?? 'word'} and not a section` };
  }
  return parameterCell(entry, parameter.key, parameter.name) ?? defaultCell(batch, variant.family.key, parameter);
}

/** The name or value that an expression comes to, by the branch that a variant takes; null where it is neither. */
function chosen(node: Node, parameters: Parameters): Node | null {
  if (node.kind === 'name' || node.kind === 'value') return node;
  if (node.kind !== 'choice') return null;
  try {
    return chosen(evaluate(node.test, parameters) === true ? node.yes : node.no, parameters);
  } catch (fault) {
    if (fault instanceof ExpressionFault) return null;
    throw fault;
  }
}

/** The variant's own cell of a parameter, filled or blank; null where Variants has no such column. */
function parameterCell({ variant }: FrameEntry, key: string, name: string): SectionSource | null {
  if (!variant) return null;
  const { row } = variant;
  const own = row.part.columns.filter((column) => column.known === null);
  const column = own.find(({ text }) => wordKey(text) === key) ?? own.find((one) => wordKey(one.name) === key);
  return column ? at(row, column.index, name, null) : null;
}

/** The default of a parameter that no variant gives: a cell of Families. */
function defaultCell(
  batch: FrameSeen['batch'],
  family: string,
  { key, name }: { readonly key: string; readonly name: string },
): SectionSource | { readonly why: string } {
  const row = batch.tables
    .get('Families')
    ?.rows.find(
      (each) => idKey(rawCell(each, 'family')?.text ?? '') === family && wordKey(rawCell(each, 'parameter')?.text ?? '') === key,
    );
  const column = row?.part.byName.get('default');
  if (!row || !column) return { why: `the parameter ${name} stands on no sheet. Give Variants a column ${name}` };
  return at(row, column.index, name, null);
}
