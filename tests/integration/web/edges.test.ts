import { beforeAll, describe, expect, inject, it } from 'vitest';
import { errorShape } from '@/lib/api/error';
import { signedIn, type Visitor } from '../../setup/visitor';

const { url, people } = inject('server');
const read = async (response: Response) => errorShape.strict().parse(await response.json()).error;

describe('the edges of the application', () => {
  let lead: Visitor;
  beforeAll(async () => {
    lead = await signedIn(url, 'north', 'lead');
  });

  it('gives every page a policy with a fresh nonce, which its scripts carry', async () => {
    const answers = await Promise.all([lead.fetch('/projects'), lead.fetch('/projects')]);
    const nonces = answers.map(
      (one) => /script-src 'nonce-([^']+)' 'strict-dynamic'/.exec(one.headers.get('content-security-policy') ?? '')?.[1],
    );
    expect(nonces[0]).toBeTruthy();
    expect(nonces[0]).not.toBe(nonces[1]);
    const html = await answers[0]!.text();
    const scripts = html.match(/<script\b[^>]*>/g) ?? [];
    expect(scripts.length).toBeGreaterThan(0);
    for (const script of scripts) expect(script).toContain(`nonce="${nonces[0]}"`);
    expect(answers[0]!.headers.get('content-security-policy')).not.toMatch(/script-src[^;]*unsafe/);
  });

  it('sends the headers that keep pages and answers where they belong', async () => {
    for (const path of ['/sign-in', '/api/ping', '/api/projects']) {
      const { headers } = await lead.fetch(path);
      expect(headers.get('x-content-type-options'), path).toBe('nosniff');
      expect(headers.get('referrer-policy'), path).toBe('same-origin');
      expect(headers.get('content-security-policy'), path).toContain("frame-ancestors 'none'");
      expect(headers.has('x-powered-by'), path).toBe(false);
    }
    expect((await lead.fetch('/api/projects')).headers.get('cache-control')).toContain('no-store');
  });

  it('refuses writes from other sites and from nowhere, and changes nothing', async () => {
    const before = await lead.json<{ projects: unknown[] }>('/api/projects');
    for (const origin of ['https://elsewhere.example', 'null']) {
      const body = JSON.stringify({ name: `From ${origin}` });
      const answer = await lead.fetch('/api/projects', { method: 'POST', body, headers: { origin } });
      expect(answer.status).toBe(403);
      expect((await read(answer)).code).toBe('other-origin');
    }
    const cross = { 'sec-fetch-site': 'cross-site' };
    expect((await lead.fetch('/api/projects', { method: 'POST', body: '{"name":"x"}', headers: cross })).status).toBe(403);
    expect(await lead.json('/api/projects')).toEqual(before);
  });

  it('answers what is wrong with a form field by field, in the one shape', async () => {
    const answer = await lead.send('/api/people', { name: ' ', email: 'no address', role: 'king', password: 'short' });
    expect(answer.status).toBe(400);
    const { code, fields } = await read(answer);
    expect(code).toBe('bad-request');
    expect(Object.keys(fields ?? {}).sort()).toEqual(['email', 'name', 'password', 'role']);
    expect(fields?.password?.[0]).toBe('Give a first password of at least 10 characters.');
  });

  it('answers broken JSON, a JSON too long and an unknown address in the same shape', async () => {
    const broken = await lead.fetch('/api/projects', { method: 'POST', body: '{' });
    expect([broken.status, (await read(broken)).code]).toEqual([400, 'bad-request']);
    const long = await lead.send('/api/projects', { name: 'x'.repeat(300_000) });
    expect([long.status, (await read(long)).code]).toEqual([413, 'too-large']);
    const missing = await lead.fetch('/api/projects/999999');
    expect([missing.status, (await read(missing)).code]).toEqual([404, 'not-found']);
    const nowhere = await lead.fetch('/api/no/such/address');
    expect([nowhere.status, (await read(nowhere)).code]).toEqual([404, 'not-found']);
    const odd = await lead.fetch('/api/projects/1e0');
    expect([odd.status, (await read(odd)).code]).toEqual([404, 'not-found']);
  });

  it('refuses an upload that is too large while it streams, and one without a file', async () => {
    const to = `/api/projects/${people.north.project}/batches`;
    const before = await lead.json<unknown>(to);
    let sent = 0;
    const chunk = new Uint8Array(1024 * 1024);
    const body = new ReadableStream<Uint8Array>({
      pull(controller) {
        sent += 1;
        if (sent > 40) controller.close();
        else controller.enqueue(chunk);
      },
    });
    const streamed = await lead.fetch(`${to}?file=large.xlsx`, { method: 'POST', body, duplex: 'half' } as RequestInit);
    expect([streamed.status, (await read(streamed)).code]).toEqual([413, 'too-large']);
    const empty = await lead.fetch(to, { method: 'POST', body: new FormData() });
    expect([empty.status, (await read(empty)).code]).toEqual([400, 'bad-request']);
    expect(await lead.json<unknown>(to)).toEqual(before);
  });

  it('says that an address of the office is taken without saying whose it is', async () => {
    const person = { name: 'Someone', email: 'lead@south.example', role: 'analyst', password: 'ten characters' };
    const answer = await lead.send('/api/people', person);
    expect(answer.status).toBe(409);
    expect(JSON.stringify(await answer.json())).not.toMatch(/south office/);
  });
});
