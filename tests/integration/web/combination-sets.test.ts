/** The office's own combination sets, and combinations added, changed and left out, through the API. */
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { beforeAll, describe, expect, inject, it } from 'vitest';
import { bring, revisionAddress, run, stateBecomes, type Brought } from '../../setup/bring';
import { signedIn, type Visitor } from '../../setup/visitor';

const { url, people } = inject('server');

const sheets: Readonly<Record<string, string>> = {
  Setup: 'setting,value\nmaterial,S275\nstress factor,1\nstability,by others\ndeflection ratio,250\nsway ratio,none',
  Nodes: 'frame,node,x,y\nK1,A,0,0\nK1,B,2,0\nK2,A,0,0\nK2,B,3,0',
  Members: 'frame,member,start,end,section,role\nK1,AB,A,B,IPE 200,beam\nK2,AB,A,B,IPE 200,beam',
  Supports: 'frame,node,ux,uy,rz\nK1,A,fixed,fixed,fixed\nK2,A,fixed,fixed,fixed',
  'Load cases': 'case,kind,self weight\ndead,dead,1\nwind,wind,',
  'Node loads': 'frame,case,node,Fy\nK1,wind,B,2\nK2,wind,B,2',
  Combinations: 'combination,purpose,dead,wind\nU1,strength,1.35,1.5\nU2,strength,1,±1.5\nS1,service,1,1',
};
const content = {
  level: 'factored',
  provenance: 'The office’s handbook, 4.2',
  rules: [
    { from: 'handbook 4.2', purpose: 'strength', rule: '1.3/0.9 dead + 1.6 wind' },
    { from: 'handbook 4.3', purpose: 'service', suffix: 'service', rule: '1.0 dead + [1.0 wind]' },
  ],
};

interface Results {
  readonly frames: readonly { readonly results: readonly { readonly name: string; readonly kind: string }[] }[];
}

