import { expect, test } from 'vitest';
import { looksLikeDate } from '@/lib/intake/date-text';
import { lines, readSheets, sound } from '@/lib/intake/sheets-of';

test.each(['2-Jan', '02-Jan-26', '1. Mai', '2026-01-02', '2026-01-02T00:00:00', '02/01/2026', '1.2.26', 'Jan-26'])(
  '%s is a date',
  (text) => expect(looksLikeDate(text)).toBe(true),
);

test.each(['1-2', '1/2', '3.5', '1.250', '2 march units', '6000 mm', 'marker', 'B2-may', '1.2.3', '100/10/5'])(
  '%s is none',
  (text) => expect(looksLikeDate(text)).toBe(false),
);

test('a date in a text file where a number belongs is told as one; as an id it is a text like others', () => {
  const sheets = sound();
  sheets.Nodes[2] = ['F1', 'B', '2-Jan', 0, null];
  expect(lines(readSheets(sheets, { csv: true }))).toEqual(['error date-for-number Nodes!C3 F1']);
});
