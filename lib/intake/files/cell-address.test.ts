import { expect, it } from 'vitest';
import { cellAddress, cellPosition, columnLetters } from '@/lib/intake/files/cell-address';

it('names cells as a spreadsheet does', () => {
  expect(cellAddress(1, 0)).toBe('A1');
  expect(cellAddress(12, 25)).toBe('Z12');
  expect(cellAddress(3, 26)).toBe('AA3');
  expect(cellAddress(1048576, 16383)).toBe('XFD1048576');
});

it('finds them again', () => {
  for (const column of [0, 25, 26, 51, 52, 701, 702, 16383]) {
    expect(cellPosition(cellAddress(7, column))).toEqual({ row: 7, column });
  }
  expect(cellPosition('$B$4')).toEqual({ row: 4, column: 1 });
  expect(cellPosition('4B')).toBeNull();
});

it('refuses a column before A', () => {
  expect(() => columnLetters(-1)).toThrow(RangeError);
});
