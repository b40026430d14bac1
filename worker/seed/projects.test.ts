import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { seedPeople } from './people';
import { seedProjects } from './projects';

const samples = new URL('../../samples', import.meta.url).pathname;

describe('the invented office', () => {
  it('brings in sheets that are there, by people that it has', () => {
    const keys = new Set(seedPeople.map((person) => person.key));
    for (const project of seedProjects) {
      expect(keys).toContain(project.client);
      for (const batch of project.batches) {
        expect(keys).toContain(batch.by);
        for (const { source } of batch.revisions) expect(existsSync(join(samples, source)), source).toBe(true);
      }
    }
  });

  it('has a lead, two analysts, a checker and two clients, and passwords of their own', () => {
    expect(seedPeople.map((person) => person.role).sort()).toEqual(['analyst', 'analyst', 'checker', 'client', 'client', 'lead']);
    expect(new Set(seedPeople.map((person) => person.password)).size).toBe(seedPeople.length);
    for (const { email } of seedPeople) expect(email).toMatch(/\.example$/);
  });
});
