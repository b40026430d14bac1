/** Sections of members changed through the API: what is touched, what alone runs again, what can be brought in anew, and who may. */
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { beforeAll, describe, expect, inject, it } from 'vitest';
import { errorShape } from '@/lib/api/error';
import { bring, revisionAddress, run, stateBecomes, type Brought } from '../../setup/bring';
import { signedIn, type Visitor } from '../../setup/visitor';

const { url, people } = inject('server');

interface Row {
  readonly cells: { readonly frame: string; readonly member: string; readonly section: string; readonly role: string };
}
interface Preview {
  readonly to: string;
  readonly frames: number;
  readonly count: number;
  readonly carriedOver: number;
  readonly touched: readonly { readonly frame: string }[];
  readonly from: readonly { readonly before: { readonly A_m2: number }; readonly after: { readonly A_m2: number } }[];
}
interface Results {
  readonly frames: readonly { readonly frame: string; readonly results: readonly unknown[] }[];
}

describe('a section changed', () => {
  let analyst: Visitor;
  let a: Brought;
  let one: Row['cells'];

  beforeAll(async () => {
    analyst = await signedIn(url, 'north', 'analyst');
    a = await bring(analyst, `/api/projects/${people.north.project}/batches`, 'samples/slender-sheds-24.xlsx');
    await run(analyst, a);
    const { rows } = await analyst.json<{ rows: readonly Row[] }>(`${revisionAddress(a)}/tables/members?role=rafter&size=1`);
    one = rows[0]!.cells;
  });

  const results = async (of: Brought) => JSON.parse(await (await analyst.fetch(`${revisionAddress(of)}/json`)).text()) as Results; // prettier-ignore
  const change = (to: string, what: unknown) => ({ kind: 'section', what, to });
  const preview = (to: string, what: unknown) => analyst.send(`${revisionAddress(a)}/changes/preview`, { change: change(to, what) }); // prettier-ignore
  const inFrame = () => ({ role: 'rafter', frame: one.frame });

  it('shows before anything runs which frames and members it touches, and leaves no trace', async () => {
    const before = await analyst.json(`/api/batches/${a.batch}/revisions`);
    const answer = await preview('IPE 600', inFrame());
    expect(answer.status).toBe(200);
    const told = (await answer.json()) as Preview;
    expect(told).toMatchObject({ to: 'IPE 600', frames: 1, touched: [{ frame: one.frame }] });
    expect(told.count).toBeGreaterThan(0);
    expect(told.from[0]!.after.A_m2).toBeGreaterThan(told.from[0]!.before.A_m2);
    expect(await analyst.json(`/api/batches/${a.batch}/revisions`)).toEqual(before);
  });

  it('runs only the frames that it touches; the others keep results that are the very same bytes', async () => {
    const body = { changes: [change('IPE 600', inFrame())], reason: 'stiffer rafters', run: false };
    const answer = await analyst.send(`${revisionAddress(a)}/changes`, body);
    expect(answer.status).toBe(201);
    const b = { batch: a.batch, revision: ((await answer.json()) as { revision: string }).revision };
    await stateBecomes(analyst, b, (state) => state === 'read' || state === 'run');
    // read and not run: only the frame that was changed waits
    const read = await results(b);
    expect(read.frames.filter(({ results: own }) => own.length === 0).map(({ frame }) => frame)).toEqual([one.frame]);
    await run(analyst, b);
    const [before, after] = [await results(a), await results(b)];
    const moved = after.frames.filter((frame, i) => JSON.stringify(frame) !== JSON.stringify(before.frames[i]));
    expect(moved.map(({ frame }) => frame)).toEqual([one.frame]);
    const { changes } = await analyst.json<{ changes: readonly unknown[] }>(`${revisionAddress(b)}/changes`);
    expect(changes).toMatchObject([{ kind: 'section', to: 'IPE 600', reason: 'stiffer rafters', person: 'analyst of north' }]);

    const input = await analyst.fetch(`${revisionAddress(b)}/input`);
    const folder = mkdtempSync(join(tmpdir(), 'tallyframe-input-'));
    writeFileSync(join(folder, 'again.xlsx'), Buffer.from(await input.arrayBuffer()));
    const again = await bring(analyst, `/api/projects/${people.north.project}/batches`, join(folder, 'again.xlsx'));
    rmSync(folder, { recursive: true });
    await run(analyst, again);
    expect(JSON.stringify((await results(again)).frames)).toBe(JSON.stringify(after.frames));
  });

  it.each<[string, string, unknown, RegExp]>([
    ['a section there is none of', 'IPE 310', { role: 'rafter' }, /no section “IPE 310”.*IPE 300/],
    ['a member there is none of', 'IPE 600', { members: [{ frame: 'no such frame', member: 'AB' }] }, /is no member/],
    ['no members named', 'IPE 600', {}, /Say which members/],
  ])('is refused with a sentence: %s', async (_, to, what, words) => {
    for (const answer of [
      await preview(to, what),
      await analyst.send(`${revisionAddress(a)}/changes`, { changes: [change(to, what)], reason: 'x' }),
    ]) {
      const { error } = errorShape.parse(await answer.json());
      expect([answer.status, error.code]).toEqual([400, 'bad-request']);
      expect(error.message).toMatch(words);
    }
  });

  it('is nobody’s of another office, no checker’s and no client’s', async () => {
    const status = async (office: 'north' | 'south', role: 'lead' | 'analyst' | 'checker' | 'client') => {
      const visitor = await signedIn(url, office, role);
      return (await visitor.send(`${revisionAddress(a)}/changes/preview`, { change: change('IPE 600', inFrame()) })).status;
    };
    expect(await status('south', 'analyst')).toBe(404);
    expect(await status('north', 'checker')).toBe(403);
    expect(await status('north', 'client')).toBe(404);
  });
});

describe('the section library', () => {
  it('is read in SI, and exported as a view of it', async () => {
    const analyst = await signedIn(url, 'north', 'checker');
    const { sections } = await analyst.json<{ sections: readonly { designation: string }[] }>('/api/sections?q=ipe300');
    expect(sections.map(({ designation }) => designation)).toEqual(['IPE 300']);
    const csv = await (await analyst.fetch('/api/sections?range=W&units=us&sort=-mass&format=csv')).text();
    expect(csv.split('\r\n')[0]).toContain('Mass [lb/ft]');
    const xlsx = await analyst.fetch('/api/sections?range=IPE&format=xlsx');
    expect(new Uint8Array(await xlsx.arrayBuffer()).slice(0, 2)).toEqual(new Uint8Array([0x50, 0x4b]));
    expect((await analyst.fetch('/api/sections?range=IPN')).status).toBe(400);
  });
});
