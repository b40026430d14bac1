import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import type { Frame } from '@/lib/model/frame';
import { defaultSettings, type SettingOrigins, type Settings } from '@/lib/model/settings';
import type { ReportRow } from '@/lib/reports/workbook/report-sheet';
import { reportSheets } from '@/lib/reports/workbook/report-sheets';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import { cantileverFrame } from '@/lib/results/cantilever-frame';
import { evaluateFrame } from '@/lib/results/evaluate';
import { frameResultJson } from '@/lib/results/json';
import type { FrameEvaluation, StateMethod } from '@/lib/results/result';
import { resultsSchema } from '@/lib/results/schema';

const settings: Settings = { ...defaultSettings, analysis: 'second order', imperfections: 'EN 1993-1-1' };
const frame = cantileverFrame('K 1');
const tied: Frame = { ...frame, members: frame.members.map((member) => ({ ...member, tensionOnly: true })) };

/** The cantilever as if it had been analysed leaning both ways; forces of its imperfections in N at its tip and root. */
function leaning(of: Frame, slack: readonly number[]): FrameEvaluation {
  const first = evaluateFrame(createAnalyser(), frame, defaultSettings, { second: false, all: false });
  const [strength, service] = first.states.filter((state) => state.kind === 'combination');
  const method = (imperfection: StateMethod['imperfection'], H: number): StateMethod => ({
    shearDeformation: false,
    imperfection,
    notional: imperfection && Float64Array.of(-H, 0, H, 0),
    loadScale: imperfection ? 1.6 : 1,
    stiffness: imperfection && Float64Array.of(0.8, 0.64),
    slack,
    iterations: 6,
    change: 2.5e-11,
  });
  const states = [
    { ...strength!, name: 'C1 →', order: 2 as const, method: method('right', 1600) },
    { ...strength!, name: 'C1 ←', order: 2 as const, method: method('left', -1600) },
    { ...service!, order: 2 as const, method: method(null, 0) },
  ];
  return { ...first, states: of === tied ? states : [...first.states.filter(({ kind }) => kind === 'case'), ...states] };
}

function source(of: Frame, slack: readonly number[] = [], change: Partial<Settings> = {}): ReportSource {
  const origin = { source: 'default', cell: null } as const;
  const origins = Object.fromEntries(Object.keys(settings).map((name) => [name, origin])) as SettingOrigins;
  const evaluation = leaning(of, slack);
  return {
    title: { project: null, batch: null, revision: null, state: null, prepared: null, checked: null, issued: null },
    engine: 'test',
    input: { name: 'a.xlsx', sha256: 'ab', files: [{ name: 'a.xlsx', sha256: 'ab', size: 12 }] },
    settings: { ...settings, ...change },
    origins: { ...origins, analysis: { source: 'sheet', cell: 'Setup B3', changedBy: 'A. Checker' } },
    problems: [],
    inputRows: () => [],
    frames: () => [{ ...of, number: 1, frame: of, evaluation }],
  };
}

async function rowsOf(from: ReportSource, name: string): Promise<readonly ReportRow[] | null> {
  const sheet = (await reportSheets(from)).find((each) => each.name === name);
  if (!sheet) return null;
  const rows: ReportRow[] = [];
  for await (const row of sheet.rows()) rows.push(row);
  return rows;
}

