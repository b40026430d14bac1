import { describe, expect, it } from 'vitest';
import { AttemptLimit } from './attempt-limit';

const rule = { failures: 3, window_ms: 1000 };

describe('sign-in attempts', () => {
  it('makes a key wait after the allowed failures, until the window has passed', () => {
    const limit = new AttemptLimit(rule);
    for (let i = 0; i < 3; i++) {
      expect(limit.wait('a', i)).toBe(0);
      limit.attempt('a', i);
    }
    expect(limit.wait('a', 10)).toBe(990);
    expect(limit.wait('b', 10)).toBe(0);
    expect(limit.wait('a', 1000)).toBe(0);
  });

  it('forgets failures once the person has signed in', () => {
    const limit = new AttemptLimit(rule);
    for (let i = 0; i < 3; i++) limit.attempt('a', 0);
    limit.succeed('a');
    expect(limit.wait('a', 1)).toBe(0);
  });

  it('keeps a bounded number of keys', () => {
    const limit = new AttemptLimit({ failures: 1, window_ms: 1000 }, 2);
    for (const key of ['a', 'b', 'c']) limit.attempt(key, 0);
    expect(['a', 'b', 'c'].map((key) => limit.wait(key, 1) > 0)).toEqual([false, true, true]);
  });
});
