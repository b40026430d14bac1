/**
 * The sheets' contract from outside: workbooks by another spreadsheet writer go in, the published JSON comes out.
 * Expected numbers are statics and beam formulas worked here by hand, in SI.
 */
import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { readIntake } from '@/lib/intake/read-intake';
import type { Intake } from '@/lib/intake/intake';
import { evaluateFrame } from '@/lib/results/evaluate';
import { frameResultJson } from '@/lib/results/json';
import type { FrameResult } from '@/lib/results/schema';
import { writtenElsewhere, type WrittenCell, type WrittenSheets } from '@/tests/setup/second-writer';

async function read(sheets: WrittenSheets): Promise<Intake> {
  return readIntake([{ name: 'input.xlsx', bytes: await writtenElsewhere(sheets) }]);
}

async function solve(sheets: WrittenSheets, id = 'F'): Promise<FrameResult> {
  const intake = await read(sheets);
  const found = intake.frames.find((each) => each.id === id);
  if (!found?.frame) throw new Error(`frame ${id} was stopped: ${JSON.stringify(intake.problems)}`);
  const evaluation = evaluateFrame(createAnalyser(), found.frame, intake.settings, { second: true, all: true });
  return frameResultJson(found.frame, evaluation, { all: false });
}

/** A cantilever 4 m long to the right, E = 210 GPa, I = 8,000 cm⁴, A = 50 cm². */
function cantilever(
  more: Record<string, readonly (readonly WrittenCell[])[]> = {},
): Record<string, readonly (readonly WrittenCell[])[]> {
  return {
    Setup: [['setting', 'value'], ['deflection ratio', 100], ['sway ratio', 'none'], ['stability', 'by others']], // prettier-ignore
    Nodes: [['frame', 'node', 'x', 'y'], ['F', 'A', 0, 0], ['F', 'B', 4, 0]], // prettier-ignore
    Members: [['frame', 'member', 'start', 'end', 'section', 'role'], ['F', 'AB', 'A', 'B', 'S', 'cantilever']], // prettier-ignore
    Materials: [['material', 'E [GPa]', 'fy [MPa]'], ['steel', 210, 275]], // prettier-ignore
    Sections: [['section', 'A', 'I', 'depth', 'Av', 'material'], ['S', 50, 8000, 300, 20, 'steel']], // prettier-ignore
    Supports: [['frame', 'node', 'ux', 'uy', 'rz'], ['F', 'A', 'fixed', 'fixed', 'fixed']], // prettier-ignore
    'Load cases': [['case', 'kind'], ['tip', 'live']], // prettier-ignore
    'Node loads': [['frame', 'case', 'node', 'Fx', 'Fy', 'Mz'], ['F', 'tip', 'B', null, -10, null]], // prettier-ignore
    Combinations: [['combination', 'purpose', 'tip'], ['C1', 'strength', 1], ['S1', 'service', 1]], // prettier-ignore
    ...more,
  };
}

const EI = 210e9 * 8000e-8;

