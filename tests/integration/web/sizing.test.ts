/** Sizing through the API: asked for, followed, taken away, made a change; what is refused, and that the change gives what was found. */
import { beforeAll, describe, expect, inject, it } from 'vitest';
import { errorShape } from '@/lib/api/error';
import type { SizingFound } from '@/lib/sizing/sizing';
import { bring, revisionAddress, run, stateBecomes, type Brought } from '../../setup/bring';
import { signedIn, type Visitor } from '../../setup/visitor';

const { url, people } = inject('server');

interface Sizing {
  readonly id: number;
  readonly state: string;
  readonly done: number;
  readonly total: number;
  readonly inputHash: string | null;
  readonly reason: string | null;
  readonly found: SizingFound | null;
}

describe('sections sized', () => {
  let analyst: Visitor;
  let a: Brought;
  const groups = [
    { by: 'role', name: 'rafter', range: 'IPE', minDepth_m: 0.3 },
    { by: 'role', name: 'column', range: 'HE B' },
  ];

  beforeAll(async () => {
    analyst = await signedIn(url, 'north', 'analyst');
    a = await bring(analyst, `/api/projects/${people.north.project}/batches`, 'samples/slender-sheds-24.xlsx');
  });

  const address = () => `${revisionAddress(a)}/size`;
  const refused = async (answer: Response): Promise<string> => errorShape.parse(await answer.json()).error.message;
  async function ends(id: number): Promise<Sizing> {
    for (let tries = 0; tries < 300; tries++) {
      const { sizing } = await analyst.json<{ sizing: Sizing }>(`${address()}/${id}`);
      if (!['queued', 'running', 'stopping'].includes(sizing.state)) return sizing;
      await new Promise((resolve) => setTimeout(resolve, 200));
    }
    throw new Error('The sizing did not end within a minute');
  }
  async function sized(body: unknown): Promise<Sizing> {
    const answer = await analyst.send(address(), body);
    expect(answer.status).toBe(202);
    return ends(((await answer.json()) as { sizing: Sizing }).sizing.id);
  }

  it('are found before any run, kept with what they are of, and taken away as CSV', async () => {
    const { groups: offered } = await analyst.json<{ groups: readonly { by: string; name: string; members: number }[] }>(`${address()}/groups`); // prettier-ignore
    expect(offered).toContainEqual(expect.objectContaining({ by: 'role', name: 'rafter' }));
    const told = await sized({ groups });
    expect(told).toMatchObject({ state: 'done', reason: null, found: { outcome: 'converged' } });
    expect(told.inputHash).toMatch(/^[0-9a-f]{64}$/);
    expect(told.done).toBe(told.total);
    const { sizings } = await analyst.json<{ sizings: readonly Sizing[] }>(address());
    expect(sizings[0]).toEqual(told);
    const csv = await analyst.fetch(`${address()}/${told.id}/export`);
    expect(csv.headers.get('content-disposition')).toContain('sizing');
    const lines = (await csv.text()).trim().split(/\r?\n/);
    const candidates = told.found?.groups.reduce((sum, group) => sum + group.candidates.length, 0);
    expect(lines).toHaveLength(1 + (candidates ?? 0));
    expect(lines.filter((line) => line.includes(',yes,'))).toHaveLength(2);
  });

  it('made a change and run give the ratio that was found: every frame is within its limits', async () => {
    const { sizings } = await analyst.json<{ sizings: readonly Sizing[] }>(address());
    const found = sizings[0]?.found as SizingFound;
    const changes = found.groups.map(({ name, chosen }) => ({ kind: 'section', what: { role: name }, to: chosen }));
    const answer = await analyst.send(`${revisionAddress(a)}/changes`, { changes, reason: 'the lightest that fits', run: false });
    expect(answer.status).toBe(201);
    const b = { batch: a.batch, revision: ((await answer.json()) as { revision: string }).revision };
    await stateBecomes(analyst, b, (state) => state === 'read');
    await run(analyst, b);
    const frames = await Promise.all(
      Array.from({ length: 24 }, async (_, i) => {
        const { frame } = await analyst.json<{ frame: { id: string; verdict: string; ratio: number; mass: number } }>(`${revisionAddress(b)}/frames/${i + 1}`); // prettier-ignore
        return frame;
      }),
    );
    expect(frames.filter(({ verdict }) => verdict !== 'within' && verdict !== 'near')).toEqual([]);
    const worst = frames.reduce((most, frame) => (frame.ratio > most.ratio ? frame : most));
    expect(worst.id).toBe(found.together?.frame);
    expect(Math.abs(worst.ratio - (found.together?.ratio ?? 0))).toBeLessThan(1e-12);
  });

  it('are refused where nothing can be sized, with the reason; what is over is not stopped, nor gone on with', async () => {
    expect((await sized({ groups: [{ by: 'role', name: 'strut', range: 'IPE' }] })).reason).toContain('role strut');
    const wrong: readonly [unknown, RegExp][] = [
      [{}, /List the groups/],
      [{ groups: [] }, /at least one group/],
      [{ groups: [{ by: 'role', name: 'rafters', range: 'IPE' }] }, /Roles are/],
      [{ groups: [{ by: 'role', name: 'rafter', range: 'IPN' }] }, /Choose a range/],
      [{ groups: [groups[1], groups[1]] }, /each group once/],
      [{ groups: [{ ...groups[0], maxDepth_m: 0.1 }] }, /above the largest/],
    ];
    for (const [body, sentence] of wrong) {
      const answer = await analyst.send(address(), body);
      expect(answer.status, JSON.stringify(body)).toBe(400);
      expect(JSON.stringify(await answer.json())).toMatch(sentence);
    }
    const { sizings } = await analyst.json<{ sizings: readonly Sizing[] }>(address());
    const done = sizings.find(({ state }) => state === 'done');
    for (const method of ['DELETE', 'POST'] as const) {
      const answer = await analyst.fetch(`${address()}/${done?.id}`, { method });
      expect(answer.status).toBe(409);
      expect(await refused(answer)).not.toBe('');
    }
    expect((await analyst.fetch(`${address()}/999999`)).status).toBe(404);
    const south = await signedIn(url, 'south', 'lead');
    expect((await south.fetch(`${address()}/${done?.id}`)).status).toBe(404);
  });

  it('of one that is named are as members would have them, and a name that is nowhere is refused with a hint', async () => {
    const section = (query: string) => analyst.fetch(`${revisionAddress(a)}/section?${query}`);
    const found = (await (await section('name=ipe300&of=S275')).json()) as { taken: unknown };
    // EN 10025-2: S275 up to 16 mm
    expect(found.taken).toMatchObject({ section: { name: 'IPE 300' }, materials: { S275: { fy_Pa: 275e6 } } });
    const nowhere = await section('name=IPE%20310&of=S275');
    expect(nowhere.status).toBe(400);
    expect(await refused(nowhere)).toContain('IPE');
    expect((await section('name=IPE%20300')).status).toBe(400);
    const model = await analyst.json<{ frame: { members: readonly unknown[] }; settings: unknown }>(`${revisionAddress(a)}/frames/1/model`); // prettier-ignore
    expect(model.frame.members.length).toBeGreaterThan(2);
    expect((await analyst.fetch(`${revisionAddress(a)}/frames/999/model`)).status).toBe(404);
  });
});
