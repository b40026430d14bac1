import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import { countVerdicts, type VerdictCounts } from '@/db/queries/verdict-counts';
import type { RevisionState } from '@/db/schema';
import type { InputIdentity } from '@/lib/intake/intake';
import type { SettingOrigins, Settings } from '@/lib/model/settings';

export interface RevisionRecord {
  readonly id: number;
  readonly office: number;
  readonly project: number;
  readonly projectName: string;
  readonly projectNumber: string | null;
  readonly batch: number;
  readonly batchName: string;
  readonly letter: string;
  readonly state: RevisionState;
  readonly reason: string | null;
  readonly title: string | null;
  readonly units: 'metric' | 'us';
  /** Null until read. */
  readonly settings: Settings | null;
  readonly origins: SettingOrigins | null;
  readonly input: InputIdentity | null;
  readonly engine: string | null;
  readonly frames: number;
  readonly framesStopped: number;
  readonly errors: number;
  readonly warnings: number;
  readonly notes: number;
  /** Grows with every change of its results. */
  readonly stamp: number;
  readonly createdBy: { readonly id: number; readonly name: string };
  readonly createdAt: string;
  readonly changedAt: string;
  readonly runBy: { readonly id: number; readonly name: string } | null;
  readonly runStartedAt: string | null;
  readonly runFinishedAt: string | null;
  /** Letter of the revision it was made from by changes (queries/changes.ts); null = its files were brought in. */
  readonly madeFrom: string | null;
  /** Who sent it to check last. */
  readonly sent: Act | null;
  /** Who passed it, as long as it was not returned afterwards. */
  readonly checked: Act | null;
  /** The issue that clients got of it, and who issued it. */
  readonly issued: (Act & { readonly number: string }) | null;
}

interface Act {
  readonly id: number;
  readonly name: string;
  readonly at: string;
}

/**
 * Adds a batch's next revision (A … Z, AA …), in state "reading".
 *
 * @returns undefined where the batch is not the office's
 */
export async function insertRevision(
  db: Db,
  office: number,
  revision: { readonly batch: number; readonly person: number },
): Promise<{ id: number; letter: string } | undefined> {
  return db.transaction().execute((within) => insertRevisionWithin(within, office, { ...revision, madeFrom: null }));
}

/**
 * The same as a step of a transaction.
 *
 * @param revision `madeFrom`: the revision it is made from by changes; null = files are brought in
 */
export async function insertRevisionWithin(
  within: Db,
  office: number,
  revision: { readonly batch: number; readonly person: number; readonly madeFrom: number | null },
): Promise<{ id: number; letter: string } | undefined> {
  const batch = await within
    .selectFrom('batch')
    .leftJoin('revision', 'revision.batch', 'batch.id')
    .select((eb) => ['batch.id', eb.fn.max('revision.ordinal').as('last')])
    .where('batch.id', '=', revision.batch)
    .where('batch.office', '=', office)
    .groupBy('batch.id')
    .executeTakeFirst();
  if (!batch) return undefined;
  const ordinal = (batch.last ?? -1) + 1;
  const now = instant();
  return within
    .insertInto('revision')
    .values({
      office,
      batch: batch.id,
      ordinal,
      letter: letterOf(ordinal),
      state: 'reading',
      created_by: revision.person,
      created_at: now,
      changed_at: now,
      made_from: revision.madeFrom,
    })
    .returning(['id', 'letter'])
    .executeTakeFirstOrThrow();
}

/** Letters of revisions: 0 is A, 25 Z, 26 AA. */
export function letterOf(ordinal: number): string {
  const last = String.fromCharCode(65 + (ordinal % 26));
  return ordinal < 26 ? last : letterOf(Math.floor(ordinal / 26) - 1) + last;
}

export async function findRevision(db: Db, office: number, batch: number, letter: string): Promise<RevisionRecord | undefined> {
  const row = await revisions(db, office)
    .where('revision.batch', '=', batch)
    .where('revision.letter', '=', letter)
    .executeTakeFirst();
  return row && record(row);
}

/** For jobs, which know a revision by its id. */
export async function findRevisionById(db: Db, office: number, revision: number): Promise<RevisionRecord | undefined> {
  const row = await revisions(db, office).where('revision.id', '=', revision).executeTakeFirst();
  return row && record(row);
}

/** A batch's revisions, A first. */
export async function listRevisions(db: Db, office: number, batch: number): Promise<RevisionRecord[]> {
  const rows = await revisions(db, office).where('revision.batch', '=', batch).orderBy('revision.ordinal').execute();
  return rows.map(record);
}

