import { describe, expect, it } from 'vitest';
import { acts, homeOf, may, personRoles } from './may';

const of = (role: (typeof personRoles)[number], office = 1) => ({ role, office });

const clientsOwn: readonly string[] = ['read what was issued', 'ask about an issue'];

describe('who may do what', () => {
  it('lets nobody touch a thing of another office, whatever the role and the act', () => {
    for (const role of personRoles)
      for (const act of acts) expect(may(of(role), act, { office: 2 }), `${role}: ${act}`).toBe(false);
  });

  it('gives the lead everything in the office but the clients’ own pages and questions', () => {
    for (const act of acts) expect(may(of('lead'), act, { office: 1 })).toBe(!clientsOwn.includes(act));
  });

  it('lets a checker read everything and mark it, and change nothing', () => {
    expect(acts.filter((act) => may(of('checker'), act))).toEqual([
      'read projects',
      'read sections',
      'read limits',
      'read combination sets',
      'read a batch',
      'check',
      'answer a query',
      'take results away',
      'read activity',
      'be oneself',
      'read issues',
      'issue',
      'answer questions',
      'test issued numbers',
    ]);
  });

  it('lets an analyst prepare and run batches but not add people', () => {
    expect(may(of('analyst'), 'bring sheets in')).toBe(true);
    expect(may(of('analyst'), 'run')).toBe(true);
    expect(may(of('analyst'), 'size sections')).toBe(true);
    expect(may(of('analyst'), 'change a revision')).toBe(true);
    expect(may(of('analyst'), 'send to check')).toBe(true);
    expect(may(of('analyst'), 'check')).toBe(false);
    expect(may(of('analyst'), 'add people')).toBe(false);
    expect(may(of('analyst'), 'assign people')).toBe(false);
  });

  it('shows a client only what was issued', () => {
    expect(acts.filter((act) => may(of('client'), act))).toEqual(['be oneself', ...clientsOwn]);
    expect(homeOf('client')).toBe('/issued');
  });
});
