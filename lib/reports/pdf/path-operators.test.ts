import { describe, expect, it } from 'vitest';
import { pathOperators } from './path-operators';

describe('a path of a drawing as PDF operators', () => {
  it('keeps lines, level and upright strokes, and closes where it is closed', () => {
    expect(pathOperators('M1 2L3.5 -4H7V0z')).toBe('1 2 m 3.5 -4 l 7 -4 l 7 0 l h');
    expect(pathOperators('M0 0 10 0 10 10')).toBe('0 0 m 10 0 l 10 10 l');
    expect(pathOperators('')).toBe('');
  });

  it('draws an arc through the point that stands a quarter round', () => {
    // from (1, 0) by half a circle about the origin to (−1, 0), through (0, 1): y downwards, so clockwise as seen
    const numbers = pathOperators('M1 0A1 1 0 0 1 -1 0')
      .match(/-?[\d.]+/g)!
      .map(Number);
    expect(numbers.slice(0, 2)).toEqual([1, 0]);
    expect(numbers.slice(6, 8)).toEqual([0, 1]);
    expect(numbers.slice(-2)).toEqual([-1, 0]);
  });

  it('makes a circle of two relative arcs, as wheels are drawn', () => {
    const numbers = pathOperators('M-2 0a2 2 0 1 0 4 0a2 2 0 1 0 -4 0')
      .match(/-?[\d.]+/g)!
      .map(Number);
    expect(numbers.slice(-2)).toEqual([-2, 0]);
    expect(Math.max(...numbers)).toBe(2);
    expect(Math.min(...numbers)).toBe(-2);
  });

  it('names a letter that it does not know', () => {
    expect(() => pathOperators('M0 0C1 1 2 2 3 3')).toThrow('got C');
  });
});
