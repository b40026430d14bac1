import { expect, it, test } from 'vitest';
import { idKey, idShown, numberAsId } from '@/lib/intake/ids';
import { readYesNo, sheetKey, wordKey } from '@/lib/intake/words';

test.each([
  ['1', '1.0', true],
  ['1', ' 1 ', true],
  ['1', '01', false],
  ['A1', 'a1', true],
  ['A 1', 'A1', false],
  ['A_1', 'A1', false],
  ['0.5', '.5', false],
  ['100', '1e2', true],
  ['1e400', 'Infinity', false],
  ['1e400', '1e401', false],
  ['12345678901234567890', '12345678901234567891', false],
])('ids %s and %s are the same: %s', (a, b, same) => {
  expect(idKey(a) === idKey(b)).toBe(same);
});
it('an id is shown as typed, without outer blanks', () => {
  expect([idShown(' 1.0 '), idShown('\u00a0Ab c'), numberAsId(-0), numberAsId(1.5)]).toEqual(['1.0', 'Ab c', '0', '1.5']);
});
it('words match without case, blanks, underlines and dashes; ids do not', () => {
  expect(wordKey('Self_Weight')).toBe(wordKey('self – weight'));
  expect(sheetKey('Node_Loads')).toBe(sheetKey('node load'));
  expect(sheetKey('Families')).toBe(sheetKey('family'));
});
it('yes and no are what people write', () => {
  expect(['yes', 'Y', 'TRUE', '1', 'x'].map(readYesNo)).toEqual([true, true, true, true, true]);
  expect(['no', 'N', 'false', '0', ''].map(readYesNo)).toEqual([false, false, false, false, false]);
  expect(readYesNo('perhaps')).toBeNull();
});
