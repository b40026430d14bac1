import { instant } from '@/db/clock';
import type { Db, RawDatabase } from '@/db/open';
import { insertRevisionWithin } from '@/db/queries/revisions';
import type { Change } from '@/lib/changes/change';
import type { ChangeWords } from '@/lib/changes/change-words';

export interface ChangeToMake extends ChangeWords {
  readonly change: Change;
}

/** A change as it was recorded with the revision that it made. */
export interface ChangeRecord extends ChangeToMake {
  readonly kind: string;
  readonly reason: string;
  readonly person: string;
  readonly at: string;
}

/**
 * Adds a batch's next revision, to be made from an earlier one by changes: the revision in state "reading", the changes with
 * their reason, an entry of activity and the job that will read its rows, all at once or nothing.
 *
 * @param run start the run as soon as it is read
 * @returns undefined where the revision that it is made from is not the office's, or has not been read
 */
export async function insertChangedRevision(
  db: Db,
  office: number,
  made: {
    readonly from: number;
    readonly person: number;
    readonly changes: readonly ChangeToMake[];
    readonly reason: string;
    readonly run: boolean;
  },
): Promise<{ id: number; letter: string } | undefined> {
  const { person, changes, reason } = made;
  return db.transaction().execute(async (within) => {
    const from = await within
      .selectFrom('revision')
      .innerJoin('batch', 'batch.id', 'revision.batch')
      .select(['revision.id', 'revision.batch', 'revision.letter', 'batch.project'])
      .where('revision.id', '=', made.from)
      .where('revision.office', '=', office)
      .where('revision.settings', 'is not', null)
      .executeTakeFirst();
    if (!from) return undefined;
    const revision = await insertRevisionWithin(within, office, { batch: from.batch, person, madeFrom: from.id });
    if (!revision) return undefined;
    const at = instant();
    const entry = { office, project: from.project, batch: from.batch, revision: revision.id, person, at };
    for (const [ordinal, { change, what, from: before, to }] of changes.entries()) {
      const record = JSON.stringify(change);
      const kept = { office, revision: revision.id, ordinal, kind: change.kind, what, record, reason, person, at };
      await within
        .insertInto('change')
        .values({ ...kept, from_text: before, to_text: to })
        .execute();
      const detail = JSON.stringify({ madeFrom: from.letter, what, from: before, to, reason });
      await within
        .insertInto('activity')
        .values({ ...entry, what: 'made a revision by a change', detail })
        .execute();
    }
    const payload = JSON.stringify({ run: made.run });
    await within
      .insertInto('job')
      .values({ kind: 'read', office, revision: revision.id, person, payload, state: 'queued', created_at: at })
      .execute();
    return revision;
  });
}

/** The changes by which a revision was made, in order; none where its files were brought in. */
export async function listChanges(db: Db, office: number, revision: number): Promise<ChangeRecord[]> {
  const rows = await db
    .selectFrom('change')
    .innerJoin('person', 'person.id', 'change.person')
    .selectAll('change')
    .select('person.name as name')
    .where('change.office', '=', office)
    .where('change.revision', '=', revision)
    .orderBy('change.ordinal')
    .execute();
  return rows.map((row) => ({
    change: JSON.parse(row.record) as Change,
    kind: row.kind,
    what: row.what,
    from: row.from_text,
    to: row.to_text,
    reason: row.reason,
    person: row.name,
    at: row.at,
  }));
}

export interface Making {
  readonly from: number;
  readonly letter: string;
  readonly batch: string;
  readonly person: number;
  readonly personName: string;
}

/** From what a revision is to be made; undefined where its files were brought in. For the thread that reads it. */
export function findMaking(raw: RawDatabase, office: number, revision: number): Making | undefined {
  return raw
    .prepare<[number, number], Making>(
      `select r.made_from as "from", r.letter, b.name as batch, p.id as person, p.name as personName
       from revision r join batch b on b.id = r.batch join person p on p.id = r.created_by
       where r.id = ? and r.office = ? and r.made_from is not null`,
    )
    .get(revision, office);
}

/** Of the frames of a revision made by a change, how many are the very same as in the revision that it was made from. */
export async function countCarriedOver(db: Db, office: number, revision: number): Promise<number> {
  const { count } = await db
    .selectFrom('revision_frame as own')
    .innerJoin('revision', 'revision.id', 'own.revision')
    .select((e) => e.fn.countAll<number>().as('count'))
    .where('own.revision', '=', revision)
    .where('revision.office', '=', office)
    .where('own.version', 'in', (e) =>
      e
        .selectFrom('revision_frame as before')
        .innerJoin('revision as made', 'made.made_from', 'before.revision')
        .select('before.version')
        .where('made.id', '=', revision)
        .where('before.version', 'is not', null),
    )
    .executeTakeFirstOrThrow();
  return count;
}
