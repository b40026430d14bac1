/**
 * Every route and page × method × role × own and other office × own and other project × signed out × a script's token.
 * The list of addresses comes from the files under app/, so that a route without its line in the table fails the test.
 */
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, describe, expect, inject, it } from 'vitest';
import { openDatabase } from '@/db/open';
import { personRoles, type PersonRole } from '@/lib/access/may';
import { errorShape } from '@/lib/api/error';
import { bring, run, type Brought } from '../../setup/bring';
import { checked, issued } from '../../setup/issue';
import { letterTo } from '../../setup/letters';
import { officeKeys, testPassword, type OfficeKey } from '../../setup/people';
import { signedIn, Visitor } from '../../setup/visitor';

const { url, dataDir, people } = inject('server');

const staff: readonly PersonRole[] = ['lead', 'analyst', 'checker'];
const makers: readonly PersonRole[] = ['lead', 'analyst'];
const lead: readonly PersonRole[] = ['lead'];
const checkers: readonly PersonRole[] = ['lead', 'checker'];
const everybody = 'everybody';

type Who = readonly PersonRole[] | typeof everybody;
type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

/** Who each address is for. `things` = its address names something of an office. */
interface Line {
  readonly who: Partial<Record<Method, Who>>;
  readonly query?: string;
  readonly body?: unknown;
}

const revision = 'api/batches/[batch]/revisions/[revision]';
const page = '(desk)/batches/[batch]/[revision]';
const reads = (query = ''): Line => ({ who: { GET: staff }, query });

