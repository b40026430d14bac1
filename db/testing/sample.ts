/** Frames, readings and results to store in tests: plausible in shape, seeded in figures, computed by nobody. */
import type { Db, OpenDatabase, RawDatabase } from '@/db/open';
import { insertBatch } from '@/db/queries/batches';
import { insertIntake } from '@/db/queries/intake';
import { insertOffice } from '@/db/queries/offices';
import { insertPerson } from '@/db/queries/people';
import { insertProject } from '@/db/queries/projects';
import { type FrameResults, insertChunkResults, listWaiting } from '@/db/queries/results';
import { insertRevision } from '@/db/queries/revisions';
import type { FrameRead, Intake } from '@/lib/intake/intake';
import type { Frame, Member } from '@/lib/model/frame';
import { defaultSettings, type SettingName, type SettingOrigins } from '@/lib/model/settings';
import type { Problem } from '@/lib/problems/problem';
import type { Check, ResultState, Verdict } from '@/lib/results/result';

/** Numbers from 0 to 1, the same for the same seed (mulberry32). */
export function seeded(seed: number): () => number {
  let a = seed >>> 0;
  return () => {
    a = (a + 0x6d2b79f5) >>> 0;
    let t = a;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

const properties = {
  A_m2: 0.005, I_m4: 1e-4, Wtop_m3: 5e-4, Wbottom_m3: 5e-4, depth_m: 0.3, width_m: 0.15, AvTyped_m2: null, AvPeak_m2: 0.002,
  AvPeakTurned_m2: null, AvShear_m2: null, AvShearTurned_m2: null, Wpl_m3: null, Iminor_m4: null, Wminor_m3: null,
  WplMinor_m3: null, It_m4: null, Iw_m6: null, t_m: null,
}; // prettier-ignore

const member = (id: string, start: number, role: Member['role'], section: number): Member => ({
  id, start, end: start + 1, section, material: 0, role, startJoint: 'rigid', endJoint: 'rigid', axialOnly: false,
  tensionOnly: false, turned: false, span: null, lengthMajor_m: null, lengthMinor_m: null, lengthLtbTop_m: null,
  lengthLtbBottom_m: null, group: role === 'rafter' ? 'roof' : null,
}); // prettier-ignore

/** A portal of the given span, whose columns and rafters have the named sections. */
export function portal(id: string, span: number, column = 'IPE 300', rafter = 'IPE 270'): Frame {
  const node = (name: string, x_m: number, y_m: number, place: string | null) => ({ id: name, x_m, y_m, place });
  const section = (name: string) => ({
    name, designation: name, shape: 'I' as const, made: null, dimensions: null, properties, sources: {},
  }); // prettier-ignore
  const loadCase = (name: string) => ({
    name, kind: 'other' as const, selfWeight: 0, alternative: null, reversible: false, note: null,
  }); // prettier-ignore
  return {
    id,
    title: `Portal ${id}`,
    group: span > 20 ? 'wide' : null,
    count: 2,
    note: null,
    family: { name: 'portal', parameters: { span: { value: span, quantity: 'length' }, base: { value: 'pinned', quantity: 'choice' } } },
    nodes: [
      node('A', 0, 0, 'base'), node('B', 0, 5, null), node('C', span / 2, 7, 'apex'), node('D', span, 5, null),
      node('E', span, 0, 'base'),
    ],
    members: [member('AB', 0, 'column', 0), member('BC', 1, 'rafter', 1), member('CD', 2, 'rafter', 1), member('DE', 3, 'column', 0)],
    sections: [section(column), section(rafter)],
    materials: [
      { name: 'S235', grade: 'S235', standard: 'EN', E_Pa: 2.1e11, G_Pa: 8.1e10, fy_Pa: 2.35e8, fu_Pa: 3.6e8,
        density_kg_m3: 7850, expansion_perK: 1.2e-5, sources: {} },
    ],
    supports: [0, 4].map((at) => ({ node: at, ux: 'fixed', uy: 'fixed', rz: 'free', angle_rad: 0 })),
    cases: [loadCase('dead'), loadCase('snow')],
    nodeLoads: [],
    memberLoads: [],
    settlements: [],
    combinations: [
      { name: 'C1', purpose: 'strength', terms: [{ case: 0, factor: 1 }, { case: 1, factor: 1 }] },
      { name: 'S1', purpose: 'service', terms: [{ case: 1, factor: 1 }] },
    ],
    limits: [],
    notChecked: [],
  }; // prettier-ignore
}

const origins = Object.fromEntries(
  (Object.keys(defaultSettings) as SettingName[]).map((name) => [name, { source: 'default', cell: null }]),
) as unknown as SettingOrigins;

export function problem(more: Partial<Problem> = {}): Problem {
  return {
    severity: 'error', code: 'unknown-section', sheet: 'Members', file: 'shed.xlsx', row: 12, column: 'section', cell: 'E12',
    frames: ['F2'], found: 'IPE 305', message: 'IPE 305 is not in Sections. Add it there.', stopsAll: false, ...more,
  }; // prettier-ignore
}

/** A reading of these frames; null = stopped by errors. */
export function intakeOf(frames: readonly (Frame | null)[], more: Partial<Intake> = {}): Intake {
  const read: FrameRead[] = frames.map((frame, i) => ({ id: frame?.id ?? `F${i + 1}`, frame }));
  return {
    input: { name: 'shed.xlsx', sha256: 'ab'.repeat(32), files: [{ name: 'shed.xlsx', sha256: 'ab'.repeat(32), size: 3 }] },
    settings: { ...defaultSettings, title: 'Sheds' },
    origins,
    frames: read,
    problems: [problem(), problem({ severity: 'note', code: 'default-used', sheet: null, cell: null, frames: [] })],
    sheets: [{ name: 'Members', file: 'shed.xlsx', known: 'Members', headingRow: 1, rows: 4, headings: [], decimalMark: null }],
    rows: [1, 2, 3].map((row) => ({
      sheet: 'Members', row, cells: ['F1', null, `row ${row}`], part: 0, marks: row === 2 ? '{"0":"text"}' : null, changedBy: null,
    })), // prettier-ignore
    ...more,
  };
}

const verdictOf = (ratio: number | null): Verdict =>
  ratio === null ? 'not checked' : ratio > 1 ? 'over' : ratio >= 0.9 ? 'near' : 'within';

/** Results of a frame: every figure from the seed. */
export function resultsOf(version: number, frame: Frame, random: () => number): FrameResults {
  const names = [...frame.cases.map((one) => one.name), ...frame.combinations.map((one) => one.name)];
  const numbers = (length: number) => Float64Array.from({ length }, () => random() * 2000 - 1000);
  const states = names.map((name, i): ResultState => {
    const purpose = frame.combinations[i - frame.cases.length]?.purpose ?? null;
    const displacements = numbers(3 * frame.nodes.length);
    displacements[2] = NaN;
    return {
      name,
      kind: i < frame.cases.length ? 'case' : 'combination',
      purpose,
      factors: numbers(frame.cases.length),
      order: 1,
      criticalLoadFactor: purpose === 'strength' && random() > 0.3 ? 3 + 20 * random() : null,
      method: null,
      displacements,
      reactions: numbers(3 * frame.supports.length),
      endForces: numbers(6 * frame.members.length),
    };
  });
  const checks = frame.members.flatMap((one, i) =>
    ['normal stress', 'stability'].map((check): Check => {
      const ratio = random() < 0.15 ? null : Math.round(random() * 120) / 100;
      return {
        subjectKind: 'member', subject: one.id, check, combination: 'C1', at: random(), face: 'top', value: 1, limit: 2,
        quantity: 'stress', ratio, verdict: verdictOf(ratio), reason: ratio === null ? 'needs It' : null,
        reference: 'from memory', member: i, inputs: { N: random(), tiny: 5e-324 },
      }; // prettier-ignore
    }),
  );
  const worst = (some: readonly Check[]) => [...some].sort((a, b) => rank(b) - rank(a) || (b.ratio ?? -1) - (a.ratio ?? -1))[0]!;
  const governing = worst(checks);
  const members = frame.members.map((_, i) => {
    const { check, combination, at, ratio, verdict } = worst(checks.filter((one) => one.member === i));
    return { check, combination, at, N: random(), V: random(), M: random(), deflection: random(), ratio, verdict };
  });
  const extremes = states.map(() => numbers(14 * frame.members.length));
  const { subject, check, combination, ratio, verdict } = governing;
  return {
    version,
    frame,
    members,
    extremes,
    evaluation: {
      status: 'solved', failure: null, verdict, governing: { subject, check, combination, ratio },
      notChecked: verdict === 'not checked' ? ['stability: needs It'] : [], assumptions: ['lengths of the span'], mass: 100 + random(),
      states, checks, allChecks: null,
      certificate: { residual: 1e-15, equilibrium: 1e-14, condition: 1e4, digits: 11, second: null, secondReason: 'sampled' },
    },
  }; // prettier-ignore
}

const rank = (check: Check): number => ['within', 'near', 'not checked', 'over'].indexOf(check.verdict);

/** An office with one analyst, one project and one batch. */
export async function office(db: Db, name: string) {
  const id = await insertOffice(db, name);
  const email = `${name.toLowerCase()}@office.example`;
  const person = (await insertPerson(db, id, { email, name: `${name} analyst`, passwordHash: 'x', role: 'analyst' }))!;
  const project = (await insertProject(db, id, { name: 'Sheds', number: '24-01', person }))!;
  const batch = (await insertBatch(db, id, { project, name: 'Shed A', person }))!;
  return { office: id, person, project, batch };
}

export type Office = Awaited<ReturnType<typeof office>>;

/** A revision with what was read of it. */
export async function read({ db, raw }: OpenDatabase, of: Office, intake: Intake) {
  const revision = (await insertRevision(db, of.office, of))!;
  const stored = insertIntake(raw, of.office, revision.id, intake);
  return { ...revision, stored };
}

/** Runs all that waits of a revision, with figures from a seed. */
export function run(raw: RawDatabase, revision: number, person: number, random: () => number): number {
  const waiting = listWaiting(raw, revision, 100_000);
  return insertChunkResults(raw, waiting.map((one) => resultsOf(one.version, one.frame, random)), { person }).length; // prettier-ignore
}

/** All that an iteration gives. */
export async function collected<T>(iteration: AsyncIterable<T>): Promise<T[]> {
  const all: T[] = [];
  for await (const one of iteration) all.push(one);
  return all;
}
