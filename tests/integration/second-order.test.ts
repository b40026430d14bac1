/**
 * The settings and columns of second order, imperfections, stiffness reduction, shear deformation and tension-only members,
 * from sheets by another writer to the published JSON. Expected numbers are closed forms worked here, in SI.
 */
import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { readIntake } from '@/lib/intake/read-intake';
import { reportSheets } from '@/lib/reports/workbook/report-sheets';
import type { ReportRow } from '@/lib/reports/workbook/report-sheet';
import { evaluateFrame } from '@/lib/results/evaluate';
import { frameResultJson } from '@/lib/results/json';
import type { FrameEvaluation } from '@/lib/results/result';
import type { FrameResult } from '@/lib/results/schema';
import { evaluateBatch } from '@/worker/command/evaluate-batch';
import { writtenElsewhere, type WrittenCell, type WrittenSheets } from '@/tests/setup/second-writer';

type Rows = readonly (readonly WrittenCell[])[];

async function solve(sheets: WrittenSheets): Promise<{ json: FrameResult; evaluation: FrameEvaluation }> {
  const intake = await readIntake([{ name: 'input.xlsx', bytes: await writtenElsewhere(sheets) }]);
  const frame = intake.frames[0]?.frame;
  if (!frame) throw new Error(`stopped: ${JSON.stringify(intake.problems)}`);
  const evaluation = evaluateFrame(createAnalyser(), frame, intake.settings, { second: true, all: false });
  return { json: frameResultJson(frame, evaluation), evaluation };
}
const named = (json: FrameResult, name: string) => {
  const found = json.results.find((each) => each.name === name);
  if (!found) throw new Error(`no result ${name} among ${json.results.map((each) => each.name).join(', ')}: ${json.notChecked.join('; ')}`); // prettier-ignore
  return found;
};
const sway = (json: FrameResult, name: string, node = 'B'): number =>
  named(json, name).displacements.find((each) => each.node === node)?.ux ?? NaN;
const near = (a: number | undefined, b: number, tolerance = 1e-6): void =>
  expect(Math.abs((a ?? NaN) - b) / Math.abs(b), `${a} against ${b}`).toBeLessThan(tolerance);

const [L, P, H] = [4, 400e3, 10e3];
const [EI, GAv] = [210e9 * 8000e-8, 81e9 * 20e-4];

/** A free-standing column 4 m high, A = 50 cm², I = 8,000 cm⁴, Av = 20 cm²: 400 kN down and 10 kN to the right at its top. */
function column(settings: Rows, more: Record<string, Rows> = {}): WrittenSheets {
  return {
    Setup: [['setting', 'value'], ['stability', 'by others'], ['deflection ratio', 'none'], ['sway ratio', 50], ['stress factor', 0.9], ...settings],
    Nodes: [['frame', 'node', 'x', 'y'], ['F', 'A', 0, 0], ['F', 'B', 0, L]],
    Members: [['frame', 'member', 'start', 'end', 'section', 'role'], ['F', 'AB', 'A', 'B', 'S', 'column']],
    Materials: [['material', 'E [GPa]', 'fy [MPa]', 'G [GPa]'], ['steel', 210, 355, 81]],
    Sections: [['section', 'A', 'I', 'depth', 'Av', 'material'], ['S', 50, 8000, 300, 20, 'steel']],
    Supports: [['frame', 'node', 'ux', 'uy', 'rz'], ['F', 'A', 'fixed', 'fixed', 'fixed']],
    'Load cases': [['case', 'kind'], ['weight', 'dead'], ['push', 'wind']],
    'Node loads': [['frame', 'case', 'node', 'Fx', 'Fy'], ['F', 'weight', 'B', null, -400], ['F', 'push', 'B', 10, null]],
    Combinations: [['combination', 'purpose', 'weight', 'push'], ['C1', 'strength', 1, 1], ['S1', 'service', 1, 1]],
    ...more,
  }; // prettier-ignore
}
/** Sway of a cantilever under H and P in second order: (H/P)(tan kL/k − L), k² = P/EI. Timoshenko and Gere (1961) 1.7. */
const amplified = (stiffness: number, across = H): number => {
  const k = Math.sqrt(P / stiffness);
  return (across / P) * (Math.tan(k * L) / k - L);
};

