import { describe, expect, it } from 'vitest';
import { downloadName, issueFileName } from './issue-file';

describe('files of an issue', () => {
  it('are named by the issue’s number', () => {
    expect(issueFileName('2604-03', 'report', 'pdf')).toBe('2604-03 calculation report.pdf');
    expect(issueFileName('2604-03', 'workbook', 'xlsx')).toBe('2604-03 result workbook.xlsx');
  });

  it('say in their names what they are no longer', () => {
    expect(downloadName('2604-02 input.xlsx', 'issued')).toBe('2604-02 input.xlsx');
    expect(downloadName('2604-02 input.xlsx', 'superseded')).toBe('SUPERSEDED 2604-02 input.xlsx');
    expect(downloadName('2604-02 input.xlsx', 'withdrawn')).toBe('WITHDRAWN 2604-02 input.xlsx');
  });
});
