import type { Draft } from '@/lib/intake/draft';
import { idKey } from '@/lib/intake/ids';
import { oneRowAKey } from '@/lib/intake/keyed-rows';
import type { ProblemList } from '@/lib/intake/problem-list';
import { isBuiltIn, type Reader, type Reading } from '@/lib/intake/reader';
import { level, type RowsByFrame } from '@/lib/intake/rows-by-frame';
import { placeOf, type Row, rawCell, type Table } from '@/lib/intake/table';
import { meansOff, readWord, wordKey } from '@/lib/intake/words';
import type { Restraint } from '@/lib/model/frame';
import * as say from '@/lib/problems/wording';

const directions = ['ux', 'uy', 'rz'] as const;
const words = ['fixed', 'free'] as const;

/** Rows whose numbers are refused because the sheet holds only 0 and 1: which of them is "fixed" nobody can say. */
export interface ZerosAndOnes {
  readonly row: Row;
  readonly column: (typeof directions)[number];
}

/**
 * The first cell of a Supports sheet whose number cells are all 0 or 1, or null. Zeros alone beside words (fixed, free)
 * are read as free: there 0 has one meaning.
 */
export function zerosAndOnes(table: Table | undefined): ZerosAndOnes | null {
  let first: ZerosAndOnes | null = null;
  let ones = false;
  let said = false;
  for (const row of table?.rows ?? []) {
    for (const column of directions) {
      const cell = rawCell(row, column);
      if (!cell) continue;
      const text = cell.text.trim();
      if (readWord(text, words)) said = true;
      if (!/^[+-]?[\d.,]/.test(text)) continue;
      if (!/^[01]([.,]0*)?$/.test(text)) return null;
      first ??= { row, column };
      if (text.startsWith('1')) ones = true;
    }
  }
  return ones || !said ? first : null;
}

export function readSupports(draft: Draft, rows: RowsByFrame, refused: ZerosAndOnes | null): void {
  const { reader, problems } = draft.batch;
  const { reading } = draft;
  const keyOf = (row: Row): { id: string; key: string } | undefined => {
    if (!reader.keeps(row, reading)) return undefined;
    const id = reader.needId(row, 'node', reading);
    return id === undefined ? undefined : { id, key: idKey(id) };
  };
  const mine = rows.for(draft.entry).filter(({ row, level: at }) => {
    if (at !== level.all) return true;
    const known = draft.nodeIndex.has(idKey(rawCell(row, 'node')?.text ?? ''));
    if (known) rows.fits(row);
    return known;
  });
  const kept = oneRowAKey(mine, keyOf, (row, first, same) => {
    const fault = same
      ? ({ code: 'repeated-row', message: say.repeatedRow(first.raw.row) } as const)
      : ({ code: 'conflicting-row', message: say.conflictingRow('node', first.raw.row) } as const);
    reader.tell(row, 'node', fault, reading);
  });
  if (kept.length < mine.length) draft.supportTrouble = mine.length > 0 && kept.length === 0;
  for (const { row, id, key } of kept) {
    const node = draft.nodeIndex.get(key);
    const before = draft.supports.length;
    readSupport(node, row, id);
    if (draft.supports.length === before) draft.supportTrouble = true;
  }
  function readSupport(node: number | undefined, row: Row, id: string): void {
    if (node === undefined) {
      // a frame without any nodes has been told so
      if (draft.nodeIndex.size === 0) return;
      reader.tell(row, 'node', { code: 'unknown-node', message: say.unknownNode(id, draft.entry.id) }, reading);
      return;
    }
    if (refused && tellRefused(row, refused, problems, reading)) return;
    const [ux, uy, rz] = directions.map((name) => restraint(row, name, reader, reading));
    const angle = reader.number(row, 'angle', reading);
    if (!meansOff(rawCell(row, 'pushes only')?.text ?? '') && reader.yesNo(row, 'pushes only', reading)) {
      reader.tell(row, 'pushes only', { code: 'not-supported', message: say.columnNotSupported('pushes only') }, reading);
    }
    if (node < 0 || ux === undefined || uy === undefined || rz === undefined || angle === undefined) return;
    draft.supports.push({ node, ux, uy, rz, angle_rad: angle ?? 0 });
    draft.supportRows.push(row);
  }
}

function tellRefused(row: Row, { row: at, column }: ZerosAndOnes, problems: ProblemList, reading: Reading): boolean {
  if (isBuiltIn(row) || !directions.some((name) => /^[01]/.test(rawCell(row, name)?.text ?? ''))) return false;
  problems.add(placeOf(at, column), { code: 'unknown-word', message: say.zerosAndOnes() }, reading.frame);
  return true;
}

function restraint(row: Row, name: (typeof directions)[number], reader: Reader, reading: Reading): Restraint | undefined {
  const text = rawCell(row, name)?.text ?? '';
  if (/^(pin|pinned|roller|hinge|hinged)$/.test(wordKey(text))) {
    reader.tell(row, name, { code: 'unknown-word', message: say.supportKind(text) }, reading);
    return undefined;
  }
  const value = reader.wordOrNumber(row, name, words, reading);
  if (value === undefined) return undefined;
  if (value === null || value === 0) return 'free';
  if (typeof value === 'number' && value < 0) {
    reader.tell(row, name, { code: 'not-positive', message: say.negativeSpring(text) }, reading);
    return undefined;
  }
  return value;
}
