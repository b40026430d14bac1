import { describe, expect, it } from 'vitest';
import { cantileverFrame } from '@/lib/results/cantilever-frame';
import { changesOfTry } from '@/lib/sizing/changes-of-try';
import type { SectionTaken } from '@/lib/sizing/section-taken';
import type { TryOf } from '@/lib/sizing/taken-by';

const frame = cantileverFrame('F1');
const tried = (by: TryOf['by'], name: string, to: string) => {
  const section = frame.sections[0]!;
  const taken: SectionTaken = { section: { ...section, name: to }, materials: {} };
  return { of: { by, name }, taken };
};

describe('a try as changes', () => {
  it('of a role is for every frame, or for the very members of this one', () => {
    expect(changesOfTry(frame, [tried('role', 'arm', 'IPE 300')])).toEqual({
      here: [{ kind: 'section', what: { members: [{ frame: 'F1', member: 'AB' }] }, to: 'IPE 300' }],
      everywhere: [{ kind: 'section', what: { role: 'arm' }, to: 'IPE 300' }],
    });
  });

  it('of one member is for this frame only, and so are two of one member, of which the later holds', () => {
    expect(changesOfTry(frame, [tried('member', 'AB', 'IPE 300')]).everywhere).toEqual([]);
    const both = changesOfTry(frame, [tried('role', 'arm', 'IPE 300'), tried('section', 'BAR', 'IPE 360')]);
    expect(both.everywhere).toEqual([]);
    expect(both.here.map(({ to }) => to)).toEqual(['IPE 360']);
  });

  it('is none where members have the section already', () => {
    expect(changesOfTry(frame, [tried('member', 'AB', 'BAR')]).here).toEqual([]);
  });
});
