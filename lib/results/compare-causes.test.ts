import { describe, expect, it } from 'vitest';
import { causesOf } from '@/lib/results/compare-causes';
import type { InputDifference } from '@/lib/results/compare-inputs';

const cell = (
  sheet: string,
  where: string,
  what: string | null,
  before: string | null,
  after: string | null,
): InputDifference => ({
  sheet,
  where,
  what,
  before,
  after,
  rowBefore: 1,
  rowAfter: 1,
});

describe('the cause of a movement', () => {
  const causes = causesOf(
    [
      cell('Variants', 'D1', 'rafter', 'IPE 360', 'IPE 400'),
      cell('Members', 'D2, BC', 'section', 'IPE 300', 'IPE 330'),
      cell('Members', 'D2, AB', 'section', 'HE 200 B', 'HE 220 B'),
      cell('Supports', 'D2, A', 'ux', null, 'fixed'),
      cell('Member loads', 'a, b, wind, BC', 'value', '1', '2'),
      cell('Load cases', 'snow', 'self weight', '0', '1'),
      cell('Members', '*, XY', null, null, 'member XY'),
      cell('Nodes', 'headings', 'heading', 'z', null),
    ],
    ['D1', 'd2', 'D3', 'a, b'],
  );

  it('is what differs in rows that name the frame', () => {
    expect(causes.ofFrame('D1')).toBe('rafter IPE 360 to IPE 400');
    expect(causes.ofFrame('D2')).toBe('BC section IPE 300 to IPE 330; AB section HE 200 B to HE 220 B; and 1 more');
    expect(causes.ofFrame('a, b')).toBe('wind, BC value 1 to 2');
  });

  it('is a row for several frames where none of the frame’s own differs', () => {
    expect(causes.ofFrame('D3')).toBe('snow self weight 0 to 1; *, XY added to Members');
    expect(causesOf([], ['D3']).ofFrame('D3')).toBeNull();
  });

  it('is a member’s own row before its frame’s', () => {
    expect(causes.ofMember('D2', 'BC')).toBe('section IPE 300 to IPE 330');
    expect(causes.ofMember('D2', 'CD')).toContain('and 1 more');
    expect(causes.ofMember('D1', 'BC')).toBe('rafter IPE 360 to IPE 400');
  });
});
