/**
 * Members checked by a design code, from sheets by another writer to the published JSON and the workbook. Expected numbers are
 * closed forms worked here, in SI.
 */
import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { readIntake } from '@/lib/intake/read-intake';
import { reportSheets } from '@/lib/reports/workbook/report-sheets';
import type { ReportRow } from '@/lib/reports/workbook/report-sheet';
import { evaluateFrame } from '@/lib/results/evaluate';
import { frameResultJson } from '@/lib/results/json';
import type { FrameResult } from '@/lib/results/schema';
import { writtenElsewhere, type WrittenCell, type WrittenSheets } from '@/tests/setup/second-writer';
import { evaluateBatch } from '@/worker/command/evaluate-batch';

type Rows = readonly (readonly WrittenCell[])[];

/** A beam of 6 m on two supports: 20 kN/m down (factored by the combination), pressed by 200 kN where asked. */
function beam(settings: Rows, more: Record<string, Rows> = {}, member: readonly WrittenCell[] = []): WrittenSheets {
  return {
    Setup: [['setting', 'value'], ['deflection ratio', 'none'], ['sway ratio', 'none'], ...settings],
    Nodes: [['frame', 'node', 'x', 'y'], ['F', 'A', 0, 0], ['F', 'B', 6, 0]],
    Members: [['frame', 'member', 'start', 'end', 'section', 'material', 'role', 'length minor', 'length LTB'], ['F', 'AB', 'A', 'B', member[0] ?? 'IPE 360', 'S355', 'beam', 1.5, member[1] ?? 1.5]],
    Supports: [['frame', 'node', 'ux', 'uy'], ['F', 'A', 'fixed', 'fixed'], ['F', 'B', 'free', 'fixed']],
    'Load cases': [['case', 'kind'], ['dead', 'dead'], ['push', 'other']],
    'Member loads': [['frame', 'case', 'member', 'load', 'value'], ['F', 'dead', 'AB', 'distributed', -20]],
    'Node loads': [['frame', 'case', 'node', 'Fx'], ['F', 'push', 'B', -200]],
    Combinations: [['combination', 'purpose', 'dead', 'push'], ['C1', 'strength', 1.35, null], ['C2', 'strength', 1, 1], ['S1', 'service', 1, 1]],
    ...more,
  }; // prettier-ignore
}

async function solve(sheets: WrittenSheets): Promise<FrameResult> {
  const intake = await readIntake([{ name: 'input.xlsx', bytes: await writtenElsewhere(sheets) }]);
  const frame = intake.frames[0]?.frame;
  if (!frame) throw new Error(`stopped: ${JSON.stringify(intake.problems)}`);
  return frameResultJson(frame, evaluateFrame(createAnalyser(), frame, intake.settings, { second: true, all: false }));
}
const row = (json: FrameResult, check: string) => {
  const found = json.checks.find((each) => each.check === check);
  if (!found) throw new Error(`no ${check} among ${json.checks.map((each) => each.check).join(', ')}`);
  return found;
};
const near = (a: number | null | undefined, b: number, tolerance: number): void =>
  expect(Math.abs((a ?? NaN) - b) / Math.abs(b), `${a} against ${b}`).toBeLessThan(tolerance);

const eurocode: Rows = [
  ['strength check', 'EN 1993-1-1'],
  ['gamma M0', 1],
  ['gamma M1', 1.1],
];
/** Direct analysis: second order, notional loads, reduced stiffness. */
const direct: Rows = [
  ['analysis', 'second order'],
  ['imperfections', 'AISC 360'],
  ['stiffness reduction', 'AISC 360'],
];