describe('the result workbook of a second-order analysis', () => {
  it('says of each result which way it leans, its passes and last change, and the imperfection forces', async () => {
    const rows = await rowsOf(source(frame), 'Analysis');
    expect(rows).toEqual([
      ['K 1', 'C1 →', 'strength', 2, 'right →', null, 1.6, 6, 2.5e-11, expect.toSatisfy(numberOrNull), null, 'Fx A −1, B 1', 0.64, null], // prettier-ignore
      ['K 1', 'C1 ←', 'strength', 2, 'left ←', null, 1.6, 6, 2.5e-11, expect.toSatisfy(numberOrNull), null, 'Fx A 1, B −1', 0.64, null], // prettier-ignore
      ['K 1', 'S1', 'service', 2, null, null, null, 6, 2.5e-11, null, null, null, null, null],
    ]);
  });

  it('names slack members, and says that load cases alone are not applicable', async () => {
    const rows = await rowsOf(source(tied, [0]), 'Analysis');
    expect(rows?.[0]).toEqual(['K 1', 'load cases alone', ...Array<null>(11).fill(null), expect.stringMatching(/not applicable.*\(AB\)/)]); // prettier-ignore
    expect(rows?.slice(1).map((row) => row[10])).toEqual(['AB', 'AB', 'AB']);
    const reactions = await rowsOf(source(tied), 'Reactions');
    expect(reactions?.map((row) => row[2])).toEqual(['load cases alone', 'C1 →', 'C1 ←', 'S1']);
  });

  it('sums the imperfection forces of each combination after the loads of the cases', async () => {
    const rows = await rowsOf(source(frame), 'Applied load totals');
    expect(rows?.map((row) => row[1])).toEqual(['dead', 'tip', 'imperfections of C1 →', 'imperfections of C1 ←']);
    // 1 kN to the right at B (3, 0) and to the left at A (0, 0): no sum, and no moment about the origin
    expect(rows?.[2]?.slice(2)).toEqual([0, 0, 0]);
  });

  it('says on its cover how frames were analysed, and who chose a setting on screen', async () => {
    const rows = (await rowsOf(source(frame), 'Cover')) ?? [];
    const at = rows.findIndex((row) => row[0] === 'analysed');
    expect(rows[at]?.[1]).toMatch(/^second order: every combination in equilibrium on its deformed shape/);
    expect(rows[at + 1]?.[1]).toMatch(/^imperfections by EN 1993-1-1 5\.3\.2: .*leaning right \(→\) and left \(←\)/);
    expect(rows.find((row) => row[0] === 'analysis')).toEqual(['analysis', 'second order', 'changed on screen by A. Checker']);
  });

  it('has no such sheet where everything is of plain first order', async () => {
    const plain = source(frame, [], { analysis: 'first order', imperfections: 'none' });
    expect(await rowsOf(plain, 'Analysis')).toBeNull();
    expect((await rowsOf(plain, 'Cover'))?.find((row) => row[0] === 'analysed')?.[1]).toMatch(/^first order/);
  });
});

describe('the results file of a second-order analysis', () => {
  it('has both directions as results, with how each was found, and fits its schema', () => {
    const json = frameResultJson(tied, leaning(tied, [0]));
    expect(json.results.map(({ name, order }) => [name, order])).toEqual([['C1 →', 2], ['C1 ←', 2], ['S1', 2]]); // prettier-ignore
    expect(json.results[0]?.method).toEqual({
      imperfection: 'right',
      shearDeformation: false,
      loadScale: 1.6,
      iterations: 6,
      change: 2.5e-11,
      slack: ['AB'],
      notional: [{ node: 'A', fx: -1000, fy: 0 }, { node: 'B', fx: 1000, fy: 0 }],
      stiffness: [{ member: 'AB', EA: 0.8, EI: 0.64 }],
    }); // prettier-ignore
    expect(json.notApplicable).toEqual([expect.stringMatching(/^load cases alone: not applicable/)]);
    expect(resultsSchema.shape.frames.parse([json])).toHaveLength(1);
  });

  it('has nothing more than before where a state is of plain first order', () => {
    const first = evaluateFrame(createAnalyser(), frame, defaultSettings, { second: false, all: false });
    const json = frameResultJson(frame, first);
    expect(Object.keys(json)).not.toContain('notApplicable');
    expect(json.results.every((result) => !('method' in result))).toBe(true);
  });
});

const numberOrNull = (value: unknown): boolean => value === null || typeof value === 'number';
