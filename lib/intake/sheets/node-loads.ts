import type { Draft } from '@/lib/intake/draft';
import { idKey } from '@/lib/intake/ids';
import { contentKey } from '@/lib/intake/keyed-rows';
import { level, type LeveledRow, type RowsByFrame } from '@/lib/intake/rows-by-frame';
import { type Row, rawCell } from '@/lib/intake/table';
import * as say from '@/lib/problems/wording';

/** A frame's rows of a load sheet: those that its `when` keeps; of rows for all frames, those whose case and part exist here. */
export function loadRows(draft: Draft, rows: RowsByFrame, part: 'node' | 'member'): Row[] {
  const { reader } = draft.batch;
  const index = part === 'node' ? draft.nodeIndex : draft.memberIndex;
  const kept: Row[] = [];
  const seen = new Map<string, Row>();
  const mine = rows.for(draft.entry);
  for (const { row, level: at } of mine) {
    if (at === level.all) {
      if (!index.has(idKey(rawCell(row, part)?.text ?? ''))) continue;
      const key = idKey(rawCell(row, 'case')?.text ?? '');
      if (!draft.cases.byKey.has(key) && draft.batch.cases.names.has(key)) continue;
      rows.fits(row);
    }
    if (!reader.keeps(row, draft.reading)) continue;
    if (mine.length > 1) repeated(draft, { row, level: at }, seen);
    kept.push(row);
  }
  return kept;
}

/** Loads all add; an identical row is likely a slip. */
function repeated(draft: Draft, { row, level: at }: LeveledRow, seen: Map<string, Row>): void {
  const key = `${at}${contentKey(row)}`;
  const first = seen.get(key);
  if (!first) seen.set(key, row);
  else draft.batch.reader.tell(row, row.part.columns[0]?.known ?? 'frame', { code: 'repeated-row', message: say.repeatedLoad(first.raw.row) }, draft.reading); // prettier-ignore
}

/** The frame's case that a row names; undefined where it has none (told). */
export function caseOf(draft: Draft, row: Row): number | undefined {
  const { reader, cases } = draft.batch;
  const id = reader.needId(row, 'case', draft.reading);
  if (id === undefined) return undefined;
  const index = draft.cases.byKey.get(idKey(id));
  if (index !== undefined) return index;
  // its own row in Load cases is wrong and has said so
  if (!draft.cases.sound && cases.names.has(idKey(id))) return undefined;
  const message = cases.names.has(idKey(id))
    ? say.caseNotHere(id, draft.entry.id)
    : say.unknownCase(id, [...cases.names.values()]);
  reader.tell(row, 'case', { code: 'unknown-case', message }, draft.reading);
  return undefined;
}

/** The frame's node that a row names; −1 where the node's own row is wrong; undefined where there is none (told). */
export function nodeOf(draft: Draft, row: Row, column: string): number | undefined {
  const { reader } = draft.batch;
  const id = reader.needId(row, column, draft.reading);
  if (id === undefined) return undefined;
  const index = draft.nodeIndex.get(idKey(id));
  // a frame without any nodes has been told so
  if (index === undefined && draft.nodeIndex.size > 0)
    reader.tell(row, column, { code: 'unknown-node', message: say.unknownNode(id, draft.entry.id) }, draft.reading);
  return index;
}

export function readNodeLoads(draft: Draft, rows: RowsByFrame, withoutRotation: ReadonlySet<number>): void {
  const { reader } = draft.batch;
  for (const row of loadRows(draft, rows, 'node')) {
    const loadCase = caseOf(draft, row);
    const node = nodeOf(draft, row, 'node');
    const Fx = reader.number(row, 'Fx', draft.reading);
    const Fy = reader.number(row, 'Fy', draft.reading);
    const Mz = reader.number(row, 'Mz', draft.reading);
    if (loadCase === undefined || node === undefined || node < 0) continue;
    if (Fx === undefined || Fy === undefined || Mz === undefined) continue;
    if (Fx === null && Fy === null && Mz === null) {
      const at = (['Fx', 'Fy', 'Mz'] as const).find((name) => row.part.byName.has(name)) ?? 'Fx';
      reader.tell(row, at, { code: 'default-used', message: say.loadsNothing() }, draft.reading);
    }
    if (Mz && withoutRotation.has(node)) {
      const message = say.momentOnPins(draft.nodes[node]?.id ?? '');
      reader.tell(row, 'Mz', { code: 'mechanism', message }, draft.reading);
      continue;
    }
    draft.nodeLoads.push({ case: loadCase, node, Fx_N: Fx ?? 0, Fy_N: Fy ?? 0, Mz_Nm: Mz ?? 0 });
  }
}
