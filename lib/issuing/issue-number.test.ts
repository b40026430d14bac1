import { describe, expect, it } from 'vitest';
import { issueNumber, numberStem } from './issue-number';

describe('number of an issue', () => {
  it('is the project’s number and a running one', () => {
    expect(issueNumber(numberStem({ id: 7, number: '2604' }), 3)).toBe('2604-03');
    expect(issueNumber(numberStem({ id: 7, number: 'P-1042' }), 12)).toBe('P-1042-12');
    expect(issueNumber('2604', 100)).toBe('2604-100');
  });

  it('can stand in a file’s name whatever the project’s number holds', () => {
    expect(numberStem({ id: 7, number: ' 26/04 : B ' })).toBe('26-04-B');
    expect(numberStem({ id: 7, number: '../Ø12' })).toBe('Ø12');
  });

  it('goes by the project itself where that has no number', () => {
    expect(numberStem({ id: 7, number: null })).toBe('P7');
    expect(numberStem({ id: 7, number: ' // ' })).toBe('P7');
  });

  it('counts from one', () => {
    expect(() => issueNumber('2604', 0)).toThrow(RangeError);
  });
});