describe('members by EN 1993-1-1, from the sheets', () => {
  it('has a row for each clause: action, resistance, ratio, combination, reference', async () => {
    const json = await solve(beam(eurocode));
    expect(json.checks.map((each) => each.check)).not.toContain('normal stress');
    // M = 1.35·20·6²/8; Wpl of an IPE 360 1,019 cm³ (EN 10365 tables)
    const bending = row(json, '6.2.5 bending');
    near(bending.value, 121.5e3, 1e-9);
    near(bending.limit, 1019e-6 * 355e6, 2e-3);
    expect(bending).toMatchObject({ subject: 'AB', combination: 'C1', verdict: 'within', reason: null });
    expect(bending.reference).toContain('EN 1993-1-1 6.2.5');
    near(row(json, '6.2.6 shear').value, 81e3, 1e-9);
    near(row(json, '6.3.1 flexural buckling').value, 200e3, 1e-9);
    expect(row(json, '6.3.3 bending and compression')).toMatchObject({ combination: 'C2', limit: 1 });
    for (const check of json.checks) if (check.ratio !== null && check.value !== null && check.check.startsWith('6')) near(check.ratio, check.value / check.limit!, 1e-12); // prettier-ignore
  });

  it('takes γM0 and γM1 from Setup: resistances fall by them', async () => {
    const [plain, factored] = await Promise.all([
      solve(beam([['strength check', 'EN 1993-1-1']])),
      solve(beam([['strength check', 'EN 1993-1-1'], ['gamma M0', 1.05], ['gamma M1', 1.1]])), // prettier-ignore
    ]);
    near(row(factored, '6.2.5 bending').limit, row(plain, '6.2.5 bending').limit! / 1.05, 1e-12);
    near(row(factored, '6.3.1 flexural buckling').limit, row(plain, '6.3.1 flexural buckling').limit! / 1.1, 1e-12);
  });

  it('a rafter without restraints is held to its own length: a longer one is weaker', async () => {
    const [held, free] = [await solve(beam(eurocode)), await solve(beam(eurocode, {}, ['IPE 360', 6]))];
    expect(row(free, '6.3.2 lateral-torsional buckling').limit).toBeLessThan(row(held, '6.3.2 lateral-torsional buckling').limit!); // prettier-ignore
  });

  it('says what it does not check, and never passes it', async () => {
    const typed = {
      Sections: [
        ['section', 'A', 'I', 'depth'],
        ['X', 72.7, 16270, 360],
      ],
    };
    const json = await solve(beam(eurocode, typed, ['X']));
    expect(json.verdict).toBe('not checked');
    const members = json.checks.filter((each) => each.subject === 'AB' && each.check !== 'deflection');
    expect(members.length).toBeGreaterThan(0);
    expect(members.every((each) => each.verdict === 'not checked' && each.ratio === null && each.reason)).toBe(true);
  });

  it('a slender plate in compression is not checked, by its name', async () => {
    const plate = {
      Sections: [
        ['section', 'shape', 'h', 'b', 'tw', 'tf'],
        ['X', 'I', 600, 200, 4, 10],
      ],
    };
    const json = await solve(beam(eurocode, plate, ['X']));
    expect(json.verdict).toBe('not checked');
    expect(json.notChecked.join('; ')).toMatch(/class 4: slender web/);
  });

  it('pieces of a span that are not alike are not checked as one member', async () => {
    const json = await solve(
      beam(eurocode, {
        Nodes: [['frame', 'node', 'x', 'y'], ['F', 'A', 0, 0], ['F', 'B', 6, 0], ['F', 'M', 3, 0]],
        Members: [['frame', 'member', 'start', 'end', 'section', 'material', 'role', 'span'], ['F', 'AM', 'A', 'M', 'IPE 360', 'S355', 'beam', 'long'], ['F', 'MB', 'M', 'B', 'IPE 330', 'S355', 'beam', 'long']],
        'Member loads': [['frame', 'case', 'member', 'load', 'value'], ['F', 'dead', 'AM', 'distributed', -20]],
      }), // prettier-ignore
    );
    expect(row(json, 'EN 1993-1-1')).toMatchObject({ subject: 'long', reason: 'pieces of the span have different sections' });
  });
});

