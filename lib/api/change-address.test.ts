import { describe, expect, it } from 'vitest';
import { pages } from '@/lib/api/addresses';

describe('the address of a change with its section filled in', () => {
  it('names every member of one frame, or what members are asked for by', () => {
    const members = ['BC', 'C D'].map((member) => ({ frame: 'F 1', member }));
    expect(pages.changeTo(7, 'A', { kind: 'section', what: { members }, to: 'IPE 300' })).toBe(
      '/batches/7/A/change?frame=F%201&member=BC&member=C%20D&to=IPE%20300',
    );
    const byRole = pages.changeTo(7, 'A', { kind: 'section', what: { role: 'rafter' }, to: 'IPE 300' });
    expect(byRole).toBe('/batches/7/A/change?role=rafter&to=IPE%20300');
  });
});
