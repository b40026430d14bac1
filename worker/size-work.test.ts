import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { findLatestJob } from '@/db/queries/jobs';
import { insertIntake } from '@/db/queries/intake';
import { findSizing, listPieces, type SizingRecord } from '@/db/queries/sizing';
import { engineVersion } from '@/lib/analysis/engine-version';
import type { Intake } from '@/lib/intake/intake';
import { readIntake } from '@/lib/intake/read-intake';
import type { SizingGroup } from '@/lib/sizing/sizing';
import { askForSizing, askToStopSizing } from './ask';
import type { Pools } from './pools';
import { WorkQueue } from './queue';
import { pretendPools, readingRevision, testDatabase, testOffice, type TestDatabase } from './test-office';
import { listSizing, sizeChunk, type SizeTask } from './threads/size';

let database: TestDatabase;
let logged: string[] = [];
beforeEach(async () => {
  database = await testDatabase();
  logged = [];
});
afterEach(() => database.remove());

const sizing = { listSizing, sizeChunk };
const queueOf = (pools: Pools, onChunk?: () => void): WorkQueue => {
  const log = (message: string): number => logged.push(message);
  return new WorkQueue({ database, file: database.file, pools, log, ...(onChunk ? { onChunk } : {}) });
};

/** Brackets of one arm and its post, each with a load of its own; by hand below. */
async function brackets(count: number, sections = 'IPE 100'): Promise<Intake> {
  const frames = Array.from({ length: count }, (_, i) => `F${i + 1}`);
  const sheet = (rows: readonly (readonly (string | number)[])[]): string => rows.map((row) => row.join(',')).join('\n');
  const files = {
    'Setup.csv': sheet([['setting', 'value'], ['material', 'S275'], ['stability', 'by others'], ['deflection ratio', 'none'], ['sway ratio', 'none']]),
    'Nodes.csv': sheet([['frame', 'node', 'x', 'y'], ...frames.flatMap((f) => [[f, 'A', 0, 0], [f, 'B', 0, 3], [f, 'C', 2, 3]])]),
    'Members.csv': sheet([['frame', 'member', 'start', 'end', 'section', 'role'], ...frames.flatMap((f) => [[f, 'AB', 'A', 'B', 'HE 200 A', 'column'], [f, 'BC', 'B', 'C', sections, 'arm']])]),
    'Supports.csv': sheet([['frame', 'node', 'ux', 'uy', 'rz'], ...frames.map((f) => [f, 'A', 'fixed', 'fixed', 'fixed'])]),
    'Load cases.csv': sheet([['case', 'kind'], ['dead', 'dead']]),
    'Node loads.csv': sheet([['frame', 'case', 'node', 'Fy'], ...frames.map((f, i) => [f, 'dead', 'C', -5 - i])]),
    'Combinations.csv': sheet([['combination', 'purpose', 'dead'], ['C1', 'strength', 1], ['S1', 'service', 1]]),
  };
  return readIntake(Object.entries(files).map(([name, text]) => ({ name, bytes: new TextEncoder().encode(text) })));
} // prettier-ignore

async function revisionOf(intake: Intake) {
  const made = await readingRevision(database, await testOffice(database, 'North'));
  insertIntake(database.raw, made.office, made.revision, intake);
  return made;
}

const arm: SizingGroup = { by: 'role', name: 'arm', range: 'IPE', minDepth_m: null, maxDepth_m: 0.3 };
type Of = { readonly office: number; readonly revision: number; readonly person: number };
const stored = async (of: Of, id: number | undefined): Promise<SizingRecord> =>
  (await findSizing(database.db, of.office, of.revision, id ?? 0))!;

