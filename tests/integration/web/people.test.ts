import { beforeAll, describe, expect, inject, it } from 'vitest';
import { resetRule } from '@/lib/access/attempt-rule';
import { errorShape } from '@/lib/api/error';
import { letterTo, linkIn } from '../../setup/letters';
import { emailOf, testPassword } from '../../setup/people';
import { signedIn, Visitor } from '../../setup/visitor';

const { url, dataDir, people } = inject('server');
const { north, south } = people;
const other = 'another password for tests';

interface Person {
  readonly id: number;
  readonly role: string;
  readonly disabledAt: string | null;
  readonly projects: readonly number[];
}

let lead: Visitor;
beforeAll(async () => {
  lead = await signedIn(url, 'north', 'lead');
});

const secretOf = (path: string): string => path.split('/').at(-1)!;
const refusal = async (response: Response) => errorShape.parse(await response.json()).error;

/** Someone whom no other test knows, who signs in with the tests' password. */
async function newcomer(name: string, role: string): Promise<{ readonly id: number; readonly email: string }> {
  const email = `${name}@north.example`;
  const answer = await lead.send('/api/people', { name, email, role, password: testPassword });
  return { id: ((await answer.json()) as { person: { id: number } }).person.id, email };
}
async function signIn(email: string, password = testPassword): Promise<Visitor> {
  const visitor = new Visitor(url);
  const answer = await visitor.trySignIn(email, password);
  if (!answer.ok) throw new Error(`${email} could not sign in: ${answer.status}`);
  return visitor;
}

describe('an invitation', () => {
  const invite = (email: string, more: object = {}) => lead.send('/api/people/invitations', { email, role: 'client', ...more });

  it('reaches someone by e-mail, works once, and opens what the lead settled', async () => {
    const email = 'wren@client.example';
    expect((await invite(email, { projects: [north.project] })).status).toBe(201);
    const letter = await letterTo({ dataDir, office: north.office, to: email, kind: 'invitation' });
    const path = linkIn(letter);
    const page = await (await new Visitor(url).fetch(path)).text();
    expect(page).toContain('lead of north');
    await new Visitor(url).fetch(path); // a mail program that looks at it uses nothing up
    const token = secretOf(path);
    const short = await new Visitor(url).send('/api/invitation', { token, name: 'Wren', password: 'short' });
    expect((await refusal(short)).fields).toHaveProperty('password');
    const accepted = await new Visitor(url).send('/api/invitation', { token, name: 'Wren Ottersby', password: other });
    expect([accepted.status, await accepted.json()]).toEqual([201, { email }]);
    const wren = await signIn(email, other);
    const me = await wren.json<{ person: { role: string; name: string } }>('/api/me');
    expect(me.person).toMatchObject({ role: 'client', name: 'Wren Ottersby' });
    const { people: all } = await lead.json<{ people: { id: number; email: string }[] }>('/api/people');
    const { person } = await lead.json<{ person: Person }>(`/api/people/${all.find((one) => one.email === email)!.id}`);
    expect(person.projects).toEqual([north.project]);
    const again = await new Visitor(url).send('/api/invitation', { token, name: 'Second', password: other });
    expect([again.status, (await refusal(again)).message]).toEqual([404, expect.stringContaining('was used')]);
    expect(await (await new Visitor(url).fetch(path)).text()).toContain('was used, revoked or has expired');
    expect((await refusal(await invite(email))).code, 'someone of the office already').toBe('conflict');
  });

  it('ends when it is revoked, and an earlier link when it is sent again', async () => {
    const email = 'plover@client.example';
    const { invitation } = (await (await invite(email)).json()) as { invitation: { id: number } };
    expect((await invite(email)).status, 'invited already').toBe(409);
    const first = await letterTo({ dataDir, office: north.office, to: email, kind: 'invitation' });
    expect((await lead.send(`/api/people/invitations/${invitation.id}`, {})).status).toBe(200);
    const second = await letterTo({ dataDir, office: north.office, to: email, kind: 'invitation', not: [first.id] });
    const accept = (letter: typeof first) =>
      new Visitor(url).send('/api/invitation', { token: secretOf(linkIn(letter)), name: 'Plover', password: other });
    expect((await accept(first)).status).toBe(404);
    expect((await lead.fetch(`/api/people/invitations/${invitation.id}`, { method: 'DELETE' })).status).toBe(200);
    expect((await accept(second)).status).toBe(404);
    const { invitations } = await lead.json<{ invitations: { email: string }[] }>('/api/people/invitations');
    expect(invitations.map((one) => one.email)).not.toContain(email);
  });

  it('is nobody’s of another office to send again or revoke, nor may it name another office’s project', async () => {
    const email = 'dunlin@client.example';
    const made = await invite(email, { projects: [south.project] });
    const { invitation } = (await made.json()) as { invitation: { id: number } };
    const stranger = await signedIn(url, 'south', 'lead');
    expect((await stranger.send(`/api/people/invitations/${invitation.id}`, {})).status).toBe(404);
    expect((await stranger.fetch(`/api/people/invitations/${invitation.id}`, { method: 'DELETE' })).status).toBe(404);
    const { invitations } = await lead.json<{ invitations: { email: string; projects: number[] }[] }>('/api/people/invitations');
    expect(invitations.find((one) => one.email === email)!.projects).toEqual([]);
  });

  it('to an address that signs in to another office says so to its owner only', async () => {
    const email = emailOf('south', 'checker');
    const made = await invite(email);
    expect(made.status, 'the lead learns nothing of it').toBe(201);
    const letter = await letterTo({ dataDir, office: north.office, to: email, kind: 'invitation' });
    const answer = await new Visitor(url).send('/api/invitation', {
      token: secretOf(linkIn(letter)),
      name: 'X',
      password: other,
    });
    expect([answer.status, (await refusal(answer)).message]).toEqual([409, expect.stringContaining('another office')]);
    await signedIn(url, 'south', 'checker'); // whose password is what it was
    // The link stays good, and with it the invitation.
    const { invitation } = (await made.json()) as { invitation: { id: number } };
    expect((await lead.fetch(`/api/people/invitations/${invitation.id}`, { method: 'DELETE' })).status).toBe(200);
  });
});

