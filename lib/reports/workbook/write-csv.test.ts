import { describe, expect, it } from 'vitest';
import { text, type ReportRow } from './report-sheet';
import { csvLine, csvOf, neutralised } from './write-csv';

describe('CSV of a sheet', () => {
  it('neutralises text that a spreadsheet would run, and leaves numbers alone', () => {
    expect(['=A1', '+x', '-x', '@f', '\tx'].map(neutralised)).toEqual(["'=A1", "'+x", "'-x", "'@f", "'\tx"]);
    expect(['-5', '+1.5e3', 'plain', 'a=b'].map(neutralised)).toEqual(['-5', '+1.5e3', 'plain', 'a=b']);
  });

  it('quotes commas, quotes and line breaks', () => {
    expect(csvLine(['a,b', 'say "x"', 1.5, null])).toBe('"a,b","say ""x""",1.5,\r\n');
  });

  it('starts with a byte-order mark and the headings, and gives every row', async () => {
    const rows = Array.from({ length: 1203 }, (_, index): ReportRow => [`F${index}`]);
    let all = '';
    for await (const part of csvOf({ name: 'x', columns: [text('frame')], rows: () => rows })) all += part;
    const lines = all.split('\r\n');
    expect(lines[0]).toBe('\ufeffframe');
    expect(lines.length).toBe(1 + 1203 + 1);
    expect(lines[1203]).toBe('F1202');
  });
});
