import { describe, expect, it } from 'vitest';
import { progressLine } from './progress-bar';

describe('the progress bar', () => {
  it('says how many frames are done, how fast, and how long it will take', () => {
    expect(progressLine(412, 1000, 2)).toBe('[########............] 412 of 1,000 frames · 206/s · 3 s left');
  });
  it('promises nothing before the first frame and after the last', () => {
    expect(progressLine(0, 1000, 0)).toBe('[....................] 0 of 1,000 frames · 0/s');
    expect(progressLine(1000, 1000, 4)).toBe('[####################] 1,000 of 1,000 frames · 250/s');
  });
});
