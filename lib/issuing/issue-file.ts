/** The files of an issue: which, and how they are named. */
import type { IssueState } from '@/lib/issuing/issue-states';

export const issueFileKinds = ['report', 'workbook', 'input'] as const;
export type IssueFileKind = (typeof issueFileKinds)[number];

/** What a client calls them. */
export const fileWords: Readonly<Record<IssueFileKind, string>> = {
  report: 'Calculation report',
  workbook: 'Result workbook',
  input: 'Your sheets, as read',
};

/** "2604-03 result workbook.xlsx" */
export function issueFileName(number: string, kind: IssueFileKind, ending: string): string {
  const words = { report: 'calculation report', workbook: 'result workbook', input: 'input' };
  return `${number} ${words[kind]}.${ending}`;
}

/**
 * The name under which a file is taken away. Its bytes are those that were issued and say nothing of what came after; so
 * the name does: "SUPERSEDED 2604-02 result workbook.xlsx".
 */
export function downloadName(name: string, state: IssueState): string {
  return state === 'superseded' || state === 'withdrawn' ? `${state.toUpperCase()} ${name}` : name;
}

/** Which frames the calculation report shows one by one. */
export type ReportFrames = 'all' | 'flagged' | readonly number[];
