import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { View } from '@/lib/tables/view';
import { listFromParams, listToSearch, viewFromParams, viewToParams, viewToSearch } from './view-address';

const read = (table: View['table'], text: string) => viewFromParams(table, new URLSearchParams(text));

describe('the address of a view', () => {
  const view: View = {
    table: 'members',
    filters: [
      { column: 'role', op: 'in', values: ['rafter'] },
      { column: 'ratio', op: 'range', min: 0.8, max: null },
      { column: 'p:depot', op: 'in', values: ['D05', 'D09'] },
      { column: 'frame', op: 'contains', text: 'D0' },
    ],
    sort: { column: 'ratio', descending: true },
    columns: ['frame', 'member', 'ratio'],
  };

  it('can be read by a person', () => {
    expect(viewToSearch(view)).toBe(
      '?role=rafter&ratio=0.8..&p:depot=D05&p:depot=D09&frame=~D0&sort=-ratio&columns=frame,member,ratio',
    );
  });

  it('reproduces the view', () => {
    expect(read('members', viewToSearch(view))).toEqual(view);
    expect(viewToSearch(read('members', ''))).toBe('');
  });

  it('leaves out what names no column, and a sort that is not offered', () => {
    expect(read('members', 'colour=red&sort=length&columns=colour')).toEqual({
      table: 'members',
      filters: [],
      sort: null,
      columns: null,
    });
  });

  it('keeps any value, those too that look like ranges or hold commas', () => {
    const value = fc.oneof(fc.string({ minLength: 1, maxLength: 30 }), fc.constantFrom('1..2', '~x', '=x', 'a,b', '%2C', '..'));
    fc.assert(
      fc.property(fc.uniqueArray(value, { minLength: 1, maxLength: 5 }), value, (values, name) => {
        const odd: View = {
          table: 'frames',
          filters: [{ column: 'section', op: 'in', values }],
          sort: null,
          columns: ['frame', `p:${name}`],
        };
        expect(viewFromParams('frames', viewToParams(odd))).toEqual(odd);
        expect(read('frames', viewToSearch(odd))).toEqual(odd);
      }),
      { seed: 20261201 },
    );
  });

  it('keeps ranges exactly', () => {
    // −0 is written 0, which is the same bound.
    const end = fc.double({ noNaN: true, noDefaultInfinity: true }).map((value) => value + 0);
    fc.assert(
      fc.property(fc.option(end), end, (min, max) => {
        const one: View = { table: 'frames', filters: [{ column: 'ratio', op: 'range', min, max }], sort: null, columns: null };
        expect(read('frames', viewToSearch(one))).toEqual(one);
      }),
      { seed: 20261201 },
    );
  });

  it('names the table whose list a frame is walked through, where that is not the frames’', () => {
    const list: View = {
      table: 'members',
      filters: [{ column: 'verdict', op: 'in', values: ['over'] }],
      sort: { column: 'ratio', descending: true },
      columns: null,
    };
    expect(listToSearch(list)).toBe('?list=members&verdict=over&sort=-ratio');
    expect(listFromParams(new URLSearchParams(listToSearch(list)))).toEqual(list);
    const frames: View = { ...list, table: 'frames' };
    expect(listToSearch(frames)).toBe('?verdict=over&sort=-ratio');
    expect(listFromParams(new URLSearchParams(listToSearch(frames)))).toEqual(frames);
    expect(listFromParams(new URLSearchParams('list=problems')).table).toBe('frames');
    expect(listFromParams(new URLSearchParams('list=nothing')).table).toBe('frames');
  });
});
