import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import type { Frame } from '@/lib/model/frame';
import { defaultSettings, type SettingOrigins, type Settings } from '@/lib/model/settings';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import { cantileverFrame } from '@/lib/results/cantilever-frame';
import { evaluateFrame } from '@/lib/results/evaluate';
import { frameResultJson, resultsJson } from '@/lib/results/json';
import { resultsSchema } from '@/lib/results/schema';

const settings: Settings = { ...defaultSettings, deflectionRatio: 200, swayRatio: 'none' };
const evaluate = (frame: Frame, all = false) => evaluateFrame(createAnalyser(), frame, settings, { second: true, all });
const near = (a: number, b: number): void => expect(Math.abs(a - b) / Math.abs(b), `${a} against ${b}`).toBeLessThan(1e-9);

function source(frames: readonly Frame[]): ReportSource {
  const origin = { source: 'default', cell: null } as const;
  const origins = Object.fromEntries(Object.keys(settings).map((name) => [name, origin])) as SettingOrigins;
  return {
    title: { project: null, batch: null, revision: null, state: null, prepared: null, checked: null, issued: null },
    engine: 'test',
    input: { name: 'a.xlsx', sha256: 'ab', files: [{ name: 'a.xlsx', sha256: 'ab', size: 12 }] },
    settings,
    origins: { ...origins, deflectionRatio: { source: 'sheet', cell: 'B3' } },
    problems: [],
    inputRows: () => [],
    frames: () => [
      ...frames.map((frame, i) => ({ ...frame, number: i + 1, frame, evaluation: evaluate(frame) })),
      { number: 9, id: 'F9', title: null, group: null, count: 1, note: null, frame: null, evaluation: null },
    ],
  };
}

async function written(from: ReportSource): Promise<string> {
  let text = '';
  for await (const piece of resultsJson(from, { all: false })) text += piece;
  return text;
}

describe('a cantilever in the results file', () => {
  const frame = cantileverFrame('K 1');
  const json = frameResultJson(frame, evaluate(frame));
  const [E, I, P, L] = [210e9, (0.1 * 0.2 ** 3) / 12, 2000, 3];
  const weight = 7850 * 0.02 * 9.80665;

  it('moves PL³/3EI at its tip, turns PL²/2EI, and is held by P and PL', () => {
    const tip = json.results.find((result) => result.name === 'tip')!;
    near(tip.displacements[1]!.uy, (-P * L ** 3) / (3 * E * I));
    near(tip.displacements[1]!.rz!, (-P * L ** 2) / (2 * E * I));
    near(tip.reactions[0]!.fy, P);
    near(tip.reactions[0]!.mz, P * L);
  });

  it('carries its own weight: M = −qL²/2 at the root', () => {
    const { M } = json.results[0]!.members[0]!.extremes;
    near(M.min, (-weight * L ** 2) / 2);
    expect(M.minAt).toBe(0);
  });

  it('has cases first, then combinations, with their purposes', () => {
    expect(json.results.map(({ name, kind, purpose }) => [name, kind, purpose])).toEqual([
      ['dead', 'case', null],
      ['tip', 'case', null],
      ['C1', 'combination', 'strength'],
      ['S1', 'combination', 'service'],
    ]);
  });

  it('weighs density times volume', () => {
    near(json.mass!, 7850 * 0.02 * 3);
  });

  it('is as stressed as M/W says, against 0.6 of its yield', () => {
    const stress = json.checks.find((check) => check.check === 'normal stress')!;
    const W = (0.1 * 0.2 ** 2) / 6;
    near(stress.value!, (P * L + (weight * L ** 2) / 2) / W);
    near(stress.limit!, 0.6 * 215e6);
    expect(stress).toMatchObject({ subject: 'AB', combination: 'C1', at: 0, verdict: 'within', reason: null });
  });

  it('names the frame as the subject of its critical load factor', () => {
    expect(json.checks.find((check) => check.check === 'critical load factor')?.subject).toBe('K 1');
  });

  it('writes no minus before a zero', () => {
    expect(JSON.stringify(json, (_, value: unknown) => (Object.is(value, -0) ? 'minus zero' : value))).not.toContain(
      'minus zero',
    );
  });

  it('gives the figures of a not checked row in its reason only', () => {
    for (const check of json.checks.filter((each) => each.verdict === 'not checked'))
      expect(check).toMatchObject({ value: null, limit: null, ratio: null, reason: expect.stringMatching(/./) as string });
  });
});

describe('with every combination asked for', () => {
  it('has a row for each, and the same governing ones among them', () => {
    const terms = [{ case: 1, factor: 1 }];
    const frame = cantileverFrame('K', {
      combinations: [
        { name: 'C1', purpose: 'strength', terms },
        { name: 'C2', purpose: 'strength', terms: [{ case: 1, factor: 0.5 }] },
      ],
    });
    const evaluation = evaluate(frame, true);
    const stress = (all: boolean) =>
      frameResultJson(frame, evaluation, { all }).checks.filter((check) => check.check === 'normal stress');
    expect(stress(false).map((check) => check.combination)).toEqual(['C1']);
    expect(stress(true).map((check) => check.combination)).toEqual(['C1', 'C2']);
  });
});

describe('a frame that moves freely', () => {
  const loose = cantileverFrame('K', { supports: [{ node: 0, ux: 'fixed', uy: 'fixed', rz: 'free', angle_rad: 0 }] });

  it('is not solved, says why, and shows no number', () => {
    const json = frameResultJson(loose, evaluate(loose));
    expect(json).toMatchObject({ status: 'not solved', verdict: 'not checked', governing: null, results: [], checks: [] });
    expect(json.certificate).toBeNull();
    expect(json.notChecked[0]).toMatch(/^not solved: /);
  });
});

describe('the results file', () => {
  it('fits its published schema, unread frames too', async () => {
    const results = resultsSchema.parse(JSON.parse(await written(source([cantileverFrame('K 1'), cantileverFrame('K 2')]))));
    expect(results.frames.map((frame) => [frame.frame, frame.status])).toEqual([
      ['K 1', 'solved'],
      ['K 2', 'solved'],
      ['F9', 'not solved'],
    ]);
    expect(results.settings['deflection ratio']).toEqual({ value: 200, defaulted: false, source: 'sheet' });
    expect(results.settings['stress factor']).toEqual({ value: 0.6, defaulted: true, source: 'default' });
    expect(Object.keys(results.settings)).toHaveLength(14);
  });

  it('says what was checked and what was not', async () => {
    const from = source([cantileverFrame('K')]);
    const results = resultsSchema.parse(JSON.parse(await written(from)));
    expect(results.checked).toContain('whether buckling is negligible');
    const byOthers = { ...from, settings: { ...settings, stability: 'by others' as const } };
    const alone = resultsSchema.parse(JSON.parse(await written(byOthers)));
    expect(alone.checked).not.toContain('buckling');
    expect(alone.notChecked).toContain('stress and movement only');
  });

  it('is the same bytes each time', async () => {
    expect(await written(source([cantileverFrame('K')]))).toBe(await written(source([cantileverFrame('K')])));
  });
});
