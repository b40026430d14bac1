/** What the pages of an issue show: plain data. */
import type { IssueFileKind } from '@/lib/issuing/issue-file';
import type { IssueState } from '@/lib/issuing/issue-states';

export interface ShownFile {
  readonly kind: IssueFileKind;
  /** "PDF, 214 pages" */
  readonly about: string;
  readonly size: number;
  readonly sha256: string;
  readonly href: string;
}

export interface ShownPost {
  readonly by: string;
  readonly text: string;
  /** "26 Nov, 08:12" */
  readonly at: string;
  readonly office: boolean;
}

export interface ShownQuestion {
  readonly id: number;
  readonly about: string;
  readonly href: string | null;
  readonly open: boolean;
  readonly posts: readonly ShownPost[];
}

export interface ShownIssue {
  readonly number: string;
  readonly href: string;
  readonly date: string;
  readonly revision: string;
  readonly state: IssueState;
  readonly here: boolean;
}

/** What an issue's state means to who builds from it. */
export const standing: Readonly<Record<IssueState, string>> = {
  making: 'being made',
  failed: 'could not be made',
  issued: 'in force',
  superseded: 'superseded, don’t build from it',
  withdrawn: 'withdrawn, don’t build from it',
};

/** "6.1 MB", "820 kB" */
export function sizeText(bytes: number): string {
  return bytes >= 1e6 ? `${(bytes / 1e6).toFixed(1)} MB` : `${Math.max(1, Math.round(bytes / 1e3))} kB`;
}
