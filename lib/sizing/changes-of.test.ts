import { describe, expect, it } from 'vitest';
import { changesOf } from '@/lib/sizing/changes-of';

const found = (name: string, chosen: string | null, before: readonly string[] = [name]) =>
  ({ by: 'section', name, chosen, before }) as const;

describe('what was found as changes', () => {
  it('leaves out groups that have their section already, and those for which none fits', () => {
    const rafter = { by: 'role', name: 'rafter', chosen: 'IPE 360', before: ['IPE 300', 'IPE 360'] } as const;
    expect(changesOf([rafter, found('HE 200 A', 'HE 200 A'), found('HE 300 A', null)])).toEqual({
      changes: [{ kind: 'section', what: { role: 'rafter' }, to: 'IPE 360' }],
      refused: null,
    });
  });

  it('puts members of a section first that others are about to take', () => {
    const { changes } = changesOf([found('IPE 300', 'IPE 330'), found('IPE 330', 'IPE 360'), found('IPE 360', 'IPE 400')]);
    expect(changes.map(({ what, to }) => `${what.section} ${to}`)).toEqual([
      'IPE 360 IPE 400',
      'IPE 330 IPE 360',
      'IPE 300 IPE 330',
    ]);
  });

  it('refuses sections that change places', () => {
    const { changes, refused } = changesOf([found('IPE 300', 'IPE 330'), found('IPE 330', 'IPE 300')]);
    expect(changes).toEqual([]);
    expect(refused).toContain('IPE 300 to IPE 330');
  });
});