describe('a workbook by another writer, through to the published JSON', () => {
  it('solves a cantilever with a load at its tip: PL³/3EI, PL at the root, PL/W in its fibres', async () => {
    const frame = await solve(cantilever());
    expect(frame.status).toBe('solved');
    const tip = frame.results.find((each) => each.name === 'tip');
    expect(tip?.kind).toBe('case');
    expect(tip?.displacements.find((each) => each.node === 'B')?.uy).toBeCloseTo((-10e3 * 64) / (3 * EI), 12);
    expect(tip?.reactions[0]).toMatchObject({ node: 'A' });
    expect(tip?.reactions[0]?.fy).toBeCloseTo(10e3, 6);
    expect(tip?.reactions[0]?.mz).toBeCloseTo(40e3, 6);
    const member = tip?.members[0];
    expect(member?.start.M).toBeCloseTo(-40e3, 6);
    expect(member?.start.V).toBeCloseTo(10e3, 6);
    expect(member?.end.V).toBeCloseTo(10e3, 6); // the load stands on the node, not on the member
    const stress = frame.checks.find((each) => each.check === 'normal stress');
    const W = 8000e-8 / 0.15;
    expect(stress?.value).toBeCloseTo(40e3 / W, 3);
    expect(stress?.limit).toBeCloseTo(0.6 * 275e6, 3);
    expect(stress).toMatchObject({ subject: 'AB', combination: 'C1', at: 0, face: 'top' });
    const shear = frame.checks.find((each) => each.check === 'shear stress');
    expect(shear?.value).toBeCloseTo(10e3 / 20e-4, 3);
    const deflection = frame.checks.find((each) => each.check === 'deflection');
    expect(deflection?.value).toBeCloseTo((10e3 * 64) / (3 * EI), 9);
    expect(deflection?.limit).toBeCloseTo(0.04, 12);
  });

  it('keeps member ends before and after a point load that stands exactly on them', async () => {
    const frame = await solve(
      cantilever({
        'Node loads': [['frame', 'case', 'node', 'Fx', 'Fy', 'Mz']],
        'Member loads': [['frame', 'case', 'member', 'load', 'axes', 'direction', 'value', 'from'], ['F', 'tip', 'AB', 'point', 'global', 'y', -10, 4]], // prettier-ignore
      }),
    );
    const member = frame.results[0]?.members[0];
    expect(member?.start.V).toBeCloseTo(10e3, 6);
    expect(member?.end.V).toBeCloseTo(0, 6);
    expect(member?.extremes.V.max).toBeCloseTo(10e3, 6);
  });

  it('reads a projected load on an inclined member as per metre of plan', async () => {
    const frame = await solve(
      cantilever({
        Nodes: [['frame', 'node', 'x', 'y'], ['F', 'A', 0, 0], ['F', 'B', 4, 3]], // prettier-ignore
        'Node loads': [['frame', 'case', 'node', 'Fx', 'Fy', 'Mz']],
        'Member loads': [['frame', 'case', 'member', 'load', 'axes', 'direction', 'value'], ['F', 'tip', 'AB', 'distributed', 'projected', 'y', -6]], // prettier-ignore
      }),
    );
    expect(frame.results[0]?.reactions[0]?.fy).toBeCloseTo(24e3, 6);
    expect(frame.results[0]?.reactions[0]?.mz).toBeCloseTo(48e3, 6);
  });

  it('takes a linearly varying load from its value to its end value between from and to', async () => {
    const frame = await solve(
      cantilever({
        'Node loads': [['frame', 'case', 'node', 'Fx', 'Fy', 'Mz']],
        'Member loads': [['frame', 'case', 'member', 'load', 'value', 'end value', 'from', 'to'], ['F', 'tip', 'AB', 'distributed', -6, 0, 1, 4]], // prettier-ignore
      }),
    );
    // Triangle of 6 kN/m over 3 m: 9 kN, its centroid a third of the length from the tall end: x = 2 m.
    expect(frame.results[0]?.reactions[0]?.fy).toBeCloseTo(9e3, 6);
    expect(frame.results[0]?.reactions[0]?.mz).toBeCloseTo(18e3, 6);
  });

  it('is not held without a sheet row: no supports is said of the frame and the others run', async () => {
    const intake = await read(
      cantilever({
        Nodes: [['frame', 'node', 'x', 'y'], ['F', 'A', 0, 0], ['F', 'B', 4, 0], ['G', 'A', 0, 0], ['G', 'B', 4, 0]], // prettier-ignore
        Members: [['frame', 'member', 'start', 'end', 'section', 'role'], ['F', 'AB', 'A', 'B', 'S', 'cantilever'], ['G', 'AB', 'A', 'B', 'S', 'cantilever']], // prettier-ignore
      }),
    );
    expect(intake.frames.map((each) => [each.id, each.frame !== null])).toEqual([
      ['F', true],
      ['G', false],
    ]);
    expect(intake.problems.filter((each) => each.severity === 'error').map(({ code, frames }) => [code, frames])).toEqual([
      ['no-supports', ['G']],
    ]);
  });

  it('names an unknown section at its cell, with the sheet as typed', async () => {
    const intake = await read(
      cantilever({
        Members: [['frame', 'member', 'start', 'end', 'section', 'role'], ['F', 'AB', 'A', 'B', 'IPE 33O', 'cantilever']], // prettier-ignore
      }),
    );
    expect(intake.problems.find((each) => each.severity === 'error')).toMatchObject({
      code: 'unknown-section',
      sheet: 'Members',
      row: 2,
      column: 'section',
      cell: 'E2',
      frames: ['F'],
    });
  });

  it('reads a unit in the heading before the batch unit, and converts a unit typed in the cell with a note', async () => {
    const frame = await solve(
      cantilever({
        Nodes: [['Frame', 'Node', 'X (mm)', 'Y (mm)'], ['F', 'A', 0, 0], ['F', 'B', '4 m', 0]], // prettier-ignore
      }),
    );
    expect(frame.results[0]?.reactions[0]?.mz).toBeCloseTo(40e3, 6);
  });

  it('checks by the design code that is asked for, never by elastic stress instead', async () => {
    const frame = await solve(cantilever({ Setup: [['setting', 'value'], ['strength check', 'EN 1993-1-1']] })); // prettier-ignore
    const names = frame.checks.filter((each) => each.subject === 'AB').map((each) => each.check);
    expect(names).not.toContain('normal stress');
    expect(names.some((each) => /^(EN 1993-1-1|6\.|5\.5)/.test(each))).toBe(true);
  });

  it('expands ± to two combinations', async () => {
    const frame = await solve(
      cantilever({ Combinations: [['combination', 'purpose', 'case', 'factor'], ['C1', 'strength', 'tip', '±1.5'], ['S1', 'service', 'tip', 1]] }), // prettier-ignore
    );
    expect(frame.results.map((each) => each.name)).toEqual(['tip', 'C1 (+)', 'C1 (−)', 'S1']);
    const plus = frame.results.find((each) => each.name === 'C1 (+)')?.reactions[0]?.fy ?? 0;
    const minus = frame.results.find((each) => each.name === 'C1 (−)')?.reactions[0]?.fy ?? 0;
    expect(plus).toBeCloseTo(15e3, 6);
    expect(minus).toBeCloseTo(-15e3, 6);
  });

  it('is at best not checked without combinations', async () => {
    const sheets = cantilever();
    delete sheets['Combinations'];
    const frame = await solve(sheets);
    expect(frame.status).toBe('solved');
    expect(frame.verdict).toBe('not checked');
    expect(frame.notChecked.join(' ')).toMatch(/no combinations/);
  });

  it('is not checked for deflection where no limit is given, and drops it where there is declared none', async () => {
    const silent = await solve(cantilever({ Setup: [['setting', 'value'], ['stability', 'by others'], ['sway ratio', 'none']] })); // prettier-ignore
    expect(silent.checks.find((each) => each.check === 'deflection')).toMatchObject({ verdict: 'not checked', ratio: null });
    expect(silent.verdict).toBe('not checked');
    const none = await solve(cantilever({ Setup: [['setting', 'value'], ['stability', 'by others'], ['sway ratio', 'none'], ['deflection ratio', 'none']] })); // prettier-ignore
    expect(none.checks.some((each) => each.check === 'deflection')).toBe(false);
    expect(none.verdict).not.toBe('not checked');
  });

  it('builds the portal family: snow on plan comes to the bases in full, dead on the slope', async () => {
    const headings = ['frame', 'family', 'span', 'eaves', 'rise', 'spacing', 'column', 'rafter', 'material', 'dead', 'snow'];
    const frame = await solve({
      Setup: [['setting', 'value'], ['deflection ratio', 'none'], ['sway ratio', 'none']], // prettier-ignore
      Variants: [headings, ['F', 'portal', 16, 5, 3, 6, 'HE 300 A', 'IPE 400', 'S275', 0.5, 0.8]],
      Combinations: [['combination', 'purpose', 'dead', 'snow'], ['C1', 'strength', 1, 1]], // prettier-ignore
    });
    const total = (name: string): number => {
      const reactions = frame.results.find((each) => each.name === name)?.reactions ?? [];
      return reactions.reduce((sum, each) => sum + each.fy, 0);
    };
    expect(frame.results.map((each) => each.name)).toEqual(['dead', 'live', 'snow', 'wind', 'wind 2', 'inside', 'C1']);
    expect(total('snow')).toBeCloseTo(0.8e3 * 6 * 16, 5);
    const slope = Math.hypot(8, 3);
    const steel = (frame.mass ?? NaN) * 9.80665;
    expect(total('dead') - steel).toBeCloseTo(0.5e3 * 6 * 2 * slope, 4);
    expect(total('C1')).toBeCloseTo(total('dead') + total('snow'), 5);
  });
});
