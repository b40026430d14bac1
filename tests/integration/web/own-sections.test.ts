/** The office's own sections and grades through the API: from a form to a batch, edited since, and out again; Changes sheets. */
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { errorShape } from '@/lib/api/error';
import { bring, revisionAddress, run, stateBecomes, type Brought } from '../../setup/bring';
import { signedIn, type Visitor } from '../../setup/visitor';

const { url, people } = inject('server');
const folder = mkdtempSync(join(tmpdir(), 'tallyframe-own-'));
afterAll(() => rmSync(folder, { recursive: true }));

const file = (name: string, text: string): string => {
  writeFileSync(join(folder, name), text);
  return join(folder, name);
};
const sheets = (section: string): string[] => [
  file('Setup.csv', 'setting,value\nmaterial,Mill 420\ndeflection ratio,none\nsway ratio,none\n'),
  file('Nodes.csv', 'frame,node,x [m],y [m]\nF1,A,0,0\nF1,B,0,4\nF1,C,6,4\nF2,A,0,0\nF2,B,0,4\nF2,C,6,4\n'),
  file('Members.csv', `frame,member,start,end,section,role\nF1,AB,A,B,HE 200 B,column\nF1,BC,B,C,${section},beam\nF2,AB,A,B,HE 200 B,column\nF2,BC,B,C,IPE 400,beam\n`),
  file('Supports.csv', 'frame,node,ux,uy,rz\nF1,A,fixed,fixed,fixed\nF1,C,free,fixed,free\nF2,A,fixed,fixed,fixed\nF2,C,free,fixed,free\n'),
  file('Load cases.csv', 'case,kind,self weight\ndead,dead,1\n'),
  file('Member loads.csv', 'frame,case,member,load,axes,direction,value [kN/m]\n*,dead,BC,distributed,global,y,-20\n'),
  file('Combinations.csv', 'combination,purpose,dead\nU1,strength,1.35\n'),
]; // prettier-ignore
const plate = { shape: 'I', h: '400', b: '180', tw: '8', tf: '14' };

interface Problems {
  readonly rows: readonly { readonly cells: { readonly code: string; readonly message: string } }[];
}
const problemsOf = (of: Brought): string => `${revisionAddress(of)}/tables/problems`;
interface Results {
  readonly frames: readonly unknown[];
}

