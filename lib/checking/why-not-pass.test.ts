import { describe, expect, it } from 'vitest';
import { whyNotPass } from './why-not-pass';

const done = { listed: 12, seen: 12, openQueries: 0, toAccept: 3, accepted: 3 };

describe('a revision', () => {
  it('can be passed once every listed frame is seen, no query is open, and every over and not checked is accepted', () => {
    expect(whyNotPass(done)).toEqual([]);
  });

  it.each<[string, Partial<typeof done>, RegExp]>([
    ['a frame of the list not seen', { seen: 11 }, /^1 listed frame is not seen/],
    ['queries open', { openQueries: 2 }, /^2 queries are open/],
    ['an over that nobody accepted', { accepted: 1 }, /^2 checks are over or not checked and not accepted/],
  ])('cannot be passed with %s', (_, more, words) => {
    const against = whyNotPass({ ...done, ...more });
    expect(against).toHaveLength(1);
    expect(against[0]).toMatch(words);
  });

  it('names all that stands against it at once', () => {
    expect(whyNotPass({ listed: 9, seen: 0, openQueries: 1, toAccept: 1, accepted: 0 })).toHaveLength(3);
  });
});
