import { describe, expect, it } from 'vitest';
import { Spool } from './spool';

describe('results kept in a temporary file', () => {
  it('come back by their number, in whatever order they were put', () => {
    const spool = new Spool();
    const bytes = (n: number): Buffer => Buffer.alloc(1000 * n, n);
    for (const n of [3, 1, 200]) spool.put(n, bytes(n));
    for (const n of [200, 1, 3]) expect(spool.get(n)?.equals(bytes(n))).toBe(true);
    expect(spool.get(2)).toBeNull();
    spool.close();
  });
});
