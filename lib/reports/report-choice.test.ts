import { describe, expect, it } from 'vitest';
import { readReportChoice } from './report-choice';

describe('a choice of frames for a report', () => {
  it('is all, the flagged ones, or places in sheet order, each once', () => {
    expect(readReportChoice('all', 9)).toEqual({ frames: 'all' });
    expect(readReportChoice('flagged', 9)).toEqual({ frames: 'flagged' });
    expect(readReportChoice('7, 2-4,3', 9)).toEqual({ frames: [2, 3, 4, 7] });
    expect(readReportChoice('20, 1-3; 2 – 4,', 50)).toEqual({ frames: [1, 2, 3, 4, 20] });
  });

  it.each([
    ['', 'Choose frames as all, flagged, or by their places in sheet order, like 3,7-12.'],
    [' , ', 'Choose frames as all, flagged, or by their places in sheet order, like 3,7-12.'],
    ['F12', 'Choose frames as all, flagged, or by their places in sheet order, like 3,7-12.'],
    ['some', 'Choose frames as all, flagged, or by their places in sheet order, like 3,7-12.'],
    ['0', 'Choose frames from 1 to 9; found 0.'],
    ['3-12', 'Choose frames from 1 to 9; found 3-12.'],
    ['5-2', 'Choose frames from 1 to 9; found 5-2.'],
  ])('is refused where it names none: %j', (text, wrong) => {
    expect(readReportChoice(text, 9)).toEqual({ wrong });
  });
});
