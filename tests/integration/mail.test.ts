import { afterEach, describe, expect, it } from 'vitest';
import { insertLink } from '@/db/queries/links';
import { updateMailChoices } from '@/db/queries/mail-choices';
import { listLetters, putInOutbox, updateLetterAgain } from '@/db/queries/outbox';
import { insertResetRequest } from '@/db/queries/password-resets';
import { newDatabase } from '@/db/testing/database';
import { office } from '@/db/testing/sample';
import { mostAttempts } from '@/lib/mail/back-off';
import type { MailMessage } from '@/lib/mail/message';
import { down, fakeMailService, type FakeMailService } from '../fakes/mail-service';
import { MailPump } from '@/worker/mail/pump';

const secret = 'of the server, for tests only';
const passed: MailMessage = {
  kind: 'passed',
  about: { project: 'Sheds', batch: 1, batchName: 'Portals', letter: 'A' },
  by: 'Bram',
};
const services: FakeMailService[] = [];
afterEach(async () => {
  for (const service of services.splice(0)) await service.close();
});

async function setUp() {
  const database = await newDatabase();
  const own = await office(database.db, 'Northlight');
  const { email } = await database.db.selectFrom('person').select('email').where('id', '=', own.person).executeTakeFirstOrThrow();
  const service = await fakeMailService();
  services.push(service);
  const said: unknown[] = [];
  const log = (message: string, facts: unknown): void => void said.push({ message, facts });
  const pump = new MailPump({ db: database.db, service: service.client, site: 'https://frames.example', secret, log });
  /** Time passes: whatever waits is due. */
  const later = () => database.db.updateTable('outbox').set({ due_at: '2026-01-01T00:00:00.000Z' }).execute();
  return { ...database, own, email, service, pump, said, later };
}

