/** What the tables hold, for Kysely. Instants are ISO 8601 text in UTC, flags 0 or 1, records JSON text. See db/README.md. */
import type { Generated } from 'kysely';
import type { CombinationSetTables } from '@/db/tables/combination-sets';
import type { CheckingTables } from '@/db/tables/checking';
import type { IssuingTables } from '@/db/tables/issuing';
import type { OwnPartTables } from '@/db/tables/own-parts';
import type { MailTables } from '@/db/tables/mail';
import type { SizingTables } from '@/db/tables/sizing';
import type { TokenTables } from '@/db/tables/tokens';
import type { Purpose } from '@/lib/model/frame';

/** A person's role in an office. */
export type OfficeRole = 'lead' | 'analyst' | 'checker' | 'client';

export type RevisionState =
  | 'reading' | 'read' | 'running' | 'run' | 'to check' | 'checked' | 'issued'
  | 'returned' | 'stopped' | 'failed' | 'superseded' | 'withdrawn'; // prettier-ignore

export type JobState = 'queued' | 'running' | 'done' | 'stopped' | 'failed';
export type VersionState = 'waiting' | 'solved' | 'not solved';
/** A frame in a revision: stopped by errors of its sheets, waiting to be run, or run. */
export type FrameStatus = VersionState | 'stopped';

/** 0 within, 1 near, 2 not checked, 3 over: larger is worse; −1 = none yet (frames only). */
export type VerdictRank = number;

export interface DB
  extends CheckingTables, CombinationSetTables, IssuingTables, MailTables, OwnPartTables, SizingTables, TokenTables {
  office: { id: Generated<number>; name: string; created_at: string };
  person: { id: Generated<number>; email: string; name: string; password_hash: string; created_at: string };
  membership: { office: number; person: number; role: OfficeRole; created_at: string; ended_at: string | null };
  session: {
    id: string;
    person: number;
    office: number;
    created_at: string;
    expires_at: string;
    ended_at: string | null;
  };
  sign_in_attempt: { id: Generated<number>; email: string; address: string; at: string; succeeded: number };
  project: {
    id: Generated<number>;
    office: number;
    name: string;
    number: string | null;
    created_by: number;
    created_at: string;
  };
  project_person: { project: number; person: number; created_at: string };
  batch: {
    id: Generated<number>;
    office: number;
    project: number;
    name: string;
    created_by: number;
    created_at: string;
    /** Who looks after it since it was handed over; null = who made it. */
    keeper: number | null;
  };
  revision: RevisionTable;
  upload: {
    id: Generated<number>;
    office: number;
    revision: number;
    ordinal: number;
    name: string;
    size: number;
    sha256: string;
    bytes: Buffer;
    created_by: number;
    created_at: string;
  };
  input_row: {
    revision: number;
    ordinal: number;
    sheet: string;
    row: number;
    cells: string;
    /** Ordinal of its sheet in sheet_read; null in rows kept before they could be read again. */
    part: number | null;
    /** What cells are where their text does not say so (lib/intake/rows/cell-marks.ts). */
    marks: string | null;
    /** Name of who changed the row on screen. */
    changed_by: string | null;
  };
  sheet_read: {
    revision: number;
    ordinal: number;
    name: string;
    file: string;
    known: string | null;
    heading_row: number | null;
    rows: number;
    headings: string;
    decimal_mark: '.' | ',' | null;
  };
  combination_read: {
    revision: number;
    ordinal: number;
    name: string;
    purpose: Purpose;
    /** Cases by name with their factors, as JSON. */
    terms: string;
    /** Of a generated one; null = listed. */
    clause: string | null;
    frames: number;
  };
  /** An office's own limits on movement, used where a batch's sheets give none. */
  office_limit: {
    office: number;
    ordinal: number;
    /** A role, a place of nodes, or `*`. */
    applies_to: string;
    measure: 'deflection' | 'sway' | 'displacement' | 'spread';
    direction: 'x' | 'y' | 'resultant' | null;
    to_place: string | null;
    /** n of L/n or h/n. */
    ratio: number | null;
    absolute_m: number | null;
    /** A service combination's name, `*` in it for anything; null = every one. */
    combination: string | null;
    /** Where the figure is from, in words. */
    source: string;
    person: number;
    at: string;
  };
  problem: ProblemTable;
  change: {
    id: Generated<number>;
    office: number;
    /** The revision that was made by it. */
    revision: number;
    ordinal: number;
    kind: string;
    what: string;
    from_text: string;
    to_text: string;
    /** The change itself (lib/changes/change.ts) as JSON. */
    record: string;
    reason: string;
    person: number;
    at: string;
  };
  frame_version: FrameVersionTable;
  frame_parameter: { version: number; name: string; number: number | null; text: string | null; quantity: string };
  result_state: {
    version: number;
    ordinal: number;
    name: string;
    kind: 'case' | 'combination';
    purpose: Purpose | null;
    order_of: 1 | 2;
    critical_load_factor: number | null;
    packed: Buffer;
  };
  revision_frame: RevisionFrameTable;
  member_row: MemberRowTable;
  check_row: CheckRowTable;
  reaction_row: {
    revision: number;
    frame: number;
    result: number;
    support: number;
    node: string;
    result_name: string;
    kind: number;
    fx: number;
    fy: number;
    mz: number;
  };
  frame_result: { revision: number; result_name: string; frame: number; result: number };
  frame_peak: { revision: number; frame: number } & Record<`${'fx' | 'fy' | 'mz' | 'ux' | 'uy' | 'rz'}_${'max' | 'min'}`, number>;
  movement_row: {
    revision: number;
    frame: number;
    result: number;
    node_index: number;
    node: string;
    place: string;
    result_name: string;
    kind: number;
    ux: number;
    uy: number;
    rz: number;
  };
  tally: { revision: number; list: string; a: string; b: string; c: string; d: string; e: string; rows: number };
  job: JobTable;
  activity: {
    id: Generated<number>;
    office: number;
    project: number | null;
    batch: number | null;
    revision: number | null;
    person: number | null;
    what: string;
    detail: string;
    at: string;
  };
}

