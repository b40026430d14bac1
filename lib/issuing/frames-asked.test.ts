import { describe, expect, it } from 'vitest';
import { framesAsked } from './frames-asked';

describe('frames chosen for the report', () => {
  it('are numbers and ranges, each once and in order', () => {
    expect(framesAsked('20, 1-3; 2 – 4', 50)).toEqual({ numbers: [1, 2, 3, 4, 20] });
  });

  it('are refused in words where they are none', () => {
    expect(framesAsked('', 50)).toHaveProperty('wrong');
    expect(framesAsked('1-60', 50)).toEqual({ wrong: '“1-60” names no frames: they are numbered from 1 to 50.' });
    expect(framesAsked('9-2', 50)).toHaveProperty('wrong');
    expect(framesAsked('0', 50)).toHaveProperty('wrong');
    expect(framesAsked('F12', 50)).toEqual({ wrong: '“F12” is no number and no range, like 1-12.' });
  });
});
