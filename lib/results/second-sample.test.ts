import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { secondSample } from '@/lib/results/second-sample';

const addresses = (n: number): string[] =>
  Array.from({ length: n }, (_, i) => createHash('sha256').update(String(i)).digest('hex'));

describe('the second, independent analysis', () => {
  it('is made of every frame up to a hundred', () => {
    expect(secondSample(addresses(100)).size).toBe(100);
  });

  it('is made of a hundred, or five in a hundred if that is more', () => {
    expect(secondSample(addresses(101)).size).toBe(100);
    expect(secondSample(addresses(1000)).size).toBe(100);
    expect(secondSample(addresses(20_000)).size).toBe(1000);
  });

  it('is of the same frames whatever their order', () => {
    const all = addresses(500);
    expect([...secondSample([...all].reverse())].sort()).toEqual([...secondSample(all)].sort());
  });
});