describe('a sizing', () => {
  it('finds in the queue what hand calculation gives, and says which engine and input it is of', async () => {
    const of = await revisionOf(await brackets(6));
    const queue = queueOf(pretendPools(sizing));
    const id = await askForSizing(queue, database, { ...of, request: { groups: [arm] } });
    await queue.idle();
    expect(logged).toEqual([]);
    const { state, found, engine, inputHash, done, total, person } = await stored(of, id);
    expect({ state, engine, person, done: done === total }).toEqual({ state: 'done', engine: engineVersion, person: 'Ana Lyst', done: true }); // prettier-ignore
    expect(inputHash).toMatch(/^[0-9a-f]{64}$/);
    // worst: 10 kN at 2 m, M = 20 kN·m; 0.6 × 275 = 165 N/mm²: W ≥ 121.2 cm³. EN 10365: IPE A 180 of 15.4 kg/m has 120.1 cm³,
    // just too little; next in mass are IPE 160, 15.8 kg/m and 108.7 cm³, then IPE AA 200, 18.0 kg/m and 156 cm³
    expect(found).toMatchObject({ outcome: 'converged', together: { frames: 6, fit: 6, frame: 'F6' } });
    expect(found?.groups[0]).toMatchObject({ chosen: 'IPE AA 200', before: ['IPE 100'], members: 6, frames: 6 });
    const light = found?.groups[0]?.candidates.find(({ name }) => name === 'IPE 160');
    // 108.7 cm³ × 165 N/mm² = 17.9 kN·m: over from 9 kN on, which are two of the six
    expect(light).toMatchObject({ over: 2, notChecked: 0, lookedAt: 6, frames: 6, frame: 'F6' });
    expect(listPieces(database.raw, id ?? 0)).toEqual([]);
  });

  it('stopped by the end of the server is taken up where it was, and finds the same', async () => {
    const of = await revisionOf(await brackets(6));
    let chunks = 0;
    const first: WorkQueue = queueOf(pretendPools(sizing), () => {
      if (++chunks === 9) void first.close();
    });
    const id = await askForSizing(first, database, { ...of, request: { groups: [arm] } });
    await first.idle();
    expect((await stored(of, id)).state).toBe('running');
    const pieces = listPieces(database.raw, id ?? 0);
    expect(pieces.length).toBeGreaterThan(3);
    const asked = new Set(pieces.flatMap(({ choice, versions }) => versions.map((version) => `${choice.join()} ${version}`)));
    const again = {
      listSizing,
      sizeChunk: (task: SizeTask) => {
        for (const version of task.versions) expect(asked.has(`${task.choice.join()} ${version}`)).toBe(false);
        return sizeChunk(task);
      },
    };
    const second = queueOf(pretendPools(again));
    await second.start();
    await second.idle();
    const taken = (await stored(of, id)).found;
    const whole = queueOf(pretendPools(sizing));
    const other = await askForSizing(whole, database, { ...of, request: { groups: [arm] } });
    await whole.idle();
    expect(taken).toEqual((await stored(of, other)).found);
    expect(taken?.outcome).toBe('converged');
  });

  it('is stopped by a person, keeps what frames answered, and goes on when asked', async () => {
    const of = await revisionOf(await brackets(6));
    let chunks = 0;
    const queue: WorkQueue = queueOf(pretendPools(sizing), () => {
      if (++chunks === 7) void askToStopSizing(queue, database, { ...of, sizing: id ?? 0 });
    });
    const id = await askForSizing(queue, database, { ...of, request: { groups: [arm] } });
    expect(await askForSizing(queue, database, { ...of, request: { groups: [arm] } })).toBeUndefined();
    await queue.idle();
    const stopped = await stored(of, id);
    expect(stopped).toMatchObject({ state: 'stopped', found: null });
    expect(listPieces(database.raw, id ?? 0).length).toBeGreaterThan(0);
    expect(await askToStopSizing(queue, database, { ...of, sizing: id ?? 0 })).toBe(false);
    expect(await askForSizing(queue, database, { ...of, again: id ?? 0 })).toBe(id);
    await queue.idle();
    expect(await stored(of, id)).toMatchObject({ state: 'done', found: { outcome: 'converged' } });
    expect(await askForSizing(queue, database, { ...of, again: id ?? 0 })).toBeUndefined();
  });

  it('of members that would take two sections, of nobody, or of too many sections is refused with the reason', async () => {
    const of = await revisionOf(await brackets(2));
    const queue = queueOf(pretendPools(sizing));
    const ask = async (...groups: SizingGroup[]): Promise<SizingRecord> => {
      const id = await askForSizing(queue, database, { ...of, request: { groups } });
      await queue.idle();
      return stored(of, id);
    };
    const two = await ask(arm, { ...arm, by: 'section', name: 'IPE 100' });
    expect(two).toMatchObject({ state: 'failed', found: null });
    expect(two.reason).toContain('BC of F1');
    expect((await ask({ ...arm, name: 'strut' })).reason).toContain('role strut');
    expect((await ask({ ...arm, minDepth_m: 4, maxDepth_m: 5 })).reason).toContain('depths');
    expect((await ask({ ...arm, range: 'W', maxDepth_m: null })).reason).toContain('at most 150');
    expect(logged).toEqual([]);
  });

  it('whose chunk fails is failed, says so, and goes on when asked again', async () => {
    const of = await revisionOf(await brackets(3));
    let asked = 0;
    const broken = (task: SizeTask): unknown => {
      if (++asked === 3) throw new Error('out of order');
      return sizeChunk(task);
    };
    const queue = queueOf(pretendPools({ listSizing, sizeChunk: broken }));
    const id = await askForSizing(queue, database, { ...of, request: { groups: [arm] } });
    await queue.idle();
    const failed = await stored(of, id);
    expect(failed.state).toBe('failed');
    expect(failed.reason).toContain('start it again');
    expect(logged).toHaveLength(1);
    expect((await findLatestJob(database.db, of.office, of.revision, 'size'))?.state).toBe('failed');
    expect(await askForSizing(queue, database, { ...of, again: id ?? 0 })).toBe(id);
    await queue.idle();
    expect((await stored(of, id)).state).toBe('done');
  });

  it('leaves out no candidate silently: one that is not checked is out and counted', async () => {
    // no elastic modulus is known of a section typed by A and I alone, so its stress is not checked
    const intake = await readIntake([
      ...['Setup.csv,setting,value;material,S275;stability,by others;deflection ratio,none;sway ratio,none',
        'Sections.csv,section,A [cm2],I [cm4];light,5,5000;sound,80,9000',
        'Nodes.csv,frame,node,x,y;F1,A,0,0;F1,B,2,0;F2,A,0,0;F2,B,2,0',
        'Members.csv,frame,member,start,end,section,role;F1,AB,A,B,light,arm;F2,AB,A,B,IPE 300,arm',
        'Supports.csv,frame,node,ux,uy,rz;*,A,fixed,fixed,fixed',
        'Load cases.csv,case,kind;dead,dead', 'Node loads.csv,frame,case,node,Fy;*,dead,B,-5',
        'Combinations.csv,combination,purpose,dead;C1,strength,1;S1,service,1'].map((text) => {
        const [name = '', ...rest] = text.split(',');
        return { name, bytes: new TextEncoder().encode(rest.join(',').replaceAll(';', '\n')) };
      }),
    ]); // prettier-ignore
    const of = await revisionOf(intake);
    const queue = queueOf(pretendPools(sizing));
    const groups = [{ ...arm, range: 'sections of this batch', maxDepth_m: null }];
    const id = await askForSizing(queue, database, { ...of, request: { groups } });
    await queue.idle();
    const { found, reason } = await stored(of, id);
    expect(reason).toBeNull();
    expect(found?.groups[0]).toMatchObject({ chosen: 'IPE 300' });
    expect(found?.groups[0]?.candidates.find(({ name }) => name === 'light')).toMatchObject({
      over: 0,
      notChecked: 2,
      lookedAt: 2,
    });
  });
});