describe('second order from the sheets', () => {
  it('moves a column by (H/P)(tan kL/k − L) and bends it by H tan kL/k, cases alone to first order', async () => {
    const { json, evaluation } = await solve(column([['analysis', 'second order']]));
    expect(json.status).toBe('solved');
    expect(json.results.map(({ name, order }) => [name, order])).toEqual([['weight', 1], ['push', 1], ['C1', 2], ['S1', 2]]); // prettier-ignore
    near(sway(json, 'push'), (H * L ** 3) / (3 * EI));
    for (const name of ['C1', 'S1']) near(sway(json, name), amplified(EI));
    const k = Math.sqrt(P / EI);
    const { extremes } = named(json, 'C1').members[0]!;
    near(Math.max(extremes.M.max, -extremes.M.min), (H * Math.tan(k * L)) / k);
    near(named(json, 'C1').criticalLoadFactor ?? NaN, (Math.PI ** 2 * EI) / (4 * L ** 2) / P, 1e-3);
    expect(named(json, 'C1').method).toMatchObject({ imperfection: null, loadScale: 1, slack: [], notional: [], stiffness: [] });
    expect(named(json, 'C1').method?.iterations).toBeGreaterThan(0);
    expect(named(json, 'C1').method?.change).toBeLessThan(1e-6);
    expect(json.certificate?.second).toBeLessThan(1e-6);
    // checks come from that state: M/W + N/A, and the sway against its limit
    const stress = json.checks.find((check) => check.check === 'normal stress');
    near(stress?.value ?? NaN, P / 50e-4 + ((H * Math.tan(k * L)) / k) * (0.15 / 8000e-8));
    near(json.checks.find((check) => check.check === 'sway')?.value ?? NaN, amplified(EI));
    expect(evaluation.checks.find((check) => check.check === 'critical load factor')?.reference).toContain('second-order');
  });

  it('says of a load beyond the critical one which combination is unstable and how far it got', async () => {
    const heavy: Rows = [['combination', 'purpose', 'weight', 'push'], ['C1', 'strength', 1, 1], ['C7', 'strength', 9, 1]]; // prettier-ignore
    const { json } = await solve(column([['analysis', 'second order']], { Combinations: heavy }));
    expect(json).toMatchObject({ status: 'not solved', verdict: 'not checked', results: [], checks: [], certificate: null });
    expect(json.notChecked[0]).toMatch(/^not solved: C7.*unstable at this load/);
  });

  it('keeps first order where the setting says so, and does not check what that leaves open', async () => {
    const { json } = await solve(column([['analysis', 'first order']]));
    near(sway(json, 'C1'), (H * L ** 3) / (3 * EI));
    expect(json.checks.find((check) => check.check === 'critical load factor')?.reason).toMatch(/second-order effects not negligible/); // prettier-ignore
    expect(json.results.every((result) => !('method' in result))).toBe(true);
  });
});

describe('imperfections from the sheets', () => {
  it('EN 1993-1-1: each strength combination twice, φN at the top; service once', async () => {
    const { json } = await solve(
      column([
        ['analysis', 'second order'],
        ['imperfections', 'EN 1993-1-1'],
      ]),
    );
    expect(json.results.map((each) => each.name)).toEqual(['weight', 'push', 'C1 →', 'C1 ←', 'S1']);
    // φ = 1/200 · αh · αm, αh = 2/√4 = 1, αm = √(0.5 · 2) = 1
    const top = P / 200;
    near(sway(json, 'C1 →'), amplified(EI, H + top));
    near(sway(json, 'C1 ←'), amplified(EI, H - top));
    near(sway(json, 'S1'), amplified(EI));
    const forces = named(json, 'C1 →').method?.notional ?? [];
    near(forces.find((each) => each.node === 'B')?.fx, top);
    near(forces.find((each) => each.node === 'A')?.fx, -top);
    // a check takes the worse
    expect(json.checks.find((check) => check.check === 'normal stress')?.combination).toBe('C1 →');
  });

  it('act in first order too, where that is asked for', async () => {
    const { json } = await solve(
      column([
        ['analysis', 'first order'],
        ['imperfections', 'AISC 360'],
      ]),
    );
    near(sway(json, 'C1 →'), ((H + 0.002 * P) * L ** 3) / (3 * EI));
    near(sway(json, 'C1 ←'), ((H - 0.002 * P) * L ** 3) / (3 * EI));
    expect(named(json, 'C1 →')).toMatchObject({ order: 1, method: { imperfection: 'right' } });
  });
});

