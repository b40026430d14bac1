/** A section tried on frames of the samples, against the sheets changed and read again. */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { applyChanges } from '@/lib/changes/apply-changes';
import type { Intake } from '@/lib/intake/intake';
import { readIntake } from '@/lib/intake/read-intake';
import { readRows } from '@/lib/intake/rows/read-rows';
import type { Frame } from '@/lib/model/frame';
import { evaluateFrame } from '@/lib/results/evaluate';
import { probeSections } from '@/lib/sizing/probe-sections';
import type { SectionTaken } from '@/lib/sizing/section-taken';
import { trySections } from '@/lib/sizing/try-sections';

const samples = new URL('../../samples', import.meta.url).pathname;
const read = (name: string) => readIntake([{ name, bytes: readFileSync(join(samples, name)) }]);
const identity = { name: '', sha256: '', files: [] };
const analyser = createAnalyser();
const frameOf = (intake: Intake, of: string) => intake.frames.find(({ id }) => id === of)?.frame as Frame;

function takenOf({ sheets, rows }: Intake, names: readonly string[], materials: readonly string[]): readonly SectionTaken[] {
  return probeSections({ sheets, rows }, {}, names.map((name) => ({ name, materials }))).map((found) => {
    if ('unfit' in found) throw new Error(found.unfit);
    return found;
  });
} // prettier-ignore

describe('a section tried', () => {
  it.each(['slender-sheds-24.xlsx', 'code-sheds-24.xlsx'])(
    'on a role of %s gives the results of the sheets after the change: second order, design code',
    async (name) => {
      const intake = await read(name);
      const frame = intake.frames.find((one) => one.frame)?.frame as Frame;
      const materials = [...new Set(frame.materials.map((one) => one.name))];
      const [taken] = takenOf(intake, ['IPE 550'], materials);
      const change = { kind: 'section' as const, what: { role: 'rafter' as const }, to: 'IPE 550' };
      const after = readRows({ ...applyChanges(intake, [change], 'An analyst', new Map()), identity, problems: [] });
      const sheets = after.frames.find(({ id }) => id === frame.id)?.frame as Frame;
      const here = trySections(analyser, frame, intake.settings, [{ of: { by: 'role', name: 'rafter' }, taken: taken as SectionTaken }]); // prettier-ignore
      if ('unfit' in here) throw new Error(here.unfit);
      const there = evaluateFrame(analyser, sheets, intake.settings, { second: true, all: false });
      expect(there.status).toBe('solved');
      expect(here.evaluation.checks).toEqual(there.checks);
      expect(here.evaluation.states.map(({ displacements }) => displacements)).toEqual(there.states.map(({ displacements }) => displacements)); // prettier-ignore
    },
  );

  it.each(['X01', 'X03'])(
    'on the rods and columns of %s, of which some are slack, gives what its sheets then give',
    async (id) => {
      const intake = await read('braced-bents-12.xlsx');
      const frame = frameOf(intake, id);
      const rod = id === 'X01' ? 'rod 30' : 'rod 24';
      const [rods, columns] = takenOf(intake, [rod, 'HE 200 A'], ['S355']) as [SectionTaken, SectionTaken];
      const changes = [
        { kind: 'section' as const, what: { role: 'brace' as const }, to: rod },
        { kind: 'section' as const, what: { role: 'column' as const }, to: 'HE 200 A' },
      ];
      // rows that every bent shares are not touched: each member has a row of its own
      const after = readRows({ ...applyChanges(intake, changes, 'An analyst', new Map()), identity, problems: [] });
      const sheets = frameOf(after, id);
      const here = trySections(analyser, frame, intake.settings, [
        { of: { by: 'role', name: 'brace' }, taken: rods },
        { of: { by: 'role', name: 'column' }, taken: columns },
      ]);
      if ('unfit' in here) throw new Error(here.unfit);
      expect(here.frame.members.filter(({ tensionOnly }) => tensionOnly)).not.toEqual([]);
      expect(here.frame).toEqual(sheets);
      const there = evaluateFrame(analyser, sheets, intake.settings, { second: true, all: false });
      expect(there.status).toBe('solved');
      expect(there.states.some(({ method }) => (method?.slack.length ?? 0) > 0)).toBe(true);
      expect(here.evaluation).toEqual(there);
      // and is another answer than that of the sections it has
      const before = evaluateFrame(analyser, frame, intake.settings, { second: true, all: false });
      expect(before.checks.map(({ ratio }) => ratio)).not.toEqual(there.checks.map(({ ratio }) => ratio));
    },
  );

  it('of two tries for a member the later holds, and what is turned needs a minor axis', async () => {
    const intake = await read('slender-sheds-24.xlsx');
    const frame = intake.frames.find((one) => one.frame)?.frame as Frame;
    const materials = [...new Set(frame.materials.map((one) => one.name))];
    const [first, second] = takenOf(intake, ['IPE 500', 'IPE 600'], materials) as [SectionTaken, SectionTaken];
    const member = frame.members[0]?.id ?? '';
    const here = trySections(analyser, frame, intake.settings, [
      { of: { by: 'section', name: frame.sections[frame.members[0]?.section ?? 0]?.name ?? '' }, taken: first },
      { of: { by: 'member', name: member }, taken: second },
    ]);
    if ('unfit' in here) throw new Error(here.unfit);
    expect(here.frame.sections[here.frame.members[0]?.section ?? 0]?.name).toBe('IPE 600');
    const turned = { ...frame, members: frame.members.map((one) => ({ ...one, turned: true })) };
    const bare = { ...first, section: { ...first.section, properties: { ...first.section.properties, Iminor_m4: null } } };
    const refused = trySections(analyser, turned, intake.settings, [{ of: { by: 'member', name: member }, taken: bare }]);
    expect(refused).toEqual({ unfit: `${member} is turned, and of IPE 500 the minor axis is not known.` });
  });
});
