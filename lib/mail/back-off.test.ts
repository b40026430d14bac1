import { describe, expect, it } from 'vitest';
import { mostAttempts, waitAfter } from './back-off';

describe('waiting between attempts', () => {
  it('doubles from 30 seconds to four hours, and ends', () => {
    const waits = Array.from({ length: mostAttempts }, (_, i) => waitAfter(i + 1));
    expect(waits.slice(0, 4)).toEqual([30_000, 60_000, 120_000, 240_000]);
    expect(waits.at(-2)).toBe(4 * 3_600_000);
    expect(waits.at(-1)).toBeNull();
  });

  it('ends within the day for which a key is remembered', () => {
    let all = 0;
    for (let n = 1; n < mostAttempts; n++) all += waitAfter(n)!;
    expect(all).toBeGreaterThan(12 * 3_600_000);
    expect(all).toBeLessThan(20 * 3_600_000);
  });
});