describe('stiffness and shear from the sheets', () => {
  it('AISC 360: strength with 0.8 EI, service with EI', async () => {
    const { json } = await solve(
      column([
        ['analysis', 'second order'],
        ['stiffness reduction', 'AISC 360'],
      ]),
    );
    // P/Pns = 400 kN/(355 MPa · 50 cm²) = 0.23: τb = 1
    near(sway(json, 'C1'), amplified(0.8 * EI));
    near(sway(json, 'S1'), amplified(EI));
    expect(named(json, 'C1').method?.stiffness).toEqual([{ member: 'AB', EA: 0.8, EI: 0.8 }]);
    expect(named(json, 'S1').method?.stiffness).toEqual([]);
  });

  it('shear deformation: HL³/3EI + HL/GAv, of cases and combinations', async () => {
    const { json } = await solve(column([['shear deformation', 'yes']]));
    for (const name of ['push', 'C1']) near(sway(json, name), (H * L ** 3) / (3 * EI) + (H * L) / GAv);
    expect(named(json, 'push').method).toMatchObject({ shearDeformation: true, iterations: 1, change: 0 });
  });
});

describe('tension-only members from the sheets', () => {
  /** A pinned bent 4 m wide, 3 m high, held by crossed rods from A to C and from D to B; H to the right at B. */
  function bent(settings: Rows, rods: Rows, more: Record<string, Rows> = {}): WrittenSheets {
    return {
      Setup: [['setting', 'value'], ['stability', 'by others'], ['deflection ratio', 'none'], ['sway ratio', 'none'], ['material', 'S355'], ...settings],
      Nodes: [['frame', 'node', 'x', 'y'], ['F', 'A', 0, 0], ['F', 'B', 0, 3], ['F', 'C', 4, 3], ['F', 'D', 4, 0]],
      Members: [['frame', 'member', 'start', 'end', 'section', 'role', 'axial only', 'tension only'],
        ['F', 'AB', 'A', 'B', 'HE 200 A', 'column', 'yes', null], ['F', 'BC', 'B', 'C', 'HE 200 A', 'beam', 'yes', null],
        ['F', 'CD', 'C', 'D', 'HE 200 A', 'column', 'yes', null], ...rods],
      Supports: [['frame', 'node', 'ux', 'uy', 'rz'], ['F', 'A', 'fixed', 'fixed', 'free'], ['F', 'D', 'fixed', 'fixed', 'free']],
      'Load cases': [['case', 'kind'], ['push', 'wind']],
      'Node loads': [['frame', 'case', 'node', 'Fx', 'Fy'], ['F', 'push', 'B', 30, null]],
      Combinations: [['combination', 'purpose', 'case', 'factor'], ['C1', 'strength', 'push', '±1'], ['S1', 'service', 'push', 1]],
      ...more,
    }; // prettier-ignore
  }
  const rod = (name: string, from: string, to: string): readonly WrittenCell[] => [
    'F',
    name,
    from,
    to,
    'CHS',
    'brace',
    null,
    'yes',
  ];
  const crossed: Rows = [rod('AC', 'A', 'C'), rod('DB', 'D', 'B')];
  const tube = { Sections: [['section', 'shape', 'd', 't'], ['CHS', 'chs', 60, 4]] } as const; // prettier-ignore
  const force = (json: FrameResult, result: string, member: string): number =>
    named(json, result).members.find((each) => each.member === member)?.start.N ?? NaN;

  it.each(['first order', 'second order'])('%s: the rod that is pulled takes H/cos θ, the other nothing', async (analysis) => {
    const { json, evaluation } = await solve(bent([['analysis', analysis]], crossed, tube));
    expect(json.status, json.notChecked.join('; ')).toBe('solved');
    expect(json.results.map((each) => each.name)).toEqual(['C1 (+)', 'C1 (−)', 'S1']);
    expect(json.notApplicable?.[0]).toMatch(/^load cases alone: not applicable.*AC, DB/);
    const order = analysis === 'first order' ? 1e-9 : 2e-3;
    near(force(json, 'C1 (+)', 'AC'), 30e3 / 0.8, order);
    expect(force(json, 'C1 (+)', 'DB')).toBe(0);
    near(force(json, 'C1 (−)', 'DB'), 30e3 / 0.8, order);
    expect(named(json, 'C1 (+)').method?.slack).toEqual(['DB']);
    expect(named(json, 'C1 (−)').method?.slack).toEqual(['AC']);
    expect(evaluation.assumptions).toContain('DB: tension only, slack in C1 (+), S1');
    const reactions = named(json, 'C1 (+)').reactions.reduce((sum, each) => sum + each.fx, 0);
    near(reactions, -30e3, 1e-9);
  });

  it('a frame whose only rod would be pressed is not solved, the combination and the member named', async () => {
    const { json } = await solve(bent([], [rod('AC', 'A', 'C')], tube));
    expect(json).toMatchObject({ status: 'not solved', results: [], certificate: null });
    expect(json.notChecked[0]).toMatch(/^not solved: .*C1 \(−\)/);
    expect(json.notChecked[0]).toContain('AC');
  });

  it('is at best not checked without combinations, since there is no result at all', async () => {
    const sheets = { ...bent([], crossed, tube) } as Record<string, Rows>;
    delete sheets['Combinations'];
    const { json } = await solve(sheets);
    expect(json).toMatchObject({ status: 'solved', verdict: 'not checked', results: [] });
    expect(json.notApplicable).toHaveLength(1);
  });
});

