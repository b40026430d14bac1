import type { Draft } from '@/lib/intake/draft';
import { caseOf, nodeOf } from '@/lib/intake/sheets/node-loads';
import { idKey } from '@/lib/intake/ids';
import { level, type RowsByFrame } from '@/lib/intake/rows-by-frame';
import { type Row, rawCell } from '@/lib/intake/table';
import * as say from '@/lib/problems/wording';

const along = { dx: 'ux', dy: 'uy', rz: 'rz' } as const;

/** Prescribed movements of supports along their own axes; a second row for one node and case is an error. */
export function readSettlements(draft: Draft, rows: RowsByFrame): void {
  const { reader, cases } = draft.batch;
  const seen = new Map<string, { row: Row; level: number }>();
  for (const { row, level: at } of rows.for(draft.entry)) {
    const caseKey = idKey(rawCell(row, 'case')?.text ?? '');
    if (at === level.all) {
      if (!draft.nodeIndex.has(idKey(rawCell(row, 'node')?.text ?? ''))) continue;
      if (!draft.cases.byKey.has(caseKey) && cases.names.has(caseKey)) continue;
      rows.fits(row);
    }
    if (!reader.keeps(row, draft.reading)) continue;
    const loadCase = caseOf(draft, row);
    const node = nodeOf(draft, row, 'node');
    if (loadCase === undefined || node === undefined) continue;
    const key = `${loadCase}|${node}`;
    const before = seen.get(key);
    if (before && before.level === at) {
      reader.tell(row, 'node', { code: 'conflicting-row', message: say.settlementTwice(before.row.raw.row) }, draft.reading);
      continue;
    }
    seen.set(key, { row, level: at });
    if (before) drop(draft, loadCase, node);
    readSettlement(draft, row, loadCase, node);
  }
}

function drop(draft: Draft, loadCase: number, node: number): void {
  const at = draft.settlements.findIndex((each) => each.case === loadCase && each.node === node);
  if (at >= 0) draft.settlements.splice(at, 1);
}

function readSettlement(draft: Draft, row: Row, loadCase: number, node: number): void {
  const { reader } = draft.batch;
  const support = draft.supports.find((each) => each.node === node);
  const read = (name: keyof typeof along): number | null | undefined => {
    const value = reader.number(row, name, draft.reading);
    if (value === undefined || node < 0) return value;
    // 0 asks nothing of a direction, fixed or not
    if (value === null || value === 0) return null;
    if (support?.[along[name]] === 'fixed') return value;
    reader.tell(
      row,
      name,
      { code: 'out-of-range', message: say.settlementNotFixed(name, draft.nodes[node]?.id ?? '') },
      draft.reading,
    );
    return undefined;
  };
  const [dx, dy, rz] = [read('dx'), read('dy'), read('rz')];
  if (node < 0 || dx === undefined || dy === undefined || rz === undefined) return;
  draft.settlements.push({ case: loadCase, node, dx_m: dx, dy_m: dy, rz_rad: rz });
}
