import { describe, expect, inject, it } from 'vitest';
import { attemptRule } from '@/lib/access/attempt-rule';
import { errorShape } from '@/lib/api/error';
import { emailOf, testPassword } from '../../setup/people';
import { signedIn, Visitor } from '../../setup/visitor';

const { url } = inject('server');

/** Someone whom no other test signs in as. */
async function newcomer(name: string): Promise<string> {
  const lead = await signedIn(url, 'north', 'lead');
  const email = `${name}@north.example`;
  expect((await lead.send('/api/people', { name, email, role: 'analyst', password: testPassword })).status).toBe(201);
  return email;
}

describe('signing in', () => {
  it('opens the office, and signing out closes it for the same cookie', async () => {
    const lead = await signedIn(url, 'north', 'lead');
    expect((await lead.fetch('/api/projects')).status).toBe(200);
    const { csrfToken } = await lead.json<{ csrfToken: string }>('/api/auth/csrf');
    const old = new Visitor(url);
    Object.assign(old, { cookies: new Map(Reflect.get(lead, 'cookies') as Map<string, string>) });
    await lead.fetch('/api/auth/signout', { method: 'POST', body: new URLSearchParams({ csrfToken, json: 'true' }) });
    expect((await lead.fetch('/api/projects')).status).toBe(401);
    expect((await old.fetch('/api/projects')).status, 'the token from before signing out').toBe(401);
  });

  it('holds nothing of the person in the token, and keeps it from scripts and other sites', async () => {
    const visitor = new Visitor(url);
    const answer = await visitor.trySignIn(emailOf('north', 'checker'), testPassword);
    const cookie = answer.headers.getSetCookie().find((one) => one.startsWith('next-auth.session-token='));
    expect(cookie).toMatch(/HttpOnly/i);
    expect(cookie).toMatch(/SameSite=lax/i);
    const session = await visitor.json<Record<string, unknown>>('/api/auth/session');
    expect(Object.keys(session)).toEqual(['expires']);
  });

  it('answers an unknown account exactly as a wrong password', async () => {
    const wrong = await new Visitor(url).trySignIn(emailOf('north', 'client'), 'not the password');
    const unknown = await new Visitor(url).trySignIn('nobody@north.example', 'not the password');
    expect(wrong.status).toBe(401);
    expect(unknown.status).toBe(wrong.status);
    expect(await unknown.text()).toBe(await wrong.text());
  });

  it('makes an account wait after too many attempts, from whatever address, the right password too', async () => {
    for (const email of [await newcomer('waits'), 'nobody@south.example']) {
      for (let i = 0; i < attemptRule.perAccount; i++) {
        expect((await new Visitor(url).trySignIn(email, 'a guess')).status).toBe(401);
      }
      const answer = await new Visitor(url).trySignIn(email, testPassword);
      expect(await answer.text(), email).toContain('error=wait');
      expect(answer.status).toBe(401);
    }
  });

  it('counts guesses that are sent at once', async () => {
    const email = await newcomer('at.once');
    const all = await Promise.all(
      Array.from({ length: attemptRule.perAccount * 2 }, () => new Visitor(url).trySignIn(email, 'a guess')),
    );
    const texts = await Promise.all(all.map((answer) => answer.text()));
    expect(texts.filter((text) => text.includes('error=wait')).length).toBe(attemptRule.perAccount);
  });

  it('makes an address wait that tries one account after another', async () => {
    const from = { 'x-forwarded-for': '192.0.2.77' };
    const visitor = new Visitor(url);
    const attempt = async (email: string): Promise<string> => {
      const { csrfToken } = await visitor.json<{ csrfToken: string }>('/api/auth/csrf');
      const body = new URLSearchParams({ email, password: 'a guess', csrfToken, json: 'true' });
      return (await visitor.fetch('/api/auth/callback/credentials', { method: 'POST', body, headers: from })).text();
    };
    for (let i = 0; i < attemptRule.perAddress; i++) expect(await attempt(`person${i}@west.example`)).not.toContain('error=wait');
    expect(await attempt('another@west.example')).toContain('error=wait');
  });

  it('takes no token that was not made here', async () => {
    const answer = await fetch(`${url}/api/projects`, {
      headers: { cookie: 'next-auth.session-token=eyJhbGciOiJub25lIn0.e30.' },
    });
    expect(answer.status).toBe(401);
    expect(errorShape.parse(await answer.json()).error.code).toBe('not-signed-in');
  });
});