/** Frames by verdict; all zero for a revision that is not the office's. */
export async function countRevisionVerdicts(db: Db, office: number, revision: number): Promise<VerdictCounts> {
  const own = await db.selectFrom('revision').select('id').where('id', '=', revision).where('office', '=', office).execute();
  const counts = await countVerdicts(db, own.map((one) => one.id)); // prettier-ignore
  return counts.get(revision) ?? { over: 0, notChecked: 0, near: 0, within: 0, waiting: 0, stopped: 0 };
}

/**
 * Moves a revision from one of the states `from` to another, unless someone else moved it first.
 * To "running" it notes who and when; from "running" to any other, when.
 *
 * @returns whether it was in one of `from`, and moved
 */
export async function updateRevisionState(
  db: Db,
  office: number,
  revision: number,
  from: readonly RevisionState[],
  to: RevisionState,
  more: { readonly reason?: string | null; readonly runBy?: number } = {},
): Promise<boolean> {
  const now = instant();
  const result = await db
    .updateTable('revision')
    .set({
      state: to,
      reason: more.reason ?? null,
      changed_at: now,
      ...(to === 'running' ? { run_started_at: now, run_finished_at: null } : {}),
      ...(more.runBy === undefined ? {} : { run_by: more.runBy }),
      ...(to === 'run' || to === 'stopped' ? { run_finished_at: now } : {}),
    })
    .where('id', '=', revision)
    .where('office', '=', office)
    .where('state', 'in', [...from])
    .executeTakeFirst();
  return result.numUpdatedRows === 1n;
}

function revisions(db: Db, office: number) {
  return db
    .selectFrom('revision')
    .innerJoin('batch', 'batch.id', 'revision.batch')
    .innerJoin('project', 'project.id', 'batch.project')
    .innerJoin('person as maker', 'maker.id', 'revision.created_by')
    .leftJoin('person as runner', 'runner.id', 'revision.run_by')
    .leftJoin('revision as earlier', 'earlier.id', 'revision.made_from')
    .leftJoin('person as sender', 'sender.id', 'revision.sent_by')
    .leftJoin('person as checker', 'checker.id', 'revision.checked_by')
    .leftJoin('issue', (join) =>
      join.onRef('issue.revision', '=', 'revision.id').on('issue.state', 'not in', ['making', 'failed']),
    )
    .leftJoin('person as issuer', 'issuer.id', 'issue.issued_by')
    .selectAll('revision')
    .select([
      'batch.name as batch_name',
      'project.id as project',
      'project.name as project_name',
      'project.number as project_number',
      'maker.name as maker_name',
      'runner.name as runner_name',
      'earlier.letter as earlier_letter',
      'sender.name as sender_name',
      'checker.name as checker_name',
      'issue.number as issue_number',
      'issue.issued_by',
      'issue.issued_at',
      'issuer.name as issuer_name',
    ])
    .where('revision.office', '=', office);
}

type Read = Awaited<ReturnType<ReturnType<typeof revisions>['executeTakeFirstOrThrow']>>;

function record(row: Read): RevisionRecord {
  const files = row.input_files;
  return {
    id: row.id,
    office: row.office,
    project: row.project,
    projectName: row.project_name,
    projectNumber: row.project_number,
    batch: row.batch,
    batchName: row.batch_name,
    letter: row.letter,
    state: row.state,
    reason: row.reason,
    title: row.title,
    units: row.units,
    settings: row.settings === null ? null : (JSON.parse(row.settings) as Settings),
    origins: row.origins === null ? null : (JSON.parse(row.origins) as SettingOrigins),
    input:
      files === null || row.input_name === null || row.input_sha256 === null
        ? null
        : { name: row.input_name, sha256: row.input_sha256, files: JSON.parse(files) as InputIdentity['files'] },
    engine: row.engine,
    frames: row.frames,
    framesStopped: row.frames_stopped,
    errors: row.errors,
    warnings: row.warnings,
    notes: row.notes,
    stamp: row.stamp,
    createdBy: { id: row.created_by, name: row.maker_name },
    createdAt: row.created_at,
    changedAt: row.changed_at,
    runBy: row.run_by === null ? null : { id: row.run_by, name: row.runner_name ?? '' },
    runStartedAt: row.run_started_at,
    runFinishedAt: row.run_finished_at,
    madeFrom: row.earlier_letter,
    sent: act(row.sent_by, row.sender_name, row.sent_at),
    checked: act(row.checked_by, row.checker_name, row.checked_at),
    issued: issued(row),
  };
}

function issued({ issued_by, issuer_name, issued_at, issue_number }: Read): RevisionRecord['issued'] {
  const by = act(issued_by, issuer_name, issued_at);
  return by && { ...by, number: issue_number ?? '' };
}

const act = (id: number | null, name: string | null, at: string | null): Act | null =>
  id === null || at === null ? null : { id, name: name ?? '', at };
