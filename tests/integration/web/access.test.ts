/**
 * Every route and page × method × role × own and other office × signed out. The list of addresses comes from the
 * files under app/, so that a route without its line in the table fails the test.
 */
import { readdirSync, readFileSync } from 'node:fs';
import { beforeAll, describe, expect, inject, it } from 'vitest';
import { personRoles, type PersonRole } from '@/lib/access/may';
import { errorShape } from '@/lib/api/error';
import { bring, run, type Brought } from '../../setup/bring';
import { checked, issued } from '../../setup/issue';
import { officeKeys, type OfficeKey } from '../../setup/people';
import { signedIn, Visitor } from '../../setup/visitor';

const { url, people } = inject('server');

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
  [`${revision}/report`]: reads(),
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
  '(desk)/people': { who: { GET: lead } },
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
  [`${page}/glance`]: reads(),
  [`${page}/members`]: reads(),
  [`${page}/movements`]: reads(),
  [`${page}/problems`]: reads(),
  [`${page}/reactions`]: reads(),
  [`${page}/read`]: reads(),
  [`${page}/run`]: reads(),
  [`${page}/settings`]: reads(),
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

  beforeAll(async () => {
    for (const office of officeKeys) {
      for (const role of personRoles) visitors.set(`${office} ${role}`, await signedIn(url, office, role));
      const analyst = visitors.get(`${office} analyst`)!;
      const made = await bring(analyst, `/api/projects/${people[office].project}/batches`, 'samples/pipe-rack-12.xlsx');
      await run(analyst, made);
      brought.set(office, made);
      const rules = [{ from: 'handbook', purpose: 'strength', rule: '1.35 dead' }];
      const set = { name: `Sheds ${office}`, level: 'factored', rules, provenance: 'handbook' };
      const kept = await visitors.get(`${office} lead`)!.send('/api/combination-sets', set);
      sets.set(office, ((await kept.json()) as { set: number }).set);
      issues.set(office, await issueOf(office, analyst));
      const own = { name: `Bar ${office}`, units: 'metric', cells: { shape: 'bar', h: '100', b: '20' } };
      const bar = await visitors.get(`${office} lead`)!.send('/api/own/sections', own);
      parts.set(office, ((await bar.json()) as { id: number }).id);
    }
  });

  /** An issue of the office that its client has, with a question of theirs. */
  async function issueOf(office: OfficeKey, analyst: Visitor): Promise<{ issue: number; question: number }> {
    const [checker, lead] = [visitors.get(`${office} checker`)!, visitors.get(`${office} lead`)!];
    const desk = { url, office: people[office], analyst, checker, lead };
    const { issue } = await issued(lead, await checked(desk), [people[office].people.client]);
    const asked = await visitors.get(`${office} client`)!.send(`/api/issued/${issue}/questions`, { text: 'Which bolts?' });
    return { issue, question: ((await asked.json()) as { question: { id: number } }).question.id };
  }

  /** The address as it names the things of an office. */
  function fill(address: string, office: OfficeKey): string {
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
      .replace('[...nextauth]', 'session')
      .replace('[...rest]', 'no/such/address');
    return `/${filled}${table[address]?.query ?? ''}`;
  }

  async function ask(visitor: Visitor, file: string, address: string, method: Method, office: OfficeKey): Promise<Response> {
    const body = method === 'GET' || method === 'DELETE' ? undefined : JSON.stringify(table[address]?.body ?? {});
    const response = await visitor.fetch(fill(address, office), { method, body });
    if (!isPage(file) && response.status >= 400 && !address.startsWith('api/auth')) {
      expect(errorShape.strict().safeParse(await response.clone().json()).success, `${method} ${address}: shape`).toBe(true);
    }
    return response;
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
          const own = await ask(visitor, file, address, method, 'north');
          const allowed = who.includes(role);
          if (allowed) expect([own.status, role].join(' '), 'own office').not.toMatch(/^(401|403|404|5\d\d)/);
          else expect([own.status, role], 'own office').toEqual([isPage(file) || role === 'client' ? 404 : 403, role]);
          if (allowed && isPage(file) && own.status === 307) expect(own.headers.get('location')).not.toMatch(/sign-in/);
          await own.body?.cancel();
          if (!/\[(project|batch|set|part|issue)\]/.test(address)) continue;
          const other = await ask(visitor, file, address, method, 'south');
          const text = await other.text();
          expect([other.status, role], 'other office').toEqual([allowed || isPage(file) || role === 'client' ? 404 : 403, role]);
          expect(text, 'other office').not.toMatch(/Sheds south|south office|pipe-rack/);
        }
      });
    }
  }

  it('never shows one office a project or a person of the other in a list', async () => {
    const north = visitors.get('north lead')!;
    for (const path of ['/api/projects', '/api/people', '/projects', '/people']) {
      const text = await (await north.fetch(path)).text();
      expect(text).toMatch(/north/);
      expect(text, path).not.toMatch(/south/);
    }
  });
});