describe('members by AISC 360-22, from the sheets', () => {
  const steel = {
    Materials: [
      ['material', 'grade'],
      ['S355', 'A992'],
    ],
  };

  it('LRFD by the direct analysis method has a row for each clause, ASD reads the same strength by its safety factor', async () => {
    const lrfd = await solve(beam([['strength check', 'AISC 360-22 LRFD'], ...direct], steel, ['HE 220 B']));
    const asd = await solve(beam([['strength check', 'AISC 360-22 ASD'], ...direct], steel, ['HE 220 B']));
    // φ 0.90, Ω 1.67 (F1)
    near(row(lrfd, 'F2 bending').limit! / 0.9, row(asd, 'F2 bending').limit! * 1.67, 1e-9);
    near(row(lrfd, 'E3 flexural buckling').limit! / 0.9, row(asd, 'E3 flexural buckling').limit! * 1.67, 1e-9);
    expect(row(lrfd, 'H1.1 combined').combination).toMatch(/^C[12] [→←]$/);
  });

  it.each([
    ['of first order', [] as Rows],
    ['of second order without notional loads', [['analysis', 'second order']] as Rows],
    ['with stiffness as it is and the length in the plane left blank', direct.slice(0, 2)],
  ])('is not checked with an analysis %s', async (_, analysis) => {
    const json = await solve(beam([['strength check', 'AISC 360-22 LRFD'], ...analysis], steel));
    expect(json.verdict).toBe('not checked');
    const found = row(json, 'AISC 360-22 LRFD');
    expect(found).toMatchObject({ subject: 'AB', verdict: 'not checked', ratio: null });
    expect(found.reason).toMatch(/second-order analysis with AISC 360 imperfections/);
    expect(json.checks.some((each) => /^[A-H]\d/.test(each.check) && each.ratio !== null)).toBe(false);
  });
});

describe('the workbook of a batch checked by a design code', () => {
  async function workbook(sheets: WrittenSheets): Promise<Map<string, readonly ReportRow[]>> {
    const intake = await readIntake([{ name: 'input.xlsx', bytes: await writtenElsewhere(sheets) }]);
    const batch = await evaluateBatch(intake, { all: false });
    const found = new Map<string, readonly ReportRow[]>();
    for (const sheet of await reportSheets(batch)) {
      const rows: ReportRow[] = [sheet.columns.map((column) => column.heading)];
      for await (const each of sheet.rows()) rows.push(each);
      found.set(sheet.name, rows);
    }
    batch.close();
    return found;
  }
  const lines = (rows: readonly ReportRow[] | undefined): string[] => (rows ?? []).map((each) => each.join(' | '));

  it('has forces and moments with their units, the calculation of every clause, and says what was checked', async () => {
    const book = await workbook(beam([...eurocode, ['national annex', 'recommended values']]));
    const bending = book.get('Members')?.find((each) => each[4] === '6.2.5 bending');
    expect(bending?.[8]).toBeCloseTo(121.5, 6);
    expect(bending?.[10]).toBe('kN·m');
    const working = book.get('Working') ?? [];
    expect(working[0]).toEqual(['frame', 'where', 'check', 'combination', 'step', 'calculation', 'clause', 'verdict']);
    const clauses = (book.get('Members') ?? []).slice(1).map((each) => each[4]).filter((check) => /^\d/.test(String(check))); // prettier-ignore
    expect([...new Set(working.slice(1).map((each) => each[2]))]).toEqual(clauses);
    expect(lines(working).some((line) => /√|\//.test(line) && line.includes(' = '))).toBe(true);
    expect(lines(working).join()).not.toMatch(/NaN|undefined/);
    const cover = lines(book.get('Cover')).join('\n');
    for (const said of ['gamma M1 | 1.1', 'national annex | recommended values', 'members by EN 1993-1-1', 'interaction by Annex B', 'holes and net sections'])
      expect(cover, said).toContain(said); // prettier-ignore
  });

  it('with elastic stress has no such sheet, and no word of a code’s settings', async () => {
    const book = await workbook(beam([]));
    expect(book.has('Working')).toBe(false);
    expect(lines(book.get('Cover')).join('\n')).not.toMatch(/gamma|load height/);
  });
});
