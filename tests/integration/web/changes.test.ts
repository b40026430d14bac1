/** Settings chosen on screen, through the API: the next revision, its record, what is carried over, and who may. */
import { writeFileSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { beforeAll, describe, expect, inject, it } from 'vitest';
import { errorShape } from '@/lib/api/error';
import { bring, revisionAddress, run, stateBecomes, type Brought } from '../../setup/bring';
import { signedIn, type Visitor } from '../../setup/visitor';

const { url, people } = inject('server');

interface Told {
  readonly revision: {
    readonly state: string;
    readonly madeFrom: string | null;
    readonly createdBy: string;
    readonly input: { readonly name: string; readonly sha256: string };
    readonly settings: { readonly nearLimit: number; readonly stability: string };
    readonly origins: { readonly nearLimit: { readonly changedBy?: string; readonly cell: string | null } };
  };
}

describe('settings chosen on screen', () => {
  let analyst: Visitor;
  let a: Brought;

  beforeAll(async () => {
    analyst = await signedIn(url, 'north', 'analyst');
    a = await bring(analyst, `/api/projects/${people.north.project}/batches`, 'samples/pipe-rack-12.xlsx');
    await run(analyst, a);
  });

  const set = (setting: string, value: string) => ({ kind: 'setting', setting, value });
  const changes = (of: Brought = a) => `${revisionAddress(of)}/changes`;
  const told = (revision: string) => analyst.json<Told>(revisionAddress({ ...a, revision }));
  const frames = async (of: Brought): Promise<string> => {
    const text = await (await analyst.fetch(`${revisionAddress(of)}/json`)).text();
    return text.slice(text.indexOf('"frames":'));
  };

  async function make(body: unknown, from: Brought = a): Promise<Brought> {
    const answer = await analyst.send(changes(from), body);
    expect(answer.status).toBe(201);
    const { revision } = (await answer.json()) as { revision: string };
    const made = { batch: a.batch, revision };
    await stateBecomes(analyst, made, (state) => state === 'read' || state === 'run');
    return made;
  }

  it('make the next revision, which says from which, what, why and by whom, and leave the first as it is', async () => {
    const before = await told('A');
    const b = await make({ changes: [set('nearLimit', '0,8'), set('stability', 'by others')], reason: 'the client’s rule' });
    expect(b.revision).toBe('B');
    const { revision } = await told('B');
    expect(revision).toMatchObject({ state: 'read', madeFrom: 'A', createdBy: 'analyst of north' });
    expect(revision.settings).toMatchObject({ nearLimit: 0.8, stability: 'by others' });
    expect(revision.origins.nearLimit.changedBy).toBe('analyst of north');
    expect(revision.input.sha256).not.toBe(before.revision.input.sha256);
    const record = { kind: 'setting', reason: 'the client’s rule', person: 'analyst of north' };
    expect(await analyst.json(changes(b))).toMatchObject({
      madeFrom: 'A',
      changes: [
        { ...record, what: 'near limit', from: '0.90', to: '0.80' },
        { ...record, what: 'stability', to: 'by others' },
      ],
    });
    expect(await analyst.json(changes())).toEqual({ madeFrom: null, changes: [] });
    expect(await told('A')).toEqual(before);
  });

  it('carry over every result that they leave alone', async () => {
    const body = { changes: [set('title', 'Racks of the east side')], reason: 'its proper name', run: true };
    const made = await make(body);
    expect(await stateBecomes(analyst, made, (state) => state === 'run')).toBe('run');
    expect(await frames(made)).toBe(await frames(a));
  });

  it('are in the input workbook, which brought in anew gives the very same frames', async () => {
    const made = await make({ changes: [set('nearLimit', '0.5')], reason: 'to look closer', run: true });
    await stateBecomes(analyst, made, (state) => state === 'run');
    const answer = await analyst.fetch(`${revisionAddress(made)}/input`);
    expect(answer.headers.get('content-disposition')).toContain(`pipe-rack-12 ${made.revision}.xlsx`);
    const folder = mkdtempSync(join(tmpdir(), 'tallyframe-input-'));
    writeFileSync(join(folder, 'again.xlsx'), Buffer.from(await answer.arrayBuffer()));
    const again = await bring(analyst, `/api/projects/${people.north.project}/batches`, join(folder, 'again.xlsx'));
    rmSync(folder, { recursive: true });
    await run(analyst, again);
    expect(await frames(again)).toBe(await frames(made));
  });

  it.each<[string, unknown, number, RegExp]>([
    ['a value that the sheet would refuse', { changes: [set('nearLimit', '3')], reason: 'x' }, 400, /near limit/],
    ['a setting there is none of', { changes: [set('speed', '3')], reason: 'x' }, 400, /./],
    ['a standard that is not built', { changes: [set('strengthCheck', 'no such')], reason: 'x' }, 400, /no such/],
    ['what stands so already', { changes: [set('nearLimit', '0.90')], reason: 'x' }, 400, /already/],
    ['no change', { changes: [], reason: 'x' }, 400, /at least one/],
    ['one setting twice', { changes: [set('nearLimit', '0.7'), set('nearLimit', '0.6')], reason: 'x' }, 400, /once/],
    ['no reason', { changes: [set('nearLimit', '0.7')], reason: ' ' }, 400, /why/],
    ['a body that is none', 'no record', 400, /./],
  ])('are refused with a sentence: %s', async (_, body, status, words) => {
    const before = (await analyst.json<{ revisions: unknown[] }>(`/api/batches/${a.batch}/revisions`)).revisions.length;
    const answer = await analyst.send(changes(), body);
    const { error } = errorShape.parse(await answer.json());
    expect([answer.status, error.code]).toEqual([status, 'bad-request']);
    expect(error.message).toMatch(words);
    const after = (await analyst.json<{ revisions: unknown[] }>(`/api/batches/${a.batch}/revisions`)).revisions.length;
    expect(after).toBe(before);
  });

  it('are nobody’s of another office, no checker’s and no client’s, and not another site’s', async () => {
    const body = { changes: [set('nearLimit', '0.7')], reason: 'not mine to change' };
    const status = async (office: 'north' | 'south', role: 'lead' | 'analyst' | 'checker' | 'client') =>
      (await (await signedIn(url, office, role)).send(changes(), body)).status;
    expect(await status('south', 'analyst')).toBe(404);
    expect(await status('south', 'lead')).toBe(404);
    expect(await status('north', 'checker')).toBe(403);
    expect(await status('north', 'client')).toBe(404);
    const headers = { 'content-type': 'application/json', origin: 'https://elsewhere.example' };
    expect((await analyst.fetch(changes(), { method: 'POST', body: JSON.stringify(body), headers })).status).toBe(403);
  });

  it('need sheets of which something could be read', async () => {
    const to = `/api/projects/${people.north.project}/batches`;
    const unreadable = await bring(analyst, to, 'samples/problems/unreadable.xlsx');
    const answer = await analyst.send(changes(unreadable), { changes: [set('nearLimit', '0.7')], reason: 'x' });
    expect(answer.status).toBe(409);
    expect((await analyst.fetch(`${revisionAddress(unreadable)}/input`)).status).toBe(409);
  });
});