const table: Readonly<Record<string, Line>> = {
  'api/ping': { who: { GET: everybody } },
  'api/[...rest]': {
    who: { GET: everybody, POST: everybody, PUT: everybody, PATCH: everybody, DELETE: everybody },
  },
  'api/auth/[...nextauth]': { who: { GET: everybody, POST: everybody } },
  'api/template': { who: { GET: staff } },
  'api/people': { who: { GET: lead, POST: lead }, body: {} },
  'api/people/[person]': { who: { GET: lead, PUT: lead }, body: {} },
  'api/people/[person]/transfer': { who: { POST: lead }, body: {} },
  'api/people/invitations': { who: { GET: lead, POST: lead }, body: {} },
  'api/people/invitations/[invitation]': { who: { POST: lead, DELETE: lead } },
  'api/invitation': { who: { POST: everybody }, body: {} },
  'api/password-reset': { who: { POST: everybody, PUT: everybody }, body: {} },
  'api/me': { who: { GET: personRoles } },
  'api/me/letters': { who: { PUT: personRoles }, body: {} },
  'api/me/password': { who: { PUT: personRoles }, body: {} },
  'api/me/tokens': { who: { GET: personRoles, POST: personRoles }, body: {} },
  'api/me/tokens/[token]': { who: { DELETE: personRoles } },
  'api/activity': { who: { GET: lead } },
  'api/activity/export': { who: { GET: lead } },
  'api/letters': { who: { GET: lead } },
  'api/letters/[letter]/again': { who: { POST: lead } },
  'api/sections': reads(),
  'api/own/[kind]': { who: { GET: staff, POST: lead }, body: {} },
  'api/own/[kind]/[part]': { who: { GET: staff, PUT: lead, DELETE: lead }, body: {} },
  'api/own/[kind]/import': { who: { POST: lead } },
  'api/own/[kind]/template': reads(),
  'api/limits': { who: { GET: staff, PUT: lead }, body: {} },
  'api/combination-sets': { who: { GET: staff, POST: lead }, body: {} },
  'api/combination-sets/[set]': { who: { GET: staff, POST: lead, PUT: lead }, body: {} },
  'api/to-check': reads(),
  'api/projects': { who: { GET: staff, POST: makers }, body: {} },
  'api/projects/[project]': reads(),
  'api/projects/[project]/people': { who: { GET: lead, PUT: lead }, body: {} },
  'api/projects/[project]/activity': reads(),
  'api/projects/[project]/activity/export': reads(),
  'api/projects/[project]/batches': { who: { GET: staff, POST: makers } },
  'api/batches/[batch]': reads(),
  'api/batches/[batch]/revisions': { who: { GET: staff, POST: makers } },
  [revision]: reads(),
  [`${revision}/cell`]: reads('?sheet=Members&cell=A1'),
  [`${revision}/changes`]: { who: { GET: staff, POST: makers }, body: {} },
  [`${revision}/checking`]: { who: { GET: staff, POST: makers }, body: { note: 'x'.repeat(9999) } },
  [`${revision}/checking/return`]: { who: { POST: checkers }, body: {} },
  [`${revision}/checking/pass`]: { who: { POST: checkers }, body: {} },
  [`${revision}/checking/frames/[number]`]: reads(),
  [`${revision}/checking/frames/[number]/seen`]: { who: { POST: checkers, DELETE: checkers } },
  [`${revision}/checking/frames/[number]/queries`]: { who: { POST: checkers }, body: {} },
  [`${revision}/checking/frames/[number]/acceptances`]: { who: { POST: checkers, DELETE: checkers }, body: {} },
  [`${revision}/checking/frames/[number]/own-values`]: { who: { POST: checkers }, body: {} },
  [`${revision}/checking/queries/[query]`]: { who: { POST: staff }, body: {} },
  [`${revision}/compare`]: reads(),
  [`${revision}/compare/export`]: reads(),
  [`${revision}/changes/preview`]: { who: { POST: makers }, body: {} },
  [`${revision}/changes/sheet`]: { who: { GET: makers, POST: makers } },
  [`${revision}/csv`]: reads(),
  [`${revision}/frames/[number]`]: reads(),
  [`${revision}/frames/[number]/buckled`]: reads('?result=C1'),
  [`${revision}/frames/[number]/model`]: reads(),
  [`${revision}/section`]: reads('?name=IPE%20300&of=S275'),
  [`${revision}/size`]: { who: { GET: staff, POST: makers }, body: {} },
  [`${revision}/size/groups`]: reads(),
  [`${revision}/size/[sizing]`]: { who: { GET: staff, POST: makers, DELETE: makers } },
  [`${revision}/size/[sizing]/export`]: reads(),
  [`${revision}/input`]: reads(),
  [`${revision}/issue`]: { who: { GET: staff, POST: ['lead', 'checker'] }, body: {} },
  'api/issues': reads(),
  'api/issues/who': { who: { GET: staff, PUT: lead }, body: {} },
  'api/issues/[issue]': reads(),
  'api/issues/[issue]/clients': { who: { GET: staff, POST: ['lead', 'checker'] }, body: {} },
  'api/issues/[issue]/engine': { who: { GET: staff, POST: staff } },
  'api/issues/[issue]/files/[file]': reads(),
  'api/issues/[issue]/questions/[question]': { who: { POST: staff }, body: {} },
  'api/issues/[issue]/withdraw': { who: { POST: ['lead', 'checker'] }, body: {} },
  'api/issued': { who: { GET: ['client'] } },
  'api/issued/[issue]': { who: { GET: ['client'] } },
  'api/issued/[issue]/files/[file]': { who: { GET: ['client'] } },
  'api/issued/[issue]/frames': { who: { GET: ['client'] } },
  'api/issued/[issue]/questions': { who: { GET: ['client'], POST: ['client'] }, body: {} },
  'api/issued/[issue]/questions/[question]': { who: { POST: ['client'] }, body: {} },
  'api/issued/[issue]/receipt': { who: { POST: ['client'] } },
  [`${revision}/json`]: reads(),
  [`${revision}/marked-copy`]: reads(),
  [`${revision}/progress`]: reads(),
  [`${revision}/report`]: reads('?frames=1'),
  [`${revision}/run`]: { who: { POST: makers, DELETE: makers } },
  [`${revision}/summary`]: reads(),
  [`${revision}/tables/[table]`]: reads(),
  [`${revision}/tables/[table]/export`]: reads('?format=csv'),
  [`${revision}/tables/[table]/facets`]: reads(),
  [`${revision}/workbook`]: reads(),
  '': { who: { GET: everybody } },
  'sign-in': { who: { GET: everybody } },
  issued: { who: { GET: ['client'] } },
  // the office's people go on to its record
  'issued/[issue]': { who: { GET: personRoles } },
  '(desk)/issues': reads(),
  '(desk)/issues/[issue]': reads(),
  'invitation/[token]': { who: { GET: everybody } },
  password: { who: { GET: everybody } },
  'password/[token]': { who: { GET: everybody } },
  '(desk)/me': { who: { GET: personRoles } },
  '(desk)/activity': { who: { GET: lead } },
  '(desk)/letters': { who: { GET: lead } },
  '(desk)/letters/[letter]': { who: { GET: lead } },
  '(desk)/people': { who: { GET: lead } },
  '(desk)/people/[person]': { who: { GET: lead } },
  '(desk)/sections': reads(),
  '(desk)/sections/own': reads(),
  '(desk)/sections/own/[kind]/new': { who: { GET: lead } },
  '(desk)/sections/own/[kind]/import': { who: { GET: lead } },
  '(desk)/sections/own/[kind]/[part]': reads(),
  '(desk)/limits': reads(),
  '(desk)/combinations': reads(),
  '(desk)/combinations/[set]': reads(),
  '(desk)/to-check': reads(),
  '(desk)/projects': reads(),
  '(desk)/projects/[project]': reads(),
  '(desk)/projects/[project]/activity': reads(),
  '(desk)/projects/[project]/bring': { who: { GET: makers } },
  [page]: reads(),
  [`${page}/bring`]: { who: { GET: makers } },
  [`${page}/issue`]: reads(),
  [`${page}/change`]: { who: { GET: makers } },
  [`${page}/checking`]: reads(),
  [`${page}/checks`]: reads(),
  [`${page}/compare`]: reads(),
  [`${page}/frames`]: reads(),
  [`${page}/frames/[number]`]: reads(),
  [`${page}/frames/[number]/numbers`]: reads(),
  [`${page}/frames/[number]/try`]: reads(),
  [`${page}/glance`]: reads(),
  [`${page}/members`]: reads(),
  [`${page}/movements`]: reads(),
  [`${page}/problems`]: reads(),
  [`${page}/reactions`]: reads(),
  [`${page}/read`]: reads(),
  [`${page}/run`]: reads(),
  [`${page}/settings`]: reads(),
  [`${page}/size`]: reads(),
};

