/** The README's way for scripts, as it stands there: its commands are taken out of it and run. */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, inject, it } from 'vitest';
import { errorShape } from '@/lib/api/error';
import { testPassword } from '../../setup/people';
import { signedIn, Visitor } from '../../setup/visitor';

const { url, people } = inject('server');
const folder = mkdtempSync(join(tmpdir(), 'tallyframe-script-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

async function tokenOf(visitor: Visitor, scope: 'read' | 'upload and run', days = 7) {
  const answer = await visitor.send('/api/me/tokens', { name: `for ${scope}`, scope, days });
  return ((await answer.json()) as { token: { id: number; secret: string } }).token;
}
const ask = (token: string, path: string, init: RequestInit = {}) =>
  fetch(`${url}${path}`, { ...init, headers: { authorization: `Bearer ${token}` } });
const refusal = async (response: Response) => errorShape.parse(await response.json()).error;

/** The commands between the heading “Scripts” and the next one. */
function readmeCommands(): string {
  const part = /^## Scripts\n(.*?)^## /ms.exec(readFileSync('README.md', 'utf8'))?.[1] ?? '';
  return [...part.matchAll(/^```sh\n(.*?)^```$/gms)].map((found) => found[1]).join('\n');
}

describe('a personal token', () => {
  it('brings sheets in, runs, waits and downloads by the commands of the README', async () => {
    const analyst = await signedIn(url, 'north', 'analyst');
    const { secret } = await tokenOf(analyst, 'upload and run');
    const commands = readmeCommands();
    expect(commands).toContain('curl');
    const settings = {
      SITE: url,
      TOKEN: secret,
      PROJECT: String(people.north.project),
      FILE: join(process.cwd(), 'samples/pipe-rack-12.xlsx'),
    };
    const env = { ...process.env, ...settings };
    execFileSync('bash', ['-euo', 'pipefail', '-c', commands], { cwd: folder, env, timeout: 90_000 });
    const workbook = readFileSync(join(folder, 'results.xlsx'));
    expect(workbook.subarray(0, 2).toString(), 'a workbook').toBe('PK');
    const results = JSON.parse(readFileSync(join(folder, 'results.json'), 'utf8')) as { frames: unknown[] };
    expect(results.frames).toHaveLength(12);
    const { tokens } = await analyst.json<{ tokens: { usedAt: string | null }[] }>('/api/me/tokens');
    expect(tokens[0]!.usedAt).not.toBeNull();
  }, 120_000);

  it('for reading reads, and changes nothing', async () => {
    const { secret } = await tokenOf(await signedIn(url, 'north', 'lead'), 'read');
    expect((await ask(secret, '/api/projects')).status).toBe(200);
    const refused = await ask(secret, '/api/projects', { method: 'POST', body: '{"name":"X"}' });
    expect([refused.status, (await refusal(refused)).message]).toEqual([403, expect.stringContaining('for reading')]);
  });

  it('never does more than its person may, nor touches people and tokens', async () => {
    const { secret } = await tokenOf(await signedIn(url, 'north', 'checker'), 'upload and run');
    expect((await ask(secret, '/api/projects', { method: 'POST', body: '{"name":"X"}' })).status).toBe(403);
    const lead = await tokenOf(await signedIn(url, 'north', 'lead'), 'upload and run');
    for (const path of ['/api/people', '/api/me', '/api/me/tokens', '/api/letters']) {
      expect((await ask(lead.secret, path)).status, path).toBe(403);
    }
    const client = await tokenOf(await signedIn(url, 'north', 'client'), 'upload and run');
    expect((await ask(client.secret, '/api/projects')).status, 'what a client may not see is not there').toBe(404);
  });

  it('sees nothing of another office', async () => {
    const { secret } = await tokenOf(await signedIn(url, 'north', 'analyst'), 'read');
    expect((await ask(secret, `/api/projects/${people.south.project}`)).status).toBe(404);
  });

  it('counts alone: cookies beside it are not looked at, and a wrong one does not fall back to them', async () => {
    const lead = await signedIn(url, 'north', 'lead');
    const answer = await lead.fetch('/api/projects', { headers: { authorization: 'Bearer tally_wrong' } });
    expect([answer.status, (await refusal(answer)).message]).toEqual([401, expect.stringContaining('does not work')]);
  });

  it('ends when it is revoked, by its person only', async () => {
    const analyst = await signedIn(url, 'north', 'analyst');
    const { id, secret } = await tokenOf(analyst, 'read');
    const lead = await signedIn(url, 'north', 'lead');
    expect((await lead.fetch(`/api/me/tokens/${id}`, { method: 'DELETE' })).status).toBe(404);
    expect((await analyst.fetch(`/api/me/tokens/${id}`, { method: 'DELETE' })).status).toBe(200);
    expect((await ask(secret, '/api/projects')).status).toBe(401);
    const { tokens } = await analyst.json<{ tokens: { id: number }[] }>('/api/me/tokens');
    expect(tokens.map((one) => one.id)).not.toContain(id);
  });

  it('is shown once: no list holds it', async () => {
    const lead = await signedIn(url, 'north', 'lead');
    await lead.send('/api/people', { name: 'Twite', email: 'twite@north.example', role: 'analyst', password: testPassword });
    const twite = new Visitor(url);
    await twite.trySignIn('twite@north.example', testPassword);
    const { secret } = await tokenOf(twite, 'read');
    expect(await (await twite.fetch('/api/me/tokens')).text()).not.toContain(secret);
    expect(await (await twite.fetch('/me')).text()).not.toContain(secret);
  });
});
