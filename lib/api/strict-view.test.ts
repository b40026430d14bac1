import { describe, expect, it } from 'vitest';
import type { TableName } from '@/lib/tables/view';
import { ApiError } from './error';
import { strictView } from './strict-view';
import { viewFromParams } from './view-address';

function refusal(table: TableName, text: string): string | undefined {
  try {
    strictView(table, new URLSearchParams(text));
  } catch (thrown) {
    if (thrown instanceof ApiError) return thrown.message;
    throw thrown;
  }
  return undefined;
}

describe('what a script asks a table for', () => {
  it.each(
    [
      ['ratio=0.9', 'ratio=0.9..', 'ratio=..1', 'verdict=over&verdict=near', 'verdict=not+checked', 'p:span=abc', 'frame=~T0'],
      ['section==1..2', 'criticalLoadFactor=..10&sort=-ratio'],
    ].flat(),
  )('is given where it makes sense: %s', (text) => {
    expect(refusal('frames', text)).toBeUndefined();
  });

  it.each(['ratio=>1', 'ratio=abc', 'ratio=', 'ratio=1-', 'ratio=~1', 'criticalLoadFactor=many'])(
    'is refused, and not answered with no rows, where a number is none: %s',
    (text) => {
      expect(refusal('frames', text)).toContain('a number or by a range, like 0.8..1.2');
      expect(viewFromParams('frames', new URLSearchParams(text)).filters, 'a page leaves it out').toEqual([]);
    },
  );

  it.each(['verdict=Over', 'verdict=purple', 'verdict=over,near', 'verdict=over&verdict=purple', 'verdict=1..2'])(
    'is refused where there is no such verdict: %s',
    (text) => {
      expect(refusal('frames', text)).toContain('verdict is one of over, not checked, near, within');
    },
  );

  it('is refused where it is no column, filter or sort, and where text is asked for a range', () => {
    expect(refusal('frames', 'colour=red')).toContain('colour is no filter of frames');
    expect(refusal('frames', 'sort=colour')).toContain('can be sorted by');
    expect(refusal('reactions', 'kind=cases')).toContain('kind is one of case, combination');
    expect(refusal('problems', 'severity=bad')).toContain('severity is one of error, warning, note');
    expect(refusal('frames', 'frame=1..2')).toContain('frame is text, which has no range');
  });
});