describe('the result workbook of such sheets', () => {
  async function workbook(sheets: WrittenSheets): Promise<ReadonlyMap<string, readonly ReportRow[]>> {
    const intake = await readIntake([{ name: 'input.xlsx', bytes: await writtenElsewhere(sheets) }]);
    const batch = await evaluateBatch(intake, { all: false });
    const found = new Map<string, readonly ReportRow[]>();
    for (const { name, columns, rows } of await reportSheets(batch)) {
      const all: ReportRow[] = [columns.map((column) => column.heading)];
      for await (const row of rows()) all.push(row);
      found.set(name, all);
    }
    batch.close();
    return found;
  }
  const byHeading = (rows: readonly ReportRow[] | undefined, row: number): Record<string, unknown> =>
    Object.fromEntries((rows?.[0] ?? []).map((heading, i) => [heading, rows?.[row]?.[i]]));

  it('says how each result was found, in kN, and certifies every frame', async () => {
    const settings: Rows = [['analysis', 'second order'], ['imperfections', 'EN 1993-1-1'], ['stiffness reduction', 'AISC 360'], ['shear deformation', 'yes']]; // prettier-ignore
    const book = await workbook(column(settings));
    const analysis = book.get('Analysis');
    // the cases shear too, so they have rows
    expect(analysis?.slice(1).map((row) => row[1])).toEqual(['weight', 'push', 'C1 →', 'C1 ←', 'S1']);
    const right = byHeading(analysis, 3);
    expect(right).toMatchObject({
      order: 2,
      'imperfections lean': 'right →',
      'slack members': null,
      'smallest factor on EI': 0.8,
    });
    expect(right['imperfection forces [kN]']).toBe('Fx A −2, B 2');
    near(right['initial sway φ'] as number, 1 / 200, 1e-12);
    expect(right['passes']).toBeGreaterThan(0);
    expect(right['change of the last pass']).toBeLessThan(1e-6);
    const totals = book.get('Applied load totals') ?? [];
    const pair = totals.find((row) => row[1] === 'imperfections of C1 →');
    // +2 kN at 4 m, −2 kN at the base: no sum, −8 kN·m about the origin
    expect(pair?.slice(2, 4)).toEqual([0, 0]);
    near(pair?.[4] as number, -8, 1e-9);
    const frames = byHeading(book.get('Frames'), 1);
    expect(frames['residual']).toBeLessThan(1e-10);
    expect(frames['equilibrium']).toBeLessThan(1e-8);
    expect(frames['digits']).toBeGreaterThan(6);
    expect(frames['second analysis']).toBeLessThan(1e-6);
    const cover = (book.get('Cover') ?? []).map((row) => row.join(' '));
    for (const said of ['analysed second order', 'leaning right (→) and left (←)', 'AISC 360-22 C2.3', 'shear as well as bend', 'engine tallyframe-engine', 'input SHA-256', 'shear areas as typed'])
      expect(cover.some((line) => line.includes(said)), said).toBe(true); // prettier-ignore
    for (const name of ['Members by combination', 'Reactions', 'Displacements'])
      expect(new Set((book.get(name) ?? []).slice(1).map((row) => row[2] === 'C1 →' || row[3] === 'C1 →')).has(true), name).toBe(true); // prettier-ignore
  });
});
