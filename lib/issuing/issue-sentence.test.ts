import { describe, expect, it } from 'vitest';
import { issueSentence } from './issue-sentence';

const none = { over: 0, notChecked: 0, near: 0, within: 0, notIssued: 0 };

describe('the sentence of an issue', () => {
  it('says that all are within their limits, and how many are near', () => {
    expect(issueSentence({ ...none, within: 73, near: 6 })).toBe('79 frames, all within their limits; 6 of them near.');
    expect(issueSentence({ ...none, within: 1240 })).toBe('1,240 frames, all within their limits.');
    expect(issueSentence({ ...none, within: 1 })).toBe('1 frame, within its limits.');
    expect(issueSentence({ ...none, near: 3 })).toBe('3 frames, all within their limits; all near.');
  });

  it('never calls an over or a not checked within', () => {
    expect(issueSentence({ ...none, over: 2, within: 10 })).toBe('12 frames: 2 over, 10 within.');
    expect(issueSentence({ ...none, notChecked: 1 })).toBe('1 frame: 1 not checked.');
    expect(issueSentence({ over: 1, notChecked: 2, near: 3, within: 4, notIssued: 0 })).toBe(
      '10 frames: 1 over and 2 not checked, 7 within (3 near).',
    );
  });

  it('says what of the sheets is not issued', () => {
    expect(issueSentence({ ...none, within: 8, notIssued: 1 })).toBe(
      '8 frames, all within their limits. 1 frame of the sheets is not issued.',
    );
    expect(issueSentence({ ...none, within: 8, notIssued: 2 })).toMatch(/2 frames of the sheets are not issued\.$/);
  });
});