describe('the outbox', () => {
  it('sends a letter once, and keeps the service’s name for it', async () => {
    const { db, own, email, service, pump } = await setUp();
    await putInOutbox(db, own.office, email, passed);
    await pump.look();
    await pump.look();
    expect(service.delivered.map(({ to, kind, office: of }) => ({ to, kind, of }))).toEqual([
      { to: email, kind: 'passed', of: own.office },
    ]);
    const row = await db.selectFrom('outbox').selectAll().executeTakeFirstOrThrow();
    expect(row).toMatchObject({ state: 'sent', message_id: service.delivered[0]!.id, attempts: 1 });
  });

  it('keeps a letter while the service is down, waits longer each time, and delivers it when it is back', async () => {
    const { db, own, email, service, pump, later, said } = await setUp();
    service.fail(3, down);
    await putInOutbox(db, own.office, email, passed);
    const waits: number[] = [];
    for (let i = 0; i < 3; i++) {
      const before = Date.now();
      await pump.look();
      await pump.look(); // not due: nothing is asked
      const { due_at } = await db.selectFrom('outbox').select('due_at').executeTakeFirstOrThrow();
      waits.push(Math.round((Date.parse(due_at) - before) / 10_000) * 10);
      await later();
    }
    expect(waits).toEqual([30, 60, 120]);
    expect(service.requests()).toBe(3);
    expect(service.delivered).toHaveLength(0);
    await pump.look();
    expect(service.delivered).toHaveLength(1);
    expect(said).toHaveLength(3);
  });

  it('gives up after so many attempts, lists the letter, and delivers it when someone tries again', async () => {
    const { db, own, email, service, pump, later } = await setUp();
    service.fail(mostAttempts, down);
    await putInOutbox(db, own.office, email, passed);
    for (let i = 0; i < mostAttempts; i++) {
      await pump.look();
      await later();
    }
    await pump.look();
    expect(service.requests()).toBe(mostAttempts);
    const [failed] = await listLetters(db, own.office, { state: 'failed' });
    expect(failed).toMatchObject({ recipient: email, attempts: mostAttempts });
    expect(failed!.lastError).toBe('refused: without a reason');
    expect(await updateLetterAgain(db, own.office + 1, failed!.id), 'another office').toBe(false);
    expect(await updateLetterAgain(db, own.office, failed!.id)).toBe(true);
    expect(await updateLetterAgain(db, own.office, failed!.id), 'twice').toBe(false);
    await pump.look();
    expect(service.delivered).toHaveLength(1);
  });

  it('does not try again what the service will never take, and goes on with the next letter', async () => {
    const { db, own, email, service, pump } = await setUp();
    service.fail(1, { status: 422, body: { statusCode: 422, name: 'validation_error', message: 'Invalid `to` field.' } });
    await putInOutbox(db, own.office, email, passed);
    await putInOutbox(db, own.office, email, { ...passed, by: 'Orla' });
    await pump.look();
    expect(service.delivered.map((one) => one.text.includes('Orla'))).toEqual([true]);
    expect(await listLetters(db, own.office, { state: 'failed' })).toMatchObject([
      { attempts: 1, lastError: 'validation_error: Invalid `to` field.' },
    ]);
  });

  it('sends each letter once though two pumps look at the same moment', async () => {
    const { db, own, email, service, pump } = await setUp();
    const other = new MailPump({ db, service: service.client, site: 'https://frames.example', secret, log: () => undefined });
    for (let i = 0; i < 12; i++) await putInOutbox(db, own.office, email, { ...passed, by: `Bram ${i}` });
    await Promise.all([pump.look(), other.look()]);
    expect(service.requests()).toBe(12);
    expect(service.delivered).toHaveLength(12);
  });

  it('leaves out who declined the kind and who left the office, but not from what everyone must get', async () => {
    const { db, own, email, service, pump } = await setUp();
    await updateMailChoices(db, own.office, own.person, { passed: false });
    expect(await putInOutbox(db, own.office, email, passed)).toBe(false);
    await updateMailChoices(db, own.office, own.person, { passed: true });
    expect(await putInOutbox(db, own.office, email, passed)).toBe(true);
    await db.updateTable('membership').set({ ended_at: '2026-12-01T00:00:00.000Z' }).execute();
    expect(await putInOutbox(db, own.office, email, passed)).toBe(false);
    const { about } = passed;
    const issue = { project: about.project, batchName: about.batchName, letter: about.letter, issue: 1, number: '1-001' };
    const withdrawn: MailMessage = { kind: 'withdrawn', about: issue, by: 'Orla', reason: 'Snow was left out.' };
    expect(await putInOutbox(db, own.office, email, withdrawn)).toBe(true);
    await pump.look();
    expect(
      service.delivered.map((one) => one.kind),
      'not what was written before they left either',
    ).toEqual(['withdrawn']);
    const [kept] = await listLetters(db, own.office, { state: 'failed' });
    expect(kept).toMatchObject({ kind: 'passed', lastError: expect.stringContaining('disabled') as string });
    await updateLetterAgain(db, own.office, kept!.id);
    await pump.look();
    expect(service.delivered).toHaveLength(1);
  });

  it('rolls a letter back with the act that caused it', async () => {
    const { db, own, email } = await setUp();
    const act = db.transaction().execute(async (within) => {
      await putInOutbox(within, own.office, email, passed);
      throw new Error('the act failed');
    });
    await expect(act).rejects.toThrow('the act failed');
    expect(await listLetters(db, own.office)).toEqual([]);
  });
});

describe('a letter with a link that works once', () => {
  it('carries the secret, of which the database holds no trace', async () => {
    const { db, raw, own, email, service, pump } = await setUp();
    await insertResetRequest(db, { email, address: '192.0.2.1' });
    await insertResetRequest(db, { email: 'nobody@elsewhere.example', address: '192.0.2.1' });
    await pump.look();
    expect(service.delivered.map((one) => one.to)).toEqual([email]);
    const carried = /\/password\/([\w-]{43})/.exec(service.delivered[0]!.text)![1]!;
    const tables = raw.prepare<[], { name: string }>(`select name from sqlite_master where type = 'table'`).all();
    for (const { name } of tables) {
      const text = JSON.stringify(raw.prepare(`select * from "${name}"`).all());
      expect(text.includes(carried), name).toBe(false);
    }
    expect(own.office).toBeGreaterThan(0);
  });

  it('is not sent where the link has ended meanwhile', async () => {
    const { db, own, email, service, pump } = await setUp();
    const link = await insertLink(db, own.office, { person: own.person }, secret);
    await putInOutbox(db, own.office, email, { kind: 'password reset', link });
    await insertLink(db, own.office, { person: own.person }, secret); // a later one ends it
    await pump.look();
    expect(service.delivered).toEqual([]);
    expect(await listLetters(db, own.office)).toMatchObject([{ state: 'failed', attempts: 1 }]);
  });
});
