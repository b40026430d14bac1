import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, inject, it } from 'vitest';
import { run, stateBecomes } from '../../setup/bring';
import { signedIn, type Visitor } from '../../setup/visitor';

const { url, people } = inject('server');

interface Told {
  readonly entries: readonly { readonly what: string; readonly person: string | null; readonly letter: string | null }[];
  readonly before: number | null;
}

describe('a project’s activity', () => {
  let lead: Visitor;
  let project = 0;
  const at = (more = '') => `/api/projects/${project}/activity${more}`;

  beforeAll(async () => {
    lead = await signedIn(url, 'north', 'lead');
    const made = await lead.send('/api/projects', { name: 'Activity yards' });
    project = ((await made.json()) as { project: { id: number } }).project.id;
    const analyst = await signedIn(url, 'north', 'analyst');
    const form = new FormData();
    form.append('name', '=1+1');
    form.append('files', new Blob([readFileSync('samples/pipe-rack-12.xlsx')]), 'pipe-rack-12.xlsx');
    const brought = await analyst.json<{ batch: { id: number }; revision: string }>(`/api/projects/${project}/batches`, {
      method: 'POST',
      body: form,
    });
    const revision = { batch: brought.batch.id, revision: brought.revision };
    await stateBecomes(analyst, revision, (state) => state === 'read');
    await run(analyst, revision);
  });

  it('says who did what, the newest first, by person, kind and days', async () => {
    const { entries, before } = await lead.json<Told>(at());
    expect(entries.map(({ what, person }) => `${person}: ${what}`)).toEqual([
      'analyst of north: started a run',
      'analyst of north: brought sheets in',
      'lead of north: added a project',
    ]);
    expect(before).toBeNull();
    const whats = async (more: string) => (await lead.json<Told>(at(more))).entries.map((one) => one.what);
    expect(await whats(`?person=${people.north.people.lead}`)).toEqual(['added a project']);
    expect(await whats('?what=started+a+run')).toEqual(['started a run']);
    expect(await whats('?to=2020-01-01')).toEqual([]);
    expect(await whats('?from=2020-01-01&to=2099-01-01&person=')).toHaveLength(3);
    expect((await lead.fetch(at('?from=yesterday'))).status).toBe(400);
  });

  it('goes out as CSV, what a spreadsheet would run as a formula made harmless', async () => {
    const answer = await lead.fetch(at('/export?what=started+a+run'));
    expect(answer.headers.get('content-disposition')).toContain('attachment');
    const lines = (await answer.text()).trim().split('\r\n');
    expect(lines).toHaveLength(2);
    expect(lines[1]).toMatch(/,analyst of north,started a run,"'=1\+1, revision A",/);
  });

  it('of the whole office is the lead’s: people and settings stand in it too', async () => {
    const email = 'activity.wren@client.example';
    await lead.send('/api/people/invitations', { email, role: 'client' });
    const { entries } = await lead.json<Told>('/api/activity?what=invited+a+person');
    expect(JSON.stringify(entries[0])).toContain(email);
    expect(await (await lead.fetch('/api/activity/export?what=invited+a+person')).text()).toContain(email);
    expect(await (await lead.fetch('/activity')).text()).toContain('invited a person');
    const south = await signedIn(url, 'south', 'lead');
    expect(await (await south.fetch('/api/activity')).text()).not.toContain(email);
  });

  it('is shown on a page with its filters, and not at all to another office', async () => {
    const page = await (await lead.fetch(`/projects/${project}/activity?what=started+a+run`)).text();
    expect(page).toContain('revision A');
    const south = await signedIn(url, 'south', 'lead');
    for (const path of [at(), at('/export'), `/projects/${project}/activity`]) expect((await south.fetch(path)).status).toBe(404);
  });
});
