/** Tables of issues, for Kysely. */
import type { Generated } from 'kysely';
import type { IssueFileKind } from '@/lib/issuing/issue-file';
import type { IssueState } from '@/lib/issuing/issue-states';

export interface IssuingTables {
  /** What an office chose, by name. */
  office_setting: { office: number; name: string; value: string; person: number; at: string };
  issue: {
    id: Generated<number>;
    office: number;
    project: number;
    batch: number;
    revision: number;
    /** As printed: its stem and running number. */
    number: string;
    stem: string;
    running: number;
    state: IssueState;
    note: string | null;
    /** What its covers say (lib/reports/issue-cover.ts) as JSON: settled when it was asked for, so that files made anew say the same. */
    cover: string;
    /** Which frames its report shows one by one, as JSON (lib/issuing/issue-file.ts). */
    report_frames: string;
    /** The issue of the batch before it. */
    supersedes: number | null;
    engine: string;
    /** Who approved it, which is one act with issuing. */
    issued_by: number;
    issued_at: string;
    /** When its files were complete and clients were told. */
    handed_at: string | null;
    failure: string | null;
    withdrawn_by: number | null;
    withdrawn_at: string | null;
    withdrawn_reason: string | null;
  };
  issue_client: { issue: number; person: number; name: string; sent_at: string };
  issue_file: {
    id: Generated<number>;
    issue: number;
    kind: IssueFileKind;
    name: string;
    size: number;
    sha256: string;
    pages: number | null;
    made_at: string;
  };
  /** A file's bytes, about a megabyte each. A file is whole once its row in issue_file stands. */
  issue_piece: { id: Generated<number>; issue: number; kind: IssueFileKind; ordinal: number; bytes: Buffer };
  download: { id: Generated<number>; office: number; issue: number; file: number; person: number; at: string };
  receipt: { issue: number; person: number; at: string };
  question: {
    id: Generated<number>;
    office: number;
    issue: number;
    person: number;
    /** Place in sheet order, from 0; null = on the issue as a whole. */
    frame: number | null;
    frame_id: string | null;
    text: string;
    at: string;
  };
  answer: { id: Generated<number>; office: number; question: number; person: number; text: string; at: string };
  /** Whether an engine gives what was issued: kept for each engine, the last time it was asked. */
  engine_test: {
    issue: number;
    engine: string;
    office: number;
    person: number;
    at: string;
    frames: number;
    altered: number;
    /** Frames whose verdict would be another. */
    verdicts: number;
    /** Largest difference of a ratio. */
    largest: number | null;
    /** The frames most altered, as JSON (lib/issuing/altered-frame.ts). */
    list: string;
  };
}
