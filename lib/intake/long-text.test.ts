import { expect, it } from 'vitest';
import { readSheets, sound, withCells } from '@/lib/intake/sheets-of';

it('a cell of 32,000 characters, whatever they are, is read at once', () => {
  const n = 32_000;
  const long = [
    'a' + ' '.repeat(n) + 'b', '±' + ' '.repeat(n) + '\n', '(['.repeat(n / 2), '{' + '('.repeat(n) + '}', '{' + '} '.repeat(n / 2) + 'x', '9'.repeat(n),
    '1' + ' '.repeat(n) + 'x', '-'.repeat(n), '+/'.repeat(n / 2), '1,'.repeat(n / 2), ' '.repeat(n) + '{1}', '<' + ' '.repeat(n) + '\n',
  ]; // prettier-ignore
  const started = process.cpuUsage();
  for (const text of long) {
    const cells = ['Nodes!E1', 'Nodes!C3', 'Nodes!B4', 'Members!F2', 'Setup!A2', 'Setup!B3', 'Combinations!D1', 'Combinations!D2', 'Supports!C2', 'Member loads!G2', 'Load cases!A3']; // prettier-ignore
    for (const cell of cells) readSheets(withCells({ [cell]: text }, sound()));
  }
  const { user } = process.cpuUsage(started);
  expect(user / 1e6).toBeLessThan(8);
});