const files = readdirSync('app', { recursive: true, encoding: 'utf8' })
  .filter((file) => /(^|\/)(route|page)\.tsx?$/.test(file))
  .map((file) => `app/${file}`);
const addresses = files.map((file) => ({ file, address: file.replace(/^app\//, '').replace(/\/?(route|page)\.tsx?$/, '') }));
const isPage = (file: string): boolean => file.endsWith('page.tsx');

/** The methods that a route's file offers; a page is read. */
function methodsOf(file: string): Method[] {
  if (isPage(file)) return ['GET'];
  const text = readFileSync(file, 'utf8');
  return (['GET', 'POST', 'PUT', 'PATCH', 'DELETE'] as const).filter((method) =>
    new RegExp(`export (const |function |async function |\\{[^}]* as )${method}\\b`).test(text),
  );
}

describe('access', () => {
  const visitors = new Map<string, Visitor>();
  const brought = new Map<OfficeKey, Brought>();
  const sets = new Map<OfficeKey, number>();
  const issues = new Map<OfficeKey, { issue: number; question: number }>();
  const parts = new Map<OfficeKey, number>();
  const sizings = new Map<OfficeKey, number>();
  const desks = new Map<OfficeKey, { invitation: number; failed: number; kept: string }>();
  /** Each person's own. */
  const tokens = new Map<string, number>();
  let reading = '';

  beforeAll(async () => {
    for (const office of officeKeys) {
      for (const role of personRoles) visitors.set(`${office} ${role}`, await signedIn(url, office, role));
      const analyst = visitors.get(`${office} analyst`)!;
      const made = await bring(analyst, `/api/projects/${people[office].project}/batches`, 'samples/pipe-rack-12.xlsx');
      await run(analyst, made);
      brought.set(office, made);
      const groups = [{ by: 'role', name: 'column', range: 'HE B' }];
      const sized = await analyst.send(`/api/batches/${made.batch}/revisions/${made.revision}/size`, { groups });
      sizings.set(office, ((await sized.json()) as { sizing: { id: number } }).sizing.id);
      const rules = [{ from: 'handbook', purpose: 'strength', rule: '1.35 dead' }];
      const set = { name: `Sheds ${office}`, level: 'factored', rules, provenance: 'handbook' };
      const kept = await visitors.get(`${office} lead`)!.send('/api/combination-sets', set);
      sets.set(office, ((await kept.json()) as { set: number }).set);
      issues.set(office, await issueOf(office, analyst));
      const own = { name: `Bar ${office}`, units: 'metric', cells: { shape: 'bar', h: '100', b: '20' } };
      const bar = await visitors.get(`${office} lead`)!.send('/api/own/sections', own);
      parts.set(office, ((await bar.json()) as { id: number }).id);
      desks.set(office, await lettersOf(office, visitors.get(`${office} lead`)!));
      for (const role of personRoles) {
        const asked = { name: 'access', scope: 'read', days: 7 };
        const token = await visitors.get(`${office} ${role}`)!.send('/api/me/tokens', asked);
        const { id, secret } = ((await token.json()) as { token: { id: number; secret: string } }).token;
        tokens.set(`${office} ${role}`, id);
        if (role === 'lead' && office === 'south') reading = secret;
      }
    }
    await assignElsewhere();
  });

  /** An open invitation of the office, its letter as it is kept, and a letter that failed. */
  async function lettersOf(office: OfficeKey, lead: Visitor): Promise<{ invitation: number; failed: number; kept: string }> {
    const to = `access@${office}.example`;
    const answer = await lead.send('/api/people/invitations', { email: to, role: 'client' });
    const { invitation } = (await answer.json()) as { invitation: { id: number } };
    const kept = await letterTo({ dataDir, office: people[office].office, to, kind: 'invitation' });
    const { db, close } = openDatabase(join(dataDir, 'tallyframe.sqlite'));
    const at = '2026-12-01T09:00:00.000Z';
    const letter = { kind: 'passed', payload: '{}', state: 'failed', idempotency_key: `access ${office}`, due_at: at, created_at: at } as const; // prettier-ignore
    const values = { ...letter, office: people[office].office, recipient: to };
    const { id } = await db.insertInto('outbox').values(values).returning('id').executeTakeFirstOrThrow();
    await close();
    return { invitation: invitation.id, failed: id, kept: kept.id };
  }

  /** Someone of every role of the north office who is assigned to another of its projects, and to that alone. */
  async function assignElsewhere(): Promise<void> {
    const lead = visitors.get('north lead')!;
    const made = await lead.send('/api/projects', { name: 'Yards north' });
    const { project } = (await made.json()) as { project: { id: number } };
    for (const role of personRoles) {
      const email = `elsewhere.${role}@north.example`;
      const added = await lead.send('/api/people', { name: `elsewhere ${role}`, email, role, password: testPassword });
      const { person } = (await added.json()) as { person: { id: number } };
      await lead.send(`/api/people/${person.id}`, { projects: [project.id] }, 'PUT');
      const visitor = new Visitor(url);
      await visitor.trySignIn(email, testPassword);
      visitors.set(`elsewhere ${role}`, visitor);
    }
  }

  /** An issue of the office that its client has, with a question of theirs. */
  async function issueOf(office: OfficeKey, analyst: Visitor): Promise<{ issue: number; question: number }> {
    const [checker, lead] = [visitors.get(`${office} checker`)!, visitors.get(`${office} lead`)!];
    const desk = { url, office: people[office], analyst, checker, lead };
    const { issue } = await issued(lead, await checked(desk), [people[office].people.client]);
    const asked = await visitors.get(`${office} client`)!.send(`/api/issued/${issue}/questions`, { text: 'Which bolts?' });
    return { issue, question: ((await asked.json()) as { question: { id: number } }).question.id };
  }

  /** The address as it names the things of an office. */
  function fill(address: string, office: OfficeKey, role: PersonRole): string {
    const { batch, revision: letter } = brought.get(office)!;
    const filled = address
      .replace('(desk)/', '')
      .replace('[set]', String(sets.get(office)))
      .replace('[kind]', 'sections')
      .replace('[part]', String(parts.get(office)))
      .replace('[project]', String(people[office].project))
      .replace('[batch]', String(batch))
      .replace('[revision]', letter)
      .replace('[issue]', String(issues.get(office)!.issue))
      .replace('[question]', String(issues.get(office)!.question))
      .replace('[file]', 'input')
      .replace('[number]', '1')
      .replace('[query]', '1')
      .replace('[table]', 'members')
      .replace('[sizing]', String(sizings.get(office)))
      .replace('[person]', String(people[office].people.checker))
      .replace('[invitation]', String(desks.get(office)!.invitation))
      .replace('letters/[letter]/again', `letters/${desks.get(office)!.failed}/again`)
      .replace('[letter]', desks.get(office)!.kept)
      .replace('me/tokens/[token]', `me/tokens/${tokens.get(`${office} ${role}`)}`)
      .replace('[token]', 'no-such-secret')
      .replace('[...nextauth]', 'session')
      .replace('[...rest]', 'no/such/address');
    return `/${filled}${table[address]?.query ?? ''}`;
  }

  async function ask(
    visitor: Visitor,
    file: string,
    address: string,
    method: Method,
    office: OfficeKey,
    role: PersonRole = 'lead',
  ): Promise<Response> {
    const body = method === 'GET' || method === 'DELETE' ? undefined : JSON.stringify(table[address]?.body ?? {});
    const response = await visitor.fetch(fill(address, office, role), { method, body });
    if (!isPage(file) && response.status >= 400 && !address.startsWith('api/auth')) {
      expect(errorShape.strict().safeParse(await response.clone().json()).success, `${method} ${address}: shape`).toBe(true);
    }
    return response;
  }

  /** Staff reach every project of their office; a client none but those they are assigned to. */
  async function askElsewhere(file: string, address: string, method: Method, role: PersonRole, allowed: boolean): Promise<void> {
    // Files take their time to make: of staff, one is asked.
    if (/\/(csv|json|workbook|report|marked-copy|input|export)$/.test(address) && (role === 'lead' || role === 'checker')) return;
    const answer = await ask(visitors.get(`elsewhere ${role}`)!, file, address, method, 'north', role);
    const text = await answer.text();
    if (role === 'client') {
      expect([answer.status, role], 'other project').toEqual([404, role]);
      expect(text, 'other project').not.toMatch(/Sheds north|pipe-rack/);
    } else if (allowed) expect([answer.status, role].join(' '), 'other project').not.toMatch(/^(401|403|404|5\d\d)/);
    else expect([answer.status, role], 'other project').toEqual([isPage(file) ? 404 : 403, role]);
  }

  it('has a line for every route and page, and no line for one that is gone', () => {
    expect(addresses.map(({ address }) => address).sort()).toEqual(Object.keys(table).sort());
    for (const { file, address } of addresses) {
      expect(methodsOf(file).sort(), address).toEqual(Object.keys(table[address]!.who).sort());
    }
  });

  for (const { file, address } of addresses) {
    for (const method of methodsOf(file)) {
      const who = table[address]?.who[method];
      it(`${method} /${address} is for ${typeof who === 'string' ? who : (who ?? []).join(', ')}`, async () => {
        expect(who).toBeDefined();
        const nobody = await ask(new Visitor(url), file, address, method, 'north');
        if (who === everybody) expect(nobody.status).toBeLessThan(500);
        else if (isPage(file)) {
          expect(nobody.status).toBe(307);
          expect(nobody.headers.get('location')).toMatch(/^\/sign-in\?next=/);
        } else expect(nobody.status, 'signed out').toBe(401);
        if (who === everybody || who === undefined) return;
        for (const role of personRoles) {
          const visitor = visitors.get(`north ${role}`)!;
          const own = await ask(visitor, file, address, method, 'north', role);
          const allowed = who.includes(role);
          if (allowed) expect([own.status, role].join(' '), 'own office').not.toMatch(/^(401|403|404|5\d\d)/);
          else expect([own.status, role], 'own office').toEqual([isPage(file) || role === 'client' ? 404 : 403, role]);
          if (allowed && isPage(file) && own.status === 307) expect(own.headers.get('location')).not.toMatch(/sign-in/);
          await own.body?.cancel();
          if (/\[(project|batch|issue)\]/.test(address)) await askElsewhere(file, address, method, role, allowed);
          if (!/\[(project|batch|set|part|issue|person|invitation|letter|token)\]/.test(address)) continue;
          const other = await ask(visitor, file, address, method, 'south', role);
          const text = await other.text();
          expect([other.status, role], 'other office').toEqual([allowed || isPage(file) || role === 'client' ? 404 : 403, role]);
          expect(text, 'other office').not.toMatch(/Sheds south|south office|pipe-rack/);
        }
      });
    }
  }

  it('lets a token for reading change nothing, whatever the address', async () => {
    for (const { file, address } of addresses) {
      for (const method of methodsOf(file)) {
        const who = table[address]?.who[method];
        if (method === 'GET' || isPage(file) || who === everybody || who === undefined) continue;
        const headers = { authorization: `Bearer ${reading}` };
        const answer = await fetch(`${url}${fill(address, 'south', 'lead')}`, { method, headers });
        expect([answer.status, `${method} ${address}`]).toEqual([403, `${method} ${address}`]);
      }
    }
  });

  it('never shows one office a project or a person of the other in a list', async () => {
    const north = visitors.get('north lead')!;
    for (const path of ['/api/projects', '/api/people', '/projects', '/people']) {
      const text = await (await north.fetch(path)).text();
      expect(text).toMatch(/north/);
      expect(text, path).not.toMatch(/south/);
    }
  });
});