describe('where someone stands', () => {
  it('ends at once when they are disabled: session, sign-in and token; and begins again when enabled', async () => {
    const { id, email } = await newcomer('avocet', 'analyst');
    const avocet = await signIn(email);
    const made = await avocet.send('/api/me/tokens', { name: 'nightly', scope: 'read', days: 7 });
    const { token } = (await made.json()) as { token: { secret: string } };
    const byToken = () => fetch(`${url}/api/projects`, { headers: { authorization: `Bearer ${token.secret}` } });
    expect((await byToken()).status).toBe(200);
    expect((await lead.send(`/api/people/${id}`, { disabled: true }, 'PUT')).status).toBe(200);
    expect((await avocet.fetch('/api/projects')).status).toBe(401);
    expect((await avocet.fetch('/projects')).headers.get('location')).toMatch(/^\/sign-in/);
    expect((await byToken()).status).toBe(401);
    expect((await new Visitor(url).trySignIn(email, testPassword)).status).toBe(401);
    await lead.send(`/api/people/${id}`, { disabled: false }, 'PUT');
    expect((await avocet.fetch('/api/projects')).status, 'the old session stays ended').toBe(401);
    expect((await byToken()).status, 'and the token').toBe(401);
    await signIn(email);
  });

  it('changes with a role from the next request on', async () => {
    const { id, email } = await newcomer('ruff', 'analyst');
    const ruff = await signIn(email);
    expect((await ruff.send('/api/projects', { name: '' })).status).toBe(400);
    await lead.send(`/api/people/${id}`, { role: 'checker' }, 'PUT');
    expect((await ruff.send('/api/projects', { name: '' })).status).toBe(403);
    expect((await refusal(await lead.send(`/api/people/${id}`, {}, 'PUT'))).message).toContain('Say what to change');
  });

  it('never leaves an office without a lead', async () => {
    const own = await signedIn(url, 'south', 'lead');
    for (const body of [{ disabled: true }, { role: 'analyst' }]) {
      const answer = await own.send(`/api/people/${south.people.lead}`, body, 'PUT');
      expect([answer.status, (await refusal(answer)).message]).toEqual([409, expect.stringContaining('without a lead')]);
    }
    expect((await own.fetch('/api/people')).status).toBe(200);
  });

  it('lets work be handed over: batches and projects, and the lead’s role in exchange', async () => {
    const from = await newcomer('whimbrel', 'lead');
    const to = await newcomer('godwit', 'analyst');
    const whimbrel = await signIn(from.email);
    await whimbrel.send(`/api/people/${from.id}`, { projects: [north.project] }, 'PUT');
    const answer = await whimbrel.send(`/api/people/${from.id}/transfer`, { to: to.id, lead: true });
    expect(await answer.json()).toMatchObject({ transfer: { projects: 1, lead: true } });
    const standing = async (id: number) => (await lead.json<{ person: Person }>(`/api/people/${id}`)).person;
    expect(await standing(to.id)).toMatchObject({ role: 'lead', projects: [north.project] });
    expect(await standing(from.id)).toMatchObject({ role: 'analyst' });
    const client = await lead.send(`/api/people/${from.id}/transfer`, { to: north.people.client });
    expect((await refusal(client)).message).toContain('A client’s projects go to a client');
    expect((await lead.send(`/api/people/${from.id}/transfer`, { to: south.people.analyst })).status).toBe(404);
    await lead.send(`/api/people/${to.id}`, { role: 'analyst' }, 'PUT');
  });
});

