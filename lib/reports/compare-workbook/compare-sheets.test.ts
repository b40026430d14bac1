import { expect, it } from 'vitest';
import { type ComparedFrame, pairFrames, pairMembers } from '@/lib/results/compare';
import { causesOf } from '@/lib/results/compare-causes';
import type { InputDifference } from '@/lib/results/compare-inputs';
import { pairReactions } from '@/lib/results/compare-reactions';
import { compareTotals } from '@/lib/results/compare-totals';
import { compareSheets } from './compare-sheets';

const frame = (id: string, version: number, more: Partial<ComparedFrame>): ComparedFrame => ({
  index: 0, id, version, status: 'solved', verdict: 'within', ratio: 0.5, check: 'normal stress', subject: 'AB', section: 'IPE 300',
  combination: 'C1', criticalLoadFactor: 12, mass: 500, count: 2, ...more,
}); // prettier-ignore
const member = { id: 'AB', role: 'rafter', section: 'IPE 300', check: 'normal stress', combination: 'C1', verdict: 'within' as const, ratio: 0.5 }; // prettier-ignore

const gone: InputDifference = { sheet: 'Members', where: 'D2, AB', what: null, before: 'a row', after: null, rowBefore: 3, rowAfter: null }; // prettier-ignore

async function written(inputs: readonly InputDifference[] = [gone]): Promise<Map<string, unknown[][]>> {
  const frames = pairFrames(
    [frame('D1', 1, {}), frame('D2', 2, {}), frame('old', 3, { mass: null })],
    [frame('D1', 1, {}), frame('D2', 4, { verdict: 'over', ratio: Infinity, count: 3 }), frame('new', 5, {})],
  );
  const side = (letter: string) => ({ letter, input: `${letter}.xlsx`, state: 'run' });
  const sheets = compareSheets({
    batch: 'Sheds', before: side('A'), after: side('B'), units: 'metric', nearLimit: 0.9, by: 0.01,
    settings: [{ setting: 'near limit', before: '0.90', after: '0.80' }],
    recorded: [{ letter: 'B', what: 'near limit', from: '0.90', to: '0.80', reason: 'asked for', person: 'Ana Lyst', at: '2026-11-30' }],
    totals: compareTotals(frames, 0.01),
    inputs, causes: causesOf(inputs, ['D2', 'new', 'old']),
    frames,
    members: pairMembers(frames[1]!, [member, { ...member, id: 'BC' }], [{ ...member, section: 'IPE 330' }, { ...member, id: 'BC' }]),
    reactions: pairReactions({ id: 'D2', index: 1 }, [{ node: 'A', fx: 1e3, fy: 2e3, mz: 0 }], [{ node: 'A', fx: 1.5e3, fy: 2e3, mz: 0 }]),
  }); // prettier-ignore
  const found = new Map<string, unknown[][]>();
  for (const sheet of sheets) {
    const rows: unknown[][] = [];
    for await (const row of sheet.rows()) rows.push([...row]);
    for (const row of rows) if (sheet.columns.length > 0) expect(row, sheet.name).toHaveLength(sheet.columns.length);
    found.set(sheet.name, rows);
  }
  return found;
}

it('says of every frame how it moved, a ratio without end left blank', async () => {
  const rows = (await written()).get('Frames')!;
  expect(rows.map((row) => [row[0], row[6]])).toEqual([
    ['D1', 'carried over'],
    ['D2', 'became over'],
    ['new', 'only in B'],
    ['old', 'only in A'],
  ]);
  expect(rows[1]!.slice(1, 6)).toEqual(['within', 0.5, 'over', null, null]);
});

it('lists members that moved or have another section, reactions that moved, rows, settings and recorded changes', async () => {
  const sheets = await written();
  expect(sheets.get('Members that moved')!.map((row) => row.slice(0, 5))).toEqual([['D2', 'AB', 'rafter', 'IPE 300', 'IPE 330']]);
  expect(sheets.get('Reactions that moved')).toEqual([['D2', 'A', 'Fx', 'kN', 1, 1, 1.5, 1.5, 0.5, 0.25]]);
  expect(sheets.get('Inputs that differ')).toEqual([['Members', 'D2, AB', 'whole row', 'a row', null, 3, null]]);
  expect(sheets.get('Settings and changes')!.map((row) => row[0])).toEqual([
    'setting: near limit',
    'recorded change: near limit',
  ]);
});

it('says which change of the inputs touches a frame or a member, else which setting differs; nothing of frames that one has only', async () => {
  const sheets = await written();
  expect(sheets.get('Frames')!.map((row) => row.at(-1))).toEqual([null, 'AB taken from Members', null, null]);
  expect(sheets.get('Members that moved')!.map((row) => row.at(-1))).toEqual(['taken from Members']);
  const none = await written([]);
  expect(none.get('Frames')!.map((row) => row.at(-1))).toEqual([null, 'near limit 0.90 to 0.80', null, null]);
  expect(none.get('Members that moved')!.map((row) => row.at(-1))).toEqual(['near limit 0.90 to 0.80']);
});

it('adds up steel with the number off, and none where a mass is not known', async () => {
  const sheets = await written();
  expect(sheets.get('Steel')!.map((row) => [row[0], row.at(-1)])).toEqual([
    ['D1', 0],
    ['D2', 500],
    ['new', 1000],
    ['old', null],
  ]);
  const figures = new Map(sheets.get('Comparison')!.map((row) => [row[0], row[1]]));
  expect(figures.get('Steel in A')).toBe('2000.0 kg, without 1 frames whose mass is not known');
  expect(figures.get('Steel added')).toBe('1500.0 kg');
  expect(figures.get('No longer over')).toBe(0);
});
