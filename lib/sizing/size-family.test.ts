/** Sizing a small family of real frames against trying every pair of sections on every frame. */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { applyChanges } from '@/lib/changes/apply-changes';
import { readIntake } from '@/lib/intake/read-intake';
import { readRows } from '@/lib/intake/rows/read-rows';
import type { Intake } from '@/lib/intake/intake';
import type { Frame } from '@/lib/model/frame';
import { evaluateFrame } from '@/lib/results/evaluate';
import { chooseSections } from '@/lib/sizing/choose-sections';
import { evaluateChoice } from '@/lib/sizing/evaluate-choice';
import { KnownAnswers } from '@/lib/sizing/known-answers';
import { probeSections } from '@/lib/sizing/probe-sections';
import { problemOf } from '@/lib/sizing/problem-of';
import { trySections } from '@/lib/sizing/try-sections';
import type { SectionTaken } from '@/lib/sizing/section-taken';
import type { SizingFound, SizingGroup } from '@/lib/sizing/sizing';

const samples = new URL('../../samples', import.meta.url).pathname;
const read = (name: string) => readIntake([{ name, bytes: readFileSync(join(samples, name)) }]);
const identity = { name: '', sha256: '', files: [] };
const analyser = createAnalyser();

const group = (name: string): SizingGroup => ({ by: 'role', name, range: 'some', minDepth_m: null, maxDepth_m: null });
const groups = [group('rafter'), group('column')];

function takenOf({ sheets, rows }: Intake, names: readonly string[], materials: readonly string[]): readonly SectionTaken[] {
  return probeSections({ sheets, rows }, {}, names.map((name) => ({ name, materials }))).map((found) => {
    if ('unfit' in found) throw new Error(found.unfit);
    return found;
  });
} // prettier-ignore

describe('a family sized', () => {
  let intake: Intake;
  let frames: readonly Frame[];
  let taken: readonly (readonly SectionTaken[])[];
  let found: SizingFound;
  const names = [
    ['IPE 180', 'IPE 220', 'IPE 240', 'IPE 270', 'IPE 330', 'IPE 400', 'IPE 500'],
    ['HE 100 B', 'HE 140 B', 'HE 160 B', 'HE 200 B', 'HE 240 B', 'HE 300 B'],
  ];

  beforeAll(async () => {
    intake = await read('portal-sheds-240.xlsx');
    frames = intake.frames.flatMap(({ frame }) => (frame ? [frame] : [])).slice(0, 8);
    const problem = problemOf(
      frames.map((frame) => ({ frame, frames: 1, off: 1, ratio: null })),
      groups,
    );
    if ('refused' in problem) throw new Error(problem.refused);
    taken = names.map((some, g) => takenOf(intake, some, problem.materials[g] ?? []));
    const sized = {
      ...problem,
      groups: problem.groups.map((one, g) => ({
        ...one,
        candidates: (taken[g] ?? []).map((each) => ({
          name: each.section.name,
          A_m2: each.section.properties.A_m2,
          taken: each,
          unfit: null,
        })),
      })),
    };
    const known = new KnownAnswers(Uint8Array.from(sized.frames, ({ mask }) => mask));
    const steps = chooseSections(sized, known);
    for (let step = steps.next(); ; step = steps.next()) {
      if (step.done) {
        found = step.value;
        break;
      }
      for (const { choice, frames: some } of step.value)
        for (const f of some) {
          const of = choice.map((c, g) => taken[g]?.[c] ?? null);
          known.put(choice, f, evaluateChoice(analyser, frames[f] as Frame, intake.settings, groups, of));
        }
    }
  }, 60_000);

  it('has what trying every pair on every frame gives: each the lightest with the other as chosen', () => {
    const pair = (r: number, c: number): boolean =>
      frames.every((frame) => {
        const chosen = [taken[0]?.[r] ?? null, taken[1]?.[c] ?? null];
        return evaluateChoice(analyser, frame, intake.settings, groups, chosen).outcome === 'fits';
      });
    const chosen = found.groups.map(({ chosen: name }, g) => names[g]?.indexOf(name ?? '') ?? -1);
    expect(found.outcome).toBe('converged');
    const [rafter = -1, column = -1] = chosen;
    // areas grow along both lists: the first that fits is the lightest
    expect(names[0]?.findIndex((_, r) => pair(r, column))).toBe(rafter);
    expect(names[1]?.findIndex((_, c) => pair(rafter, c))).toBe(column);
    expect(rafter).toBeGreaterThan(0);
    expect(found.together).toMatchObject({ frames: 8, fit: 8 });
    expect(found.together?.ratio).toBeLessThanOrEqual(1);
  });

  it('gives the very results that the sheets give after the change', () => {
    const changes = found.groups.map(({ name, chosen }) => {
      const role = name === 'rafter' ? ('rafter' as const) : ('column' as const);
      return { kind: 'section' as const, what: { role }, to: chosen ?? '' };
    });
    const after = readRows({ ...applyChanges(intake, changes, 'An analyst', new Map()), identity, problems: [] });
    const tried = found.groups.map(({ name, chosen }, g) => ({
      of: { by: 'role' as const, name },
      taken: taken[g]?.find(({ section }) => section.name === chosen) as SectionTaken,
    }));
    for (const frame of frames) {
      const sheets = after.frames.find(({ id }) => id === frame.id)?.frame as Frame;
      const here = trySections(analyser, frame, intake.settings, tried);
      if ('unfit' in here) throw new Error(here.unfit);
      // parameters of its family, by which frames are filtered, are what the sheets say
      expect({ ...here.frame, family: null }).toEqual({ ...sheets, family: null });
      const there = evaluateFrame(analyser, sheets, intake.settings, { second: true, all: false });
      expect(here.evaluation.checks).toEqual(there.checks);
      expect(here.evaluation.states.map(({ endForces }) => endForces)).toEqual(there.states.map(({ endForces }) => endForces));
      expect(here.evaluation.mass).toBe(there.mass);
    }
  });
});