describe('a section of the office’s own', () => {
  let lead: Visitor;
  let analyst: Visitor;
  let a: Brought;
  let part: number;
  const north = `/api/projects/${people.north.project}/batches`;
  const results = async (of: Brought): Promise<string> => (await analyst.fetch(`${revisionAddress(of)}/json`)).text();
  const frames = async (of: Brought): Promise<string> => JSON.stringify((JSON.parse(await results(of)) as Results).frames);
  const keep = (body: unknown) => lead.send('/api/own/sections', body);

  beforeAll(async () => {
    [lead, analyst] = await Promise.all([signedIn(url, 'north', 'lead'), signedIn(url, 'north', 'analyst')]);
    const made = await keep({ name: 'PG 400', units: 'metric', cells: plate, note: 'drawing 7' });
    expect(made.status).toBe(201);
    part = ((await made.json()) as { id: number }).id;
    const mill = { E: '210000', density: '7850', 'fy by thickness': '420 MPa to 16 mm; 400 MPa to 40 mm' };
    expect((await lead.send('/api/own/grades', { name: 'Mill 420', units: 'metric', cells: mill, note: '' })).status).toBe(201);
    a = await bring(analyst, north, ...sheets('PG 400'));
    await run(analyst, a);
  });

  it('comes into a batch that names it, and stays as it was when it is edited: not a byte of a result moves', async () => {
    const before = await results(a);
    expect(JSON.parse(before)).toMatchObject({ frames: [{ status: 'solved' }, { status: 'solved' }] });
    const edit = await lead.send(`/api/own/sections/${part}`, { units: 'metric', cells: { ...plate, tf: '20' }, note: 'drawing 7 rev. 1' }, 'PUT'); // prettier-ignore
    expect(await edit.json()).toMatchObject({ id: part, version: 2 });
    expect(await results(a)).toBe(before);
    // a change that leaves the section alone carries the version that was read on
    const body = { changes: [{ kind: 'setting', setting: 'nearLimit', value: '0.85' }], reason: 'as asked', run: true };
    const { revision } = (await (await analyst.send(`${revisionAddress(a)}/changes`, body)).json()) as { revision: string };
    const b = { batch: a.batch, revision };
    await stateBecomes(analyst, b, (state) => state === 'run');
    const { uses, versions } = await lead.json<{ uses: unknown[]; versions: unknown[] }>(`/api/own/sections/${part}`);
    expect(uses).toMatchObject([
      { letter: 'B', version: 1, frames: 1 },
      { letter: 'A', version: 1, frames: 1 },
    ]);
    expect(versions).toMatchObject([{ version: 2, note: 'drawing 7 rev. 1' }, { version: 1 }]);
    // unless it is taken anew: then the frame that has it runs again, and no other
    const take = { changes: [{ kind: 'own version', part: 'section', name: 'pg 400' }], reason: 'new drawing', run: true };
    const taken = (await (await analyst.send(`${revisionAddress(b)}/changes`, take)).json()) as { revision: string };
    const c = { batch: a.batch, revision: taken.revision };
    await stateBecomes(analyst, c, (state) => state === 'run');
    const of = async (one: Brought) => (JSON.parse(await results(one)) as Results).frames.map((frame) => JSON.stringify(frame));
    const [was, is] = [await of(b), await of(c)];
    expect(is.map((frame, i) => frame === was[i])).toEqual([false, true]);
    const { changes } = await analyst.json<{ changes: unknown[] }>(`${revisionAddress(c)}/changes`);
    expect(changes).toMatchObject([{ what: 'section PG 400', from: 'office v1', to: 'office v2' }]);
    expect((await analyst.send(`${revisionAddress(c)}/changes`, take)).status).toBe(400);
    // the sheets brought in anew take the latest
    const anew = await bring(analyst, north, ...sheets('PG 400'));
    await run(analyst, anew);
    expect(await frames(anew)).not.toBe(await frames(a));
  });

  it('is a row of the input workbook, which in an office without it gives the very same frames', async () => {
    const input = Buffer.from(await (await analyst.fetch(`${revisionAddress(a)}/input`)).arrayBuffer());
    writeFileSync(join(folder, 'input.xlsx'), input);
    const south = await signedIn(url, 'south', 'analyst');
    const there = await bring(south, `/api/projects/${people.south.project}/batches`, join(folder, 'input.xlsx'));
    await run(south, there);
    const of = JSON.parse(await (await south.fetch(`${revisionAddress(there)}/json`)).text()) as Results;
    expect(JSON.stringify(of.frames)).toBe(await frames(a));
    const alone = await bring(south, `/api/projects/${people.south.project}/batches`, ...sheets('PG 400'));
    const { rows } = await south.json<Problems>(problemsOf(alone));
    expect(rows.map(({ cells }) => cells.code)).toEqual(expect.arrayContaining(['unknown-section', 'unknown-material']));
  });

  it('says on the result workbook’s cover and in its list which version it is', async () => {
    const answer = await analyst.fetch(`${revisionAddress(a)}/csv`);
    const { unzipSync, strFromU8 } = await import('fflate');
    const entries = unzipSync(new Uint8Array(await answer.arrayBuffer()));
    const text = (name: string) => strFromU8(Object.entries(entries).find(([path]) => path.startsWith(name))![1]);
    expect(text('Cover')).toMatch(/section PG 400, in 1 frame".*office v1 \(drawing 7\)/);
    expect(text('Sections and materials')).toMatch(/HE 200 B.*standard/);
  });

  it.each<[string, unknown, number, string, RegExp]>([
    ['a standard name', { name: 'ipe300', units: 'metric', cells: plate, note: '' }, 400, 'name', /IPE 300 is a standard one/],
    ['a name that is there', { name: 'pg 400', units: 'metric', cells: plate, note: '' }, 409, 'name', /already/],
    [
      'flanges as deep as it is',
      { name: 'X', units: 'metric', cells: { ...plate, tf: '200' }, note: '' },
      400,
      'tf',
      /make no section/,
    ],
    ['a figure that is none', { name: 'X', units: 'metric', cells: { ...plate, h: '4oo' }, note: '' }, 400, 'h', /not a number/],
    ['no name', { name: ' ', units: 'metric', cells: plate, note: '' }, 400, 'name', /name/],
  ])('is refused with the field named: %s', async (_, body, status, field, words) => {
    const answer = await keep(body);
    const { error } = errorShape.parse(await answer.json());
    expect([answer.status, error.fields?.[field]?.[0] ?? error.message]).toEqual([status, expect.stringMatching(words)]);
  });

  it('is the lead’s to keep, all staff’s to read, and nobody’s of another office', async () => {
    expect((await analyst.send('/api/own/sections', { name: 'Y', units: 'metric', cells: plate, note: '' })).status).toBe(403);
    expect((await analyst.fetch(`/api/own/sections/${part}`)).status).toBe(200);
    const south = await signedIn(url, 'south', 'lead');
    expect((await south.fetch(`/api/own/sections/${part}`)).status).toBe(404);
    expect((await south.fetch(`/api/own/sections/${part}`, { method: 'DELETE' })).status).toBe(404);
    const { parts } = await south.json<{ parts: { id: number }[] }>('/api/own/sections');
    expect(parts.map(({ id }) => id)).not.toContain(part);
    expect((await lead.fetch(`/api/own/girders/${part}`)).status).toBe(404);
  });

  it('comes by the table too: looked at first, kept only without an error, the next version of a known one', async () => {
    const post = (keepIt: string, text: string) => {
      const form = new FormData();
      form.append('files', new Blob([text]), 'catalogue.csv');
      return lead.fetch(`/api/own/sections/import?units=metric&keep=${keepIt}`, { method: 'POST', body: form });
    };
    const good =
      'section,shape,h [mm],b [mm],tw [mm],tf [mm],A [cm2],source\nPG 400,I,400,180,8,16,88.1,maker\nPG 500,I,500,200,8,16,,maker\n';
    expect(await (await post('no', good)).json()).toMatchObject({
      kept: 0,
      records: [{ name: 'PG 400', version: 3 }, { version: 1 }],
    });
    expect(await (await post('yes', good)).json()).toMatchObject({ kept: 2, unchanged: 0 });
    expect(await (await post('yes', good)).json()).toMatchObject({ kept: 2, unchanged: 2 });
    const wrong = await post('yes', good.replace('500,200', '5OO,200'));
    const { error } = errorShape.parse(await wrong.json());
    expect([wrong.status, error.problems?.find(({ severity }) => severity === 'error')?.cell]).toEqual([422, 'C3']);
  });

  it('that is retired is offered no longer: sheets are told, what was read stays', async () => {
    const before = await results(a);
    expect((await lead.fetch(`/api/own/sections/${part}`, { method: 'DELETE' })).status).toBe(200);
    expect((await lead.fetch(`/api/own/sections/${part}`, { method: 'DELETE' })).status).toBe(409);
    const late = await bring(analyst, north, ...sheets('PG 400'));
    const { rows } = await analyst.json<Problems>(problemsOf(late));
    expect(rows.some(({ cells }) => cells.message.includes('no longer offered'))).toBe(true);
    expect(await results(a)).toBe(before);
  });

  it('may be given by a Changes sheet, before a first run as after one', async () => {
    const unrun = await bring(analyst, north, ...sheets('IPE 300'));
    const post = (search: string, text: string) => {
      const form = new FormData();
      form.append('files', new Blob([text]), 'Changes.csv');
      return analyst.fetch(`${revisionAddress(unrun)}/changes/sheet${search}`, { method: 'POST', body: form });
    };
    const sound = 'frame,member,section\nF1,BC,PG 500\n';
    expect(await (await post('', sound)).json()).toMatchObject({
      problems: [], refused: null, frames: 1, carriedOver: 1, changes: [{ to: 'PG 500', count: 1 }],
    }); // prettier-ignore
    const wrong = await post('?make=yes&reason=x', 'frame,member,section\nF1,XX,PG 500\n');
    const { error } = errorShape.parse(await wrong.json());
    expect([wrong.status, error.problems?.[0]?.cell]).toEqual([422, 'B2']);
    expect((await post('?make=yes', sound)).status).toBe(400);
    const made = await post('?make=yes&run=yes&reason=deeper+beams', sound);
    expect(made.status).toBe(201);
    const b = { batch: unrun.batch, revision: ((await made.json()) as { revision: string }).revision };
    await stateBecomes(analyst, b, (state) => state === 'run');
    const { rows } = await analyst.json<{ rows: { cells: { section: string } }[] }>(
      `${revisionAddress(b)}/tables/members?frame=F1&role=beam`,
    );
    expect(rows[0]?.cells.section).toBe('PG 500');
    const checker = await signedIn(url, 'north', 'checker');
    expect((await checker.fetch(`${revisionAddress(unrun)}/changes/sheet`)).status).toBe(403);
  });
});
