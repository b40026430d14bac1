/** Issuing through the API: what clients get and what nobody else does, the bytes, superseding, withdrawing, questions. */
import { beforeAll, describe, expect, inject, it } from 'vitest';
import { errorShape } from '@/lib/api/error';
import { revisionAddress, stateBecomes, type Brought } from '../../setup/bring';
import { checked, issued, passed, type Desk, type Making } from '../../setup/issue';
import { testPassword } from '../../setup/people';
import { signedIn, Visitor } from '../../setup/visitor';
import { sha256 } from '../sha256';

const { url, people } = inject('server');
const { north, south } = people;

interface FileTold {
  readonly kind: string;
  readonly name: string;
  readonly size: number;
  readonly sha256: string;
  readonly pages: number | null;
}
interface IssuedTold {
  readonly issue: { readonly number: string; readonly state: string; readonly supersededBy: { readonly number: string } | null };
  readonly sentence: string;
  readonly files: readonly FileTold[];
  readonly changed: { readonly issue: { readonly number: string }; readonly matching: number } | null;
}

describe('issuing', () => {
  let desk: Desk;
  let client: Visitor;
  /** Of the office, but assigned to another project. */
  let stranger: Visitor;
  let ofSouth: Visitor;
  let a: Brought;
  let first: Making;

  beforeAll(async () => {
    const [analyst, checker, lead] = [
      await signedIn(url, 'north', 'analyst'),
      await signedIn(url, 'north', 'checker'),
      await signedIn(url, 'north', 'lead'),
    ];
    desk = { url, office: north, analyst, checker, lead };
    client = await signedIn(url, 'north', 'client');
    ofSouth = await signedIn(url, 'south', 'client');
    const email = 'stranger@north.example';
    await lead.send('/api/people', { name: 'Stran Ger', email, role: 'client', password: testPassword });
    stranger = new Visitor(url);
    await stranger.trySignIn(email, testPassword);
    a = await checked(desk);
    first = await issued(lead, a, [north.people.client], { note: 'For the shop.' });
  });

  const refused = async (answer: Response): Promise<[number, string]> => {
    const { error } = errorShape.parse(await answer.json());
    return [answer.status, error.message];
  };
  const told = (issue: number) => client.json<IssuedTold>(`/api/issued/${issue}`);

  it('gives the client every file with the bytes that its SHA-256 is of, and records each download', async () => {
    expect(first.state).toBe('issued');
    const { files, sentence, issue } = await told(first.issue);
    expect([issue.number, issue.state]).toEqual([first.number, 'issued']);
    expect(sentence).toMatch(/^12 frames/);
    expect(files.map(({ kind }) => kind)).toEqual(['report', 'workbook', 'input']);
    for (const { kind, size, sha256: hash, name } of files) {
      const answer = await client.fetch(`/api/issued/${first.issue}/files/${kind}`);
      const bytes = Buffer.from(await answer.arrayBuffer());
      expect([kind, answer.status, bytes.length, sha256(bytes)]).toEqual([kind, 200, size, hash]);
      expect(answer.headers.get('x-sha256')).toBe(hash);
      expect(answer.headers.get('content-disposition')).toContain(`filename="${name}"`);
    }
    const record = await desk.lead.json<{ downloads: { by: string; file: string }[] }>(`/api/issues/${first.issue}`);
    expect(record.downloads.map(({ by, file }) => `${by} ${file}`)).toEqual([
      'client of north input',
      'client of north workbook',
      'client of north report',
    ]);
  });

  it('is to nobody else: no other client, no other office, no guessed file', async () => {
    for (const other of [stranger, ofSouth]) {
      const { issues } = await other.json<{ issues: { id: number }[] }>('/api/issued');
      expect(issues.map(({ id }) => id)).not.toContain(first.issue);
      for (const path of ['', '/frames', '/questions', '/files/report']) {
        const answer = await other.fetch(`/api/issued/${first.issue}${path}`);
        expect([path, ...(await refused(answer))]).toEqual([path, 404, 'There is no such issue.']);
      }
      expect((await other.fetch(`/issued/${first.issue}`)).status).toBe(404);
    }
    expect((await client.fetch(`/api/issued/${first.issue}/files/secret`)).status).toBe(404);
    expect((await client.fetch(revisionAddress(a))).status, 'a client has no way to the desk').toBe(404);
    expect((await (await signedIn(url, 'south', 'lead')).fetch(`/api/issues/${first.issue}`)).status).toBe(404);
  });

  it('freezes the revision, and issues it once', async () => {
    expect(await stateBecomes(desk.analyst, a, () => true)).toBe('issued');
    const again = await desk.lead.send(`${revisionAddress(a)}/issue`, { clients: [north.people.client] });
    expect(await refused(again)).toEqual([409, expect.stringContaining('It is issued already')]);
    expect((await desk.analyst.fetch(`${revisionAddress(a)}/run`, { method: 'POST' })).status).toBe(409);
  });

  it('is done by the lead, and by a checker only where the lead says so', async () => {
    const waiting = await checked(desk);
    const ask = () => desk.checker.send(`${revisionAddress(waiting)}/issue`, { clients: [north.people.client] });
    expect(await refused(await ask())).toEqual([409, expect.stringContaining('the lead issues')]);
    expect((await desk.analyst.send(`${revisionAddress(waiting)}/issue`, { clients: [1] })).status).toBe(403);
    const wrong = await desk.lead.send(`${revisionAddress(waiting)}/issue`, { clients: [south.people.client] });
    expect(await refused(wrong)).toEqual([400, 'Choose clients who are assigned to the project.']);
    await desk.lead.send('/api/issues/who', { checkersIssue: true }, 'PUT');
    const made = await issued(desk.checker, waiting, [north.people.client]);
    await desk.lead.send('/api/issues/who', { checkersIssue: false }, 'PUT');
    expect(made.state).toBe('issued');
    expect(made.number).not.toBe(first.number);
  });

  it('takes questions and answers, and one receipt', async () => {
    const at = `/api/issued/${first.issue}`;
    expect(await refused(await client.send(`${at}/questions`, { frame: 'no such frame', text: 'Why?' }))).toEqual([
      400,
      'There is no such frame in this issue.',
    ]);
    const asked = await client.send(`${at}/questions`, { frame: 1, text: 'May the splice sit at 2.4 m?' });
    const { question } = (await asked.json()) as { question: { id: number; frame: { number: number } } };
    expect(question.frame.number).toBe(1);
    const answer = await desk.analyst.send(`/api/issues/${first.issue}/questions/${question.id}`, { text: 'Yes.' });
    expect(answer.status).toBe(201);
    const { questions } = await client.json<{ questions: { open: boolean; answers: { text: string }[] }[] }>(`${at}/questions`);
    expect(questions.map(({ open, answers }) => [open, answers.map(({ text }) => text)])).toEqual([[false, ['Yes.']]]);
    const receipts = [
      await client.json(`${at}/receipt`, { method: 'POST' }),
      await client.json(`${at}/receipt`, { method: 'POST' }),
    ];
    expect(receipts[1]).toEqual(receipts[0]);
  });

  it('is superseded by the batch’s next issue, which says what changed, and stays to be had under a name that says so', async () => {
    const change = { changes: [{ kind: 'setting', setting: 'nearLimit', value: '0.7' }], reason: 'asked for', run: true };
    await desk.analyst.send(`${revisionAddress(a)}/changes`, change);
    const b = { batch: a.batch, revision: 'B' };
    await stateBecomes(desk.analyst, b, (state) => state === 'run');
    await passed(desk, b);
    // nobody is named who has the earlier one: they get it all the same
    const second = await issued(desk.lead, b, [north.people.client]);
    const [before, after] = [await told(first.issue), await told(second.issue)];
    expect([before.issue.state, before.issue.supersededBy?.number]).toEqual(['superseded', second.number]);
    expect([after.issue.state, after.changed?.issue.number]).toEqual(['issued', first.number]);
    const answer = await client.fetch(`/api/issued/${first.issue}/files/workbook`);
    expect(answer.headers.get('content-disposition')).toContain(`filename="SUPERSEDED ${first.number} result workbook.xlsx"`);
    expect(sha256(Buffer.from(await answer.arrayBuffer()))).toBe(before.files.find(({ kind }) => kind === 'workbook')?.sha256);

    expect((await desk.checker.send(`/api/issues/${second.issue}/withdraw`, { reason: 'Not mine.' })).status).toBe(403);
    const withdrawn = await desk.lead.send(`/api/issues/${second.issue}/withdraw`, { reason: 'A load was forgotten.' });
    expect(await withdrawn.json()).toMatchObject({ issue: { state: 'withdrawn' }, told: 1 });
    expect(await stateBecomes(desk.analyst, b, () => true)).toBe('withdrawn');
    const page = await (await client.fetch(`/issued/${second.issue}`)).text();
    expect(page).toContain('is withdrawn. Don’t build from it.');
    expect(page).toContain('A load was forgotten.');
    expect((await told(first.issue)).issue.state, 'the earlier one does not come back').toBe('superseded');
  });

  it('can be tested by the present engine, which gives the same numbers and changes nothing', async () => {
    const at = `/api/issues/${first.issue}/engine`;
    expect((await desk.analyst.fetch(at, { method: 'POST' })).status).toBe(202);
    for (let tries = 0; ; tries++) {
      const { test } = await desk.lead.json<{ test: { frames: number; altered: number } | null }>(at);
      if (test) {
        expect([test.frames, test.altered]).toEqual([12, 0]);
        break;
      }
      if (tries > 100) throw new Error('The test did not end');
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
  });
});
