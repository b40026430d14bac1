import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { migrate } from '@/db/migrate';
import { openDatabase } from '@/db/open';
import { insertOffice } from '@/db/queries/offices';
import { insertPerson } from '@/db/queries/people';
import { putInOutbox } from '@/db/queries/outbox';
import { insertResetRequest } from '@/db/queries/password-resets';
import { fakeMailService, type FakeMailService } from '../fakes/mail-service';
import { buildChild } from '../setup/build-child';

const root = new URL('../..', import.meta.url).pathname;
const folder = mkdtempSync(join(tmpdir(), 'tallyframe-mail-'));
const child = join(root, 'dist-worker', 'mail-child.mjs');
const secret = 'of the server, for tests only';
let service: FakeMailService;

beforeAll(async () => {
  await buildChild('mail-child.ts', child);
  service = await fakeMailService();
});
afterAll(async () => {
  await service.close();
  rmSync(folder, { recursive: true, force: true });
  rmSync(child, { force: true });
});

/** Lets the pump's process live; with `killed`, until the service has answered a letter whose record then never comes. */
function live(file: string, killed: boolean): Promise<number | null> {
  const words = [child, file, service.url, service.key, secret, killed ? 'hang' : ''];
  const process_ = spawn(process.execPath, words, { cwd: root, stdio: ['ignore', 'pipe', 'inherit'] });
  process_.stdout.on('data', (text: Buffer) => {
    if (killed && text.toString().includes('answered')) process_.kill('SIGKILL');
  });
  return new Promise((resolve) => process_.on('exit', (code) => resolve(code)));
}

it('a process killed between the service’s answer and its record neither loses nor repeats a letter', async () => {
  const file = join(folder, 'mail.sqlite');
  const { db, close } = openDatabase(file);
  await migrate(db);
  const office = await insertOffice(db, 'Northlight');
  const email = 'orla@northlight.example';
  await insertPerson(db, office, { email, name: 'Orla', role: 'lead', passwordHash: 'none' });
  const about = { project: 'Sheds', batch: 1, batchName: 'Portals', letter: 'A' };
  for (const by of ['one', 'two', 'three']) await putInOutbox(db, office, email, { kind: 'passed', about, by });
  await insertResetRequest(db, { email, address: '192.0.2.1' });
  // Each life sends one letter and dies before it can say so; then what it had in hand is due again.
  for (let lives = 0; lives < 6; lives++) {
    expect(await live(file, true), 'killed').toBeNull();
    await db.updateTable('outbox').set({ due_at: '2026-01-01T00:00:00.000Z' }).where('state', '=', 'waiting').execute();
  }
  expect(await db.selectFrom('outbox').select('id').where('state', '=', 'sent').execute(), 'none was recorded').toEqual([]);
  expect(await live(file, false)).toBe(0);
  const rows = await db.selectFrom('outbox').select(['state', 'message_id', 'payload']).orderBy('id').execute();
  await close();
  expect(rows.map((row) => row.state)).toEqual(['sent', 'sent', 'sent', 'sent']);
  expect(service.requests()).toBe(10);
  // Delivered once each, and recorded under the name by which it was delivered.
  expect(service.delivered).toHaveLength(4);
  expect(rows.map((row) => row.message_id).sort()).toEqual(service.delivered.map((one) => one.id).sort());
});