describe('a forgotten password', () => {
  const ask = (email: string, address?: string) =>
    new Visitor(url).fetch('/api/password-reset', {
      method: 'POST',
      body: JSON.stringify({ email }),
      headers: address === undefined ? {} : { 'x-forwarded-for': address },
    });

  it('is answered alike for everyone, and a link by e-mail sets a new one, once, ending every session', async () => {
    const { email } = await newcomer('knot', 'analyst');
    const before = await signIn(email);
    const known = await ask(email);
    const unknown = await ask('nobody@nowhere.example');
    expect([known.status, await known.text()]).toEqual([unknown.status, await unknown.text()]);
    const letter = await letterTo({ dataDir, office: north.office, to: email, kind: 'password reset' });
    const token = secretOf(linkIn(letter));
    expect(await (await new Visitor(url).fetch(linkIn(letter))).text()).toContain('Set the password');
    const set = (password: string) => new Visitor(url).send('/api/password-reset', { token, password }, 'PUT');
    expect((await set('short')).status).toBe(400);
    expect((await set(other)).status).toBe(200);
    expect((await before.fetch('/api/projects')).status, 'sessions end').toBe(401);
    expect((await new Visitor(url).trySignIn(email, testPassword)).status, 'the old one').toBe(401);
    await signIn(email, other);
    expect((await set('yet another password')).status, 'a second time').toBe(404);
    expect(
      (await new Visitor(url).send('/api/invitation', { token, name: 'X', password: other })).status,
      'as an invitation',
    ).toBe(404);
  });

  it('may be asked for so often by account, existing or not, and from one address', async () => {
    for (const email of [(await newcomer('sanderling', 'client')).email, 'still.nobody@nowhere.example']) {
      for (let i = 0; i < resetRule.perAccount; i++) expect((await ask(email)).status).toBe(202);
      expect((await ask(email)).status, email).toBe(429);
    }
    for (let i = 0; i < resetRule.perAddress; i++) expect((await ask(`n${i}@nowhere.example`, '192.0.2.88')).status).toBe(202);
    expect((await ask('m@nowhere.example', '192.0.2.88')).status).toBe(429);
  });

  it('is changed by its owner with the present one; other sessions and links end, this session stays', async () => {
    const { email } = await newcomer('curlew', 'checker');
    await ask(email);
    const link = secretOf(linkIn(await letterTo({ dataDir, office: north.office, to: email, kind: 'password reset' })));
    const [here, there] = [await signIn(email), await signIn(email)];
    const wrong = await here.send('/api/me/password', { current: 'not it at all', password: other }, 'PUT');
    expect((await refusal(wrong)).fields).toHaveProperty('current');
    expect((await here.send('/api/me/password', { current: testPassword, password: other }, 'PUT')).status).toBe(200);
    expect((await here.fetch('/api/projects')).status).toBe(200);
    expect((await there.fetch('/api/projects')).status).toBe(401);
    const late = { token: link, password: 'yet another password' };
    expect((await new Visitor(url).send('/api/password-reset', late, 'PUT')).status).toBe(404);
  });
});

describe('letters', () => {
  it('are chosen among, but not those that everyone must get', async () => {
    const { email } = await newcomer('dotterel', 'client');
    const dotterel = await signIn(email);
    const chosen = await dotterel.send('/api/me/letters', { letters: { answer: false } }, 'PUT');
    expect(await chosen.json()).toEqual({ letters: { issued: true, answer: false } });
    const always = await dotterel.send('/api/me/letters', { letters: { withdrawn: false } }, 'PUT');
    expect([always.status, (await refusal(always)).message]).toEqual([400, expect.stringContaining('always sent')]);
    expect((await dotterel.send('/api/me/letters', { letters: { gossip: false } }, 'PUT')).status).toBe(400);
  });

  it('are listed to the lead of their office without what stands in them, and shown where they are kept', async () => {
    const email = 'stint@client.example';
    await lead.send('/api/people/invitations', { email, role: 'client' });
    const letter = await letterTo({ dataDir, office: north.office, to: email, kind: 'invitation' });
    const listed = await (await lead.fetch('/api/letters')).text();
    expect(listed).toContain(email);
    expect(listed).not.toContain(secretOf(linkIn(letter)));
    expect(await (await lead.fetch(`/letters/${letter.id}`)).text()).toContain(secretOf(linkIn(letter)));
    const stranger = await signedIn(url, 'south', 'lead');
    expect(await (await stranger.fetch('/api/letters')).text()).not.toContain(email);
    expect((await stranger.fetch(`/letters/${letter.id}`)).status).toBe(404);
    expect((await stranger.send('/api/letters/1/again', {})).status).toBe(404);
  });
});
