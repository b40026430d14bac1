/** Checking through the API: who may, what freezes, what is kept, and what another office sees of it. */
import { beforeAll, describe, expect, inject, it } from 'vitest';
import type { PersonRole } from '@/lib/access/may';
import { errorShape } from '@/lib/api/error';
import { bring, revisionAddress, run, stateBecomes, type Brought } from '../../setup/bring';
import { checkingAddress, checkingOf, pass, seeAndAccept, send } from '../../setup/check';
import type { OfficeKey } from '../../setup/people';
import { signedIn, type Visitor } from '../../setup/visitor';

const { url, people } = inject('server');

interface FrameTold {
  readonly frame: {
    readonly seen: readonly { readonly name: string; readonly inputHash: string; readonly engine: string }[];
    readonly ownValues: readonly {
      readonly label: string;
      readonly ours: number;
      readonly theirs: number;
      readonly by: string;
    }[];
    readonly queries: readonly unknown[];
    readonly earlierQueries: readonly { readonly revision: string; readonly messages: readonly { readonly text: string }[] }[];
    readonly toAccept: readonly { readonly item: number; readonly verdict: string }[];
    readonly handChecks: { readonly balance: readonly { readonly agreement: string }[] };
    readonly figures: { readonly supports: readonly string[]; readonly results: readonly string[] };
  };
}

