import { describe, expect, it } from 'vitest';
import { csvOf } from '@/lib/reports/workbook/write-csv';
import type { Row, View } from '@/lib/tables/view';
import { viewSheet } from './view-sheet';

const view = (table: View['table'], columns: string[] | null): View => ({ table, filters: [], sort: null, columns });

async function csv(
  one: View,
  units: 'metric' | 'us',
  cells: Row['cells'][],
  parameters = [{ name: 'Span', quantity: 'length', numeric: true }],
) {
  const rows = cells.map((each, index): Row => ({ id: String(index), frameIndex: index, cells: each }));
  const sheet = viewSheet({
    view: one,
    units,
    nearLimit: 0.9,
    parameters,
    async *rows() {
      yield* rows;
    },
  });
  let text = '';
  for await (const piece of csvOf(sheet)) text += piece;
  return text.replace('\ufeff', '').trim().split('\r\n');
}

describe('the export of a view', () => {
  it('has the columns and order of the screen, in the batch’s units', async () => {
    const lines = await csv(view('members', ['member', 'N', 'frame', 'p:span']), 'metric', [
      { frame: 'D01', member: 'BC', N: -74_600, 'p:span': 18.5, ratio: 1.13 },
    ]);
    expect(lines).toEqual(['Member,N [kN],Frame,Span [m]', 'BC,-74.6,D01,18.5']);
  });

  it('writes each check’s unit beside its value and limit', async () => {
    const lines = await csv(view('checks', ['frame', 'value', 'limit', 'ratio']), 'metric', [
      { frame: 'D01', value: 185.8e6, limit: 165e6, ratio: 1.126, quantity: 'stress' },
      { frame: 'D01', value: 0.0625, limit: 0.074, ratio: 0.82, quantity: 'displacement' },
      { frame: 'D02', value: null, limit: null, ratio: null, quantity: 'stress' },
    ]);
    expect(lines).toEqual(['Frame,Value,Limit,unit,Ratio', 'D01,185.8,165,MPa,1.126', 'D01,62.5,74,mm,0.82', 'D02,,,MPa,']);
  });

  it('keeps text that a spreadsheet would run as a formula as text', async () => {
    const lines = await csv(view('frames', ['frame', 'title']), 'us', [{ frame: '=1+1', title: '@SUM(A1)' }]);
    expect(lines[1]).toBe("'=1+1,'@SUM(A1)");
  });
});