export interface RevisionTable {
  id: Generated<number>;
  office: number;
  batch: number;
  letter: string;
  ordinal: number;
  state: RevisionState;
  /** Why it failed, was returned or withdrawn. */
  reason: string | null;
  title: string | null;
  units: Generated<'metric' | 'us'>;
  settings: string | null;
  origins: string | null;
  input_name: string | null;
  input_sha256: string | null;
  input_files: string | null;
  engine: string | null;
  frames: Generated<number>;
  frames_stopped: Generated<number>;
  errors: Generated<number>;
  warnings: Generated<number>;
  notes: Generated<number>;
  /** Grows with every change of its results: what was counted at one stamp holds until the next. */
  stamp: Generated<number>;
  created_by: number;
  created_at: string;
  changed_at: string;
  run_by: number | null;
  run_started_at: string | null;
  run_finished_at: string | null;
  /** The revision it was made from by changes; null = its files were brought in. */
  made_from: number | null;
  /** Who sent it to check last. */
  sent_by: number | null;
  sent_at: string | null;
  /** Who passed it; null again where it is returned. */
  checked_by: number | null;
  checked_at: string | null;
}

export interface ProblemTable {
  revision: number;
  ordinal: number;
  /** 0 error, 1 warning, 2 note. */
  severity: number;
  code: string;
  sheet: string;
  file: string | null;
  row: number | null;
  heading: string | null;
  cell: string | null;
  frames: string;
  found: string | null;
  message: string;
  stops_all: number;
}

export interface FrameVersionTable {
  id: Generated<number>;
  batch: number;
  hash: string;
  engine: string;
  state: VersionState;
  model: Buffer;
  evaluation: Buffer | null;
  verdict: VerdictRank | null;
  ratio: number | null;
  check_name: string | null;
  subject: string | null;
  section: string | null;
  combination: string | null;
  critical_load_factor: number | null;
  mass: number | null;
  reason: string | null;
  residual: number | null;
  equilibrium: number | null;
  condition: number | null;
  digits: number | null;
  second: number | null;
  second_reason: string | null;
  solved_at: string | null;
}

/** Text '' and the numbers of db/absent.ts stand for "none" in columns that are sorted or filtered. */
export interface RevisionFrameTable {
  revision: number;
  frame: number;
  frame_id: string;
  title: string | null;
  group_name: string;
  family: string;
  count: number;
  note: string | null;
  version: number | null;
  status: FrameStatus;
  verdict: VerdictRank;
  ratio: number;
  check_name: string;
  subject: string | null;
  section: string;
  combination: string;
  critical_load_factor: number;
  mass: number;
  reason: string | null;
  uploaded_by: number | null;
  changed_by: number | null;
  run_by: number | null;
}

export interface MemberRowTable {
  revision: number;
  frame: number;
  member: number;
  member_id: string;
  role: string;
  section: string;
  group_name: string;
  length: number;
  combination: string | null;
  n: number | null;
  v: number | null;
  m: number | null;
  at: number | null;
  deflection: number | null;
  check_name: string;
  ratio: number;
  verdict: VerdictRank;
}

export interface CheckRowTable {
  revision: number;
  frame: number;
  ordinal: number;
  subject: string | null;
  role: string;
  section: string;
  check_name: string;
  combination: string;
  at: number | null;
  face: string | null;
  value: number | null;
  limit_value: number | null;
  quantity: string;
  ratio: number;
  verdict: VerdictRank;
  reason: string | null;
  reference: string;
}

export interface JobTable {
  id: Generated<number>;
  kind: string;
  office: number;
  revision: number | null;
  person: number | null;
  payload: string;
  state: JobState;
  total: Generated<number>;
  done: Generated<number>;
  lease_by: string | null;
  lease_until: string | null;
  error: string | null;
  created_at: string;
  started_at: string | null;
  finished_at: string | null;
}