describe('checking', () => {
  let analyst: Visitor;
  let checker: Visitor;
  let lead: Visitor;
  let a: Brought;

  beforeAll(async () => {
    [analyst, checker, lead] = [
      await signedIn(url, 'north', 'analyst'),
      await signedIn(url, 'north', 'checker'),
      await signedIn(url, 'north', 'lead'),
    ];
    a = await bring(analyst, `/api/projects/${people.north.project}/batches`, 'samples/pipe-rack-12.xlsx');
    await run(analyst, a);
  });

  const frame = (number: number, part = '', of: Brought = a): string => `${checkingAddress(of)}/frames/${number}${part}`;
  const refused = async (answer: Response): Promise<[number, string]> => {
    const { error } = errorShape.parse(await answer.json());
    return [answer.status, error.message];
  };
  const change = (reason: string) => ({ changes: [{ kind: 'setting', setting: 'title', value: reason }], reason, run: true });

  it('is of no revision that was not sent, and no analyst’s', async () => {
    expect(await refused(await checker.fetch(frame(1, '/seen'), { method: 'POST' }))).toEqual([
      409,
      expect.stringMatching(/is run/),
    ]);
    expect((await analyst.fetch(frame(1, '/seen'), { method: 'POST' })).status).toBe(403);
    expect((await checker.send(checkingAddress(a), { note: '' })).status).toBe(403);
    expect((await checker.send(`${checkingAddress(a)}/pass`, {})).status).toBe(409);
  });

  it('begins when the analyst sends it, lists what has to be seen and why, and freezes it', async () => {
    const told = await send(analyst, a, 'The east line first.');
    expect(told.state).toBe('to check');
    expect(told.list.length).toBeGreaterThanOrEqual(5);
    expect(told.list.every(({ why }) => why.length > 0)).toBe(true);
    expect(told.acts).toMatchObject([{ what: 'sent', by: 'analyst of north', note: 'The east line first.' }]);
    expect(told.whyNotCheck).toMatch(/checker or the lead/);
    expect((await analyst.fetch(`${revisionAddress(a)}/run`, { method: 'POST' })).status).toBe(409);
    expect((await analyst.send(checkingAddress(a), { note: 'again' })).status).toBe(409);
    const list = await checker.json<{ revisions: { batch: number; whyNotCheck: string | null }[] }>('/api/to-check');
    expect(list.revisions.find(({ batch }) => batch === a.batch)).toMatchObject({ whyNotCheck: null });
  });

  it('keeps who saw a frame, on which input and by which engine', async () => {
    await checker.json(frame(1, '/seen'), { method: 'POST' });
    const { frame: told } = await analyst.json<FrameTold>(frame(1));
    expect(told.seen).toMatchObject([{ name: 'checker of north' }]);
    expect(told.seen[0]!.inputHash).toMatch(/^[0-9a-f]{64}$/);
    expect(told.seen[0]!.engine).not.toBe('');
    await checker.json(frame(1, '/seen'), { method: 'DELETE' });
    expect((await analyst.json<FrameTold>(frame(1))).frame.seen).toEqual([]);
    expect((await checker.fetch(frame(99, '/seen'), { method: 'POST' })).status).toBe(404);
  });

  it('sets a checker’s own value beside ours, in the unit it was typed in', async () => {
    const { frame: told } = await checker.json<FrameTold>(frame(1));
    expect(told.handChecks.balance.length).toBeGreaterThan(0);
    expect(told.handChecks.balance.every(({ agreement }) => agreement === 'agrees')).toBe(true);
    const figure = { kind: 'reaction', node: told.figures.supports[0], part: 'Fy', result: told.figures.results[0] };
    const answer = await checker.send(frame(1, '/own-values'), { figure, value: '12 500 N', note: 'from the deck’s weight' });
    expect(answer.status).toBe(201);
    const { frame: after } = await analyst.json<FrameTold>(frame(1));
    expect(after.ownValues).toMatchObject([{ theirs: 12500, by: 'checker of north' }]);
    expect(after.ownValues[0]!.label).toMatch(/^reaction Fy at/);
    const wrong = (value: string, of: unknown = figure) => checker.send(frame(1, '/own-values'), { figure: of, value });
    expect(await refused(await wrong('much'))).toEqual([400, expect.stringMatching(/Give a number/)]);
    expect(await refused(await wrong('12 mm'))).toEqual([400, expect.stringMatching(/Give a number/)]);
    expect(await refused(await wrong('12', { ...figure, node: 'none' }))).toEqual([400, expect.stringMatching(/no node/)]);
    expect((await wrong('12', { kind: 'guess' })).status).toBe(400);
  });

  it('takes an acceptance only with a reason, and only of what is over or not checked', async () => {
    const { list } = await checkingOf(checker, a);
    const one = list.find(({ toAccept }) => toAccept > 0);
    const within = list.find(({ toAccept }) => toAccept === 0);
    const number = (one ?? within)!.number;
    const without = await checker.send(frame(number, '/acceptances'), { checks: [0], reason: ' ' });
    expect(await refused(without)).toEqual([400, expect.stringMatching(/reason/)]);
    expect((await checker.send(frame(number, '/acceptances'), { checks: [999], reason: 'x' })).status).toBe(409);
  });

  it('is passed by nobody while a query is open, and a query is closed by who raised it', async () => {
    const raised = await checker.send(frame(2, '/queries'), { subject: null, text: 'Is the deck wet?' });
    const { query } = (await raised.json()) as { query: number };
    await seeAndAccept(checker, a);
    const against = await checker.send(`${checkingAddress(a)}/pass`, {});
    expect(await refused(against)).toEqual([409, '1 query is open.']);
    const to = `${checkingAddress(a)}/queries/${query}`;
    expect((await analyst.send(to, { text: 'It is dry.' })).status).toBe(200);
    expect(await refused(await lead.send(to, { close: true }))).toEqual([409, expect.stringMatching(/Only checker of north/)]);
    expect((await analyst.send(to, {})).status).toBe(400);
    expect((await checker.send(`${checkingAddress(a)}/queries/999999`, { close: true })).status).toBe(404);
    const { queries } = await checkingOf(analyst, a);
    expect(queries).toMatchObject([{ closed: null, messages: [{ text: 'Is the deck wet?' }, { text: 'It is dry.' }] }]);
  });

  it('ends with a return and its note, and the next revision shows what was asked', async () => {
    expect((await checker.send(`${checkingAddress(a)}/return`, { note: ' ' })).status).toBe(400);
    const answer = await checker.send(`${checkingAddress(a)}/return`, { note: 'Wet deck, please.' });
    expect(answer.status).toBe(200);
    expect(await answer.json()).toMatchObject({ revision: { state: 'returned', reason: 'Wet deck, please.' } });
    await analyst.send(`${revisionAddress(a)}/changes`, change('Wet deck'));
    const b = { ...a, revision: 'B' };
    await stateBecomes(analyst, b, (state) => state === 'run');
    const { frame: told } = await analyst.json<FrameTold>(frame(2, '', b));
    expect(told.earlierQueries).toMatchObject([{ revision: 'A', messages: [{ text: 'Is the deck wet?' }, {}] }]);
  });

  it('is passed once nothing stands against it, and nothing of it is marked from then on', async () => {
    const b = { ...a, revision: 'B' };
    await send(analyst, b);
    await seeAndAccept(checker, b);
    await pass(checker, b, 'Agreed.');
    const told = await checkingOf(checker, b);
    expect(told).toMatchObject({ state: 'checked', whyNotPass: ['This revision was passed already.'] });
    for (const [part, body] of [
      ['/seen', {}],
      ['/queries', { text: 'x' }],
    ] as const)
      // prettier-ignore
      expect((await checker.send(frame(1, part, b), body)).status, part).toBe(409);
    expect((await analyst.fetch(`${revisionAddress(b)}/run`, { method: 'POST' })).status).toBe(409);
    const next = await analyst.send(`${revisionAddress(b)}/changes`, change('after all'));
    expect(next.status).toBe(201);
  });

  it('stands still at an over until it is accepted with a reason, which is kept with who and when', async () => {
    const sheds = await bring(analyst, `/api/projects/${people.north.project}/batches`, 'samples/code-sheds-24.xlsx');
    await run(analyst, sheds);
    const { list, progress } = await send(analyst, sheds);
    const over = list.find(({ part }) => part === 'over')!;
    expect(progress.toAccept).toBeGreaterThan(0);
    for (const { number } of list) await checker.json(frame(number, '/seen', sheds), { method: 'POST' });
    const against = await refused(await checker.send(`${checkingAddress(sheds)}/pass`, {}));
    expect(against).toEqual([409, expect.stringMatching(/over or not checked and not accepted/)]);
    await seeAndAccept(checker, sheds, 'The haunch that is built is not in the sheet.');
    const { frame: told } = await analyst.json<FrameTold>(frame(over.number, '', sheds));
    const reason = 'The haunch that is built is not in the sheet.';
    expect(told.toAccept).toMatchObject(told.toAccept.map(() => ({ accepted: { reason, by: 'checker of north' } })));
    const [first] = told.toAccept;
    const back = `${frame(over.number, '/acceptances', sheds)}?check=${first!.item}`;
    expect((await checker.fetch(back, { method: 'DELETE' })).status).toBe(200);
    expect((await checker.send(`${checkingAddress(sheds)}/pass`, {})).status).toBe(409);
    await seeAndAccept(checker, sheds);
    await pass(checker, sheds);
    expect((await checkingOf(analyst, sheds)).state).toBe('checked');
  });

  it('binds a lead who ran a frame, in the revision that carries it over too', async () => {
    const c = await bring(analyst, `/api/projects/${people.north.project}/batches`, 'samples/pipe-rack-12.xlsx');
    await run(lead, c);
    await send(analyst, c);
    expect(await refused(await lead.fetch(frame(1, '/seen', c), { method: 'POST' }))).toEqual([
      403,
      expect.stringMatching(/You ran/),
    ]);
    expect(await refused(await lead.send(`${checkingAddress(c)}/pass`, {}))).toEqual([
      403,
      expect.stringMatching(/binds the lead/),
    ]);
    await analyst.send(`${revisionAddress(c)}/changes`, change('another title'));
    const d = { ...c, revision: 'B' };
    await stateBecomes(analyst, d, (state) => state === 'run');
    await send(analyst, d);
    expect(await refused(await lead.fetch(frame(1, '/seen', d), { method: 'POST' }))).toEqual([
      403,
      expect.stringMatching(/You ran/),
    ]);
    expect((await checker.fetch(frame(1, '/seen', d), { method: 'POST' })).status).toBe(200);
  });

  it('is another office’s business for nobody', async () => {
    const status = async (office: OfficeKey, role: PersonRole, path: string, method = 'POST') =>
      (await (await signedIn(url, office, role)).fetch(path, { method, body: method === 'POST' ? '{"note":"x"}' : undefined }))
        .status;
    expect(await status('south', 'checker', `${checkingAddress(a)}/pass`)).toBe(404);
    expect(await status('south', 'checker', frame(1, '/seen'))).toBe(404);
    expect(await status('south', 'lead', checkingAddress(a))).toBe(404);
    expect(await status('south', 'lead', frame(1), 'GET')).toBe(404);
    expect(await status('north', 'client', checkingAddress(a), 'GET')).toBe(404);
    const south = await signedIn(url, 'south', 'checker');
    expect(await south.json('/api/to-check')).toEqual({ revisions: [] });
  });
});
