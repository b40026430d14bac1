/** The sample sheets: what each is there to show, through the same reading as everybody's. */
import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { readIntake } from '@/lib/intake/read-intake';
import type { Intake } from '@/lib/intake/intake';
import { errorCodes, noteCodes, warningCodes } from '@/lib/problems/problem';
import { evaluateFrame } from '@/lib/results/evaluate';
import { evaluateBatch } from '@/worker/command/evaluate-batch';

const folder = new URL('../../samples/', import.meta.url).pathname;
const read = (...names: string[]): Promise<Intake> =>
  readIntake(names.map((name) => ({ name: name.split('/').at(-1) ?? name, bytes: readFileSync(join(folder, name)) })));

function verdicts(intake: Intake): Record<string, number> {
  const counts: Record<string, number> = {};
  const analyser = createAnalyser();
  for (const { frame } of intake.frames) {
    const verdict = frame ? evaluateFrame(analyser, frame, intake.settings, { second: false, all: false }).verdict : 'stopped';
    counts[verdict] = (counts[verdict] ?? 0) + 1;
  }
  return counts;
}

describe('samples', () => {
  it.each([
    ['portal-sheds-240.xlsx', 240],
    ['brackets-150.xlsx', 150],
    ['pipe-rack-24.xlsx', 24],
    ['canopies-us-36.xlsx', 36],
    ['slender-sheds-24.xlsx', 24],
    ['braced-bents-12.xlsx', 12],
    ['direct-analysis-us-9.xlsx', 9],
    ['code-sheds-24.xlsx', 24],
    ['code-halls-us-9.xlsx', 9],
    ['messy-mended.xlsx', 36],
    ['families/portal.xlsx', 2],
    ['families/bracket.xlsx', 2],
  ])('%s reads without an error or a warning, every frame of it', async (name, frames) => {
    const intake = await read(name);
    expect(intake.problems.filter((each) => each.severity !== 'note')).toEqual([]);
    expect(intake.frames.map((each) => each.frame !== null)).toEqual(Array.from({ length: frames }, () => true));
  });

  it('the CSV set with semicolons and decimal commas reads as one batch', async () => {
    const names = readdirSync(join(folder, 'walkways-csv')).map((name) => `walkways-csv/${name}`);
    const intake = await read(...names);
    expect(intake.problems.filter((each) => each.severity === 'error')).toEqual([]);
    expect(intake.frames).toHaveLength(18);
    const tip = intake.frames[1]?.frame?.nodes.find((node) => node.place === 'tip');
    expect(tip?.x_m).toBeCloseTo(1.2625, 12);
  });

  it('the portals saved again by LibreOffice are the same frames', async () => {
    const [ours, saved] = [await read('portal-sheds-240.xlsx'), await read('portal-sheds-240-saved-by-calc.xlsx')];
    expect(saved.frames).toEqual(ours.frames);
    expect(saved.settings).toEqual(ours.settings);
  });

  it('most portals come out within, near or over, and few not checked', async () => {
    const counts = verdicts(await read('portal-sheds-240.xlsx'));
    for (const verdict of ['within', 'near', 'over', 'not checked']) expect(counts[verdict]).toBeGreaterThan(0);
    expect(counts['not checked']).toBeLessThan(24);
  });

  it.each([
    ['slender-sheds-24.xlsx', { imperfections: 'EN 1993-1-1', shearDeformation: true }],
    ['direct-analysis-us-9.xlsx', { imperfections: 'AISC 360', stiffnessReduction: 'AISC 360' }],
    ['code-sheds-24.xlsx', { imperfections: 'EN 1993-1-1', strengthCheck: 'EN 1993-1-1' }],
    ['code-halls-us-9.xlsx', { imperfections: 'AISC 360', strengthCheck: 'AISC 360-22 LRFD' }],
  ] as const)('%s is solved in second order, leaning both ways, and most of it checked', async (name, settings) => {
    const intake = await read(name);
    expect(intake.settings).toMatchObject({ analysis: 'second order', ...settings });
    const analyser = createAnalyser();
    let checked = 0;
    for (const { id, frame } of intake.frames) {
      const { status, failure, states, verdict } = evaluateFrame(analyser, frame!, intake.settings, { second: true, all: false });
      expect(status, `${id}: ${failure?.message}`).toBe('solved');
      const strength = states.filter((state) => state.purpose === 'strength');
      expect(strength.map((state) => [state.order, state.name.endsWith('→'), state.method?.imperfection])).toEqual(
        strength.map((_, i) => (i % 2 === 0 ? [2, true, 'right'] : [2, false, 'left'])),
      );
      if (verdict !== 'not checked') checked += 1;
    }
    expect(checked).toBeGreaterThan(0.7 * intake.frames.length);
  });

  it('bents braced by rods: one of each pair is slack under wind, the other one with the wind turned', async () => {
    const intake = await read('braced-bents-12.xlsx');
    const analyser = createAnalyser();
    for (const { id, frame } of intake.frames) {
      const { status, failure, states } = evaluateFrame(analyser, frame!, intake.settings, { second: true, all: false });
      expect(status, `${id}: ${failure?.message}`).toBe('solved');
      expect(states.every((state) => state.kind === 'combination')).toBe(true);
      const slackIn = (name: string): string[] =>
        states.find((state) => state.name === name)!.method!.slack.map((member) => frame!.members[member]!.id);
      for (const lean of ['→', '←']) {
        const [right, left] = [slackIn(`C3 (+) ${lean}`), slackIn(`C3 (−) ${lean}`)];
        // R rises to the right and is pulled by wind to the right; L is its mirror
        expect(right.length, id).toBeGreaterThan(0);
        expect(
          right.every((member) => member.startsWith('L')),
          `${id} ${right.join()}`,
        ).toBe(true);
        expect(
          left.every((member) => member.startsWith('R')),
          `${id} ${left.join()}`,
        ).toBe(true);
      }
    }
  });

  it('the messy workbook stops only the frames its slips touch', async () => {
    const intake = await read('messy.xlsx');
    const running = intake.frames.filter((each) => each.frame !== null).map((each) => each.id);
    expect(running).toEqual(expect.arrayContaining(['Q23', 'Q25', 'Q27', 'Q28', 'Q29', 'Q31', 'Q35', 'Q36']));
    expect(running).not.toEqual(expect.arrayContaining(['Q01']));
  });

  it('every problem code is met in the messy workbook or in a small file beside it', async () => {
    const met = new Set<string>();
    for (const name of ['messy.xlsx', ...readdirSync(join(folder, 'problems')).map((each) => `problems/${each}`)]) {
      const intake = await read(name);
      const batch = await evaluateBatch(intake, { all: false });
      for (const problem of batch.problems) met.add(problem.code);
      batch.close();
    }
    const missing = [...errorCodes, ...warningCodes, ...noteCodes].filter((code) => !met.has(code));
    expect(missing).toEqual([]);
  });
});
