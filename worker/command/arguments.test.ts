import { describe, expect, it } from 'vitest';
import { readArguments } from './arguments';

describe('the words after `npm run batch --`', () => {
  it('name files and outputs in any order', () => {
    expect(readArguments(['a.csv', '--json', 'out.json', 'b.csv', '--all', '--csv=sheets'])).toEqual({
      files: ['a.csv', 'b.csv'],
      json: 'out.json',
      xlsx: null,
      csv: 'sheets',
      report: null,
      all: true,
    });
  });

  it('name a report to write', () => {
    expect(readArguments(['a.xlsx', '--report', 'out.pdf'])).toMatchObject({ files: ['a.xlsx'], report: 'out.pdf' });
  });

  it('take everything after a bare -- as files', () => {
    expect(readArguments(['--', '--odd name.csv'])).toMatchObject({ files: ['--odd name.csv'] });
  });

  it.each([
    [[], 'No file is named.'],
    [['--all'], 'No file is named.'],
    [['a.xlsx', '--pdf', 'x'], '--pdf is not an option.'],
    [['a.xlsx', '-j'], '-j is not an option.'],
    [['a.xlsx', '--json'], '--json needs a file to write to.'],
    [['a.xlsx', '--csv', '--all'], '--csv needs a folder to write to.'],
    [['a.xlsx', '--json=', 'b'], '--json needs a file to write to.'],
    [['a.xlsx', '--json', 'x', '--json', 'y'], '--json is given twice.'],
  ])('are refused where they make no sense: %j', (words, wrong) => {
    expect(readArguments(words)).toEqual({ wrong });
  });
});