describe('combinations of the office and on screen', () => {
  let [lead, analyst]: Visitor[] = [];
  let a: Brought;
  let set: number;
  const folder = mkdtempSync(join(tmpdir(), 'tallyframe-sets-'));
  const north = () => analyst!;

  beforeAll(async () => {
    [lead, analyst] = [await signedIn(url, 'north', 'lead'), await signedIn(url, 'north', 'analyst')];
    const files = Object.entries(sheets).map(([name, text]) => {
      const path = join(folder, `${name}.csv`);
      writeFileSync(path, text);
      return path;
    });
    a = await bring(north(), `/api/projects/${people.north.project}/batches`, ...files);
    const kept = await lead!.send('/api/combination-sets', { name: `Depots ${Date.now()}`, ...content });
    expect(kept.status).toBe(201);
    set = ((await kept.json()) as { set: number }).set;
    return () => rmSync(folder, { recursive: true });
  });

  const ask = (changes: unknown[], of: Brought = a) =>
    north().send(`${revisionAddress(of)}/changes`, { changes, reason: 'as agreed' });
  async function made(changes: unknown[], of: Brought = a): Promise<Brought> {
    const answer = await ask(changes, of);
    expect(answer.status, await answer.clone().text()).toBe(201);
    const { revision } = (await answer.json()) as { revision: string };
    await stateBecomes(north(), { ...a, revision }, (state) => state !== 'reading');
    return { ...a, revision };
  }
  async function combined(of: Brought): Promise<string[]> {
    await run(north(), of);
    const { frames } = await north().json<Results>(`${revisionAddress(of)}/json`);
    return (frames[0]?.results ?? []).filter(({ kind }) => kind === 'combination').map(({ name }) => name);
  }
  const put = (version: number, listed = 'replace') => ({ kind: 'office combinations', set, version, listed });

  it('a version of a set makes a revision’s combinations, which its input workbook lists for any reader', async () => {
    const b = await made([put(1)]);
    const names = ['1.3 dead + 1.6 wind', '0.9 dead + 1.6 wind', '1.0 dead (service)', '1.0 dead + 1.0 wind (service)'];
    expect(await combined(b)).toEqual(names);
    const path = join(folder, 'again.xlsx');
    writeFileSync(path, Buffer.from(await (await north().fetch(`${revisionAddress(b)}/input`)).arrayBuffer()));
    const again = await bring(north(), `/api/projects/${people.north.project}/batches`, path);
    expect(await combined(again)).toEqual(names);
    const record = await north().json<{ changes: { to: string }[] }>(`${revisionAddress(b)}/changes`);
    expect(record.changes[0]?.to).toMatch(/^the office’s set Depots \d+, version 1, written into Combinations in place of/);
    const told = await north().json<{ uses: { letter: string; version: number }[] }>(`/api/combination-sets/${set}`);
    expect(told.uses.map(({ letter, version }) => [letter, version])).toEqual([[b.revision, 1]]);
  });

  it('a set that is changed leaves what it made as it was; an old version can still be named, one out of use not', async () => {
    const before = await (await north().fetch(`${revisionAddress({ ...a, revision: 'B' })}/json`)).text();
    const rules = [{ from: 'handbook 5', purpose: 'strength', rule: '1.4 dead + 1.4 wind' }];
    expect((await lead!.send(`/api/combination-sets/${set}`, { ...content, rules, after: 1 })).status).toBe(201);
    expect((await lead!.send(`/api/combination-sets/${set}`, { ...content, rules, after: 1 })).status).toBe(409);
    expect(await (await north().fetch(`${revisionAddress({ ...a, revision: 'B' })}/json`)).text()).toBe(before);
    expect(await combined(await made([put(2, 'keep')]))).toEqual(['U1', 'U2 (+)', 'U2 (−)', 'S1', '1.4 dead + 1.4 wind']);
    expect((await lead!.send(`/api/combination-sets/${set}`, { offered: false }, 'PUT')).status).toBe(200);
    expect((await ask([put(2)])).status).toBe(400);
    expect((await lead!.send(`/api/combination-sets/${set}`, { offered: true }, 'PUT')).status).toBe(200);
  });

  it('a set is refused where a rule cannot be read, its name is taken or published, or nobody says where it is from', async () => {
    const refuse = async (more: object) => {
      const answer = await lead!.send('/api/combination-sets', { name: 'Another', ...content, ...more });
      return `${answer.status} ${await answer.text()}`;
    };
    expect(await refuse({ rules: [{ from: 'x', purpose: 'strength', rule: '1.5 storm' }] })).toMatch(/^400 .*storm.* is no kind/);
    expect(await refuse({ name: 'EN 1990 6.10' })).toMatch(/^400 .*published set has this name/);
    expect(await refuse({ provenance: ' ' })).toMatch(/^400 .*where the figures are from/);
    expect(await refuse({ rules: [] })).toMatch(/^400 .*at least one rule/);
    const kept = await refuse({ name: 'Twice' });
    expect(kept).toMatch(/^201/);
    expect(await refuse({ name: 'twice' })).toMatch(/^409/);
    const setup = join(folder, 'Setup.csv');
    writeFileSync(setup, 'setting,value\nmaterial,S275\ncombination set,Twice');
    const named = await bring(north(), `/api/projects/${people.north.project}/batches`, setup, join(folder, 'Nodes.csv'));
    const told = await (await north().fetch(`${revisionAddress(named)}/tables/problems`)).text();
    expect(told).toMatch(/is no combination set.*chosen on a revision’s settings page/);
  });

  it('listed rows take other factors, go, and are joined by new ones; a refusal is a sentence and makes nothing', async () => {
    const change = {
      kind: 'list combinations',
      factors: [{ combination: 'U1', case: 'wind', factor: 1.4 }],
      leaveOut: ['U2 (+)'],
      add: [{ name: 'Storm', purpose: 'strength', terms: [{ case: 'wind', factor: 2 }] }],
    };
    expect(await combined(await made([change]))).toEqual(['U1', 'S1', 'U2 (−)', 'Storm']);
    const count = async () =>
      (await north().json<{ revisions: unknown[] }>(`/api/batches/${a.batch}/revisions`)).revisions.length;
    const before = await count();
    const bad = await ask([{ ...change, add: [{ ...change.add[0], name: 'u1' }] }]);
    expect(bad.status).toBe(400);
    expect(await bad.text()).toContain('There is a combination u1 already');
    expect((await ask([{ kind: 'list combinations' }])).status).toBe(400);
    expect((await ask([change, put(2)])).status).toBe(400);
    expect(await count()).toBe(before);
  });
});
