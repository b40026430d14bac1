import { instant } from '@/db/clock';
import type { Db } from '@/db/open';

/** What was done, in a few fixed words (`ran a revision`), with what it was done to. Entries are only ever added. */
export interface ActivityEntry {
  readonly what: string;
  readonly project?: number;
  readonly batch?: number;
  readonly revision?: number;
  /** Null: the service itself. */
  readonly person: number | null;
  readonly detail?: Readonly<Record<string, string | number | null>>;
}

export interface ActivityListed {
  readonly id: number;
  readonly what: string;
  readonly project: number | null;
  readonly batch: number | null;
  readonly batchName: string | null;
  readonly revision: number | null;
  readonly letter: string | null;
  readonly person: string | null;
  readonly detail: Readonly<Record<string, string | number | null>>;
  readonly at: string;
}

export async function insertActivity(db: Db, office: number, entry: ActivityEntry): Promise<void> {
  await db
    .insertInto('activity')
    .values({
      office,
      project: entry.project ?? null,
      batch: entry.batch ?? null,
      revision: entry.revision ?? null,
      person: entry.person,
      what: entry.what,
      detail: JSON.stringify(entry.detail ?? {}),
      at: instant(),
    })
    .execute();
}

/** Which entries: of one project, by a person, of a kind, within times, before an entry (for the next page). */
export interface ActivityAsked {
  readonly project?: number;
  readonly person?: number;
  readonly what?: string;
  /** Instants: from the first, up to but without the second. */
  readonly from?: string;
  readonly until?: string;
  readonly before?: number;
  readonly limit?: number;
}

/** The newest entries of an office, or of one of its projects. */
export async function listActivity(db: Db, office: number, asked: ActivityAsked = {}): Promise<ActivityListed[]> {
  const { project, person, what, from, until, before, limit = 100 } = asked;
  let query = db
    .selectFrom('activity')
    .leftJoin('person', 'person.id', 'activity.person')
    .leftJoin('revision', 'revision.id', 'activity.revision')
    .leftJoin('batch', 'batch.id', 'activity.batch')
    .select([
      'activity.id',
      'activity.what',
      'activity.project',
      'activity.batch',
      'batch.name as batchName',
      'activity.revision',
      'revision.letter',
      'person.name as person',
      'activity.detail',
      'activity.at',
    ])
    .where('activity.office', '=', office);
  if (project !== undefined) query = query.where('activity.project', '=', project);
  if (person !== undefined) query = query.where('activity.person', '=', person);
  if (what !== undefined) query = query.where('activity.what', '=', what);
  if (from !== undefined) query = query.where('activity.at', '>=', from);
  if (until !== undefined) query = query.where('activity.at', '<', until);
  if (before !== undefined) query = query.where('activity.id', '<', before);
  const rows = await query.orderBy('activity.id', 'desc').limit(limit).execute();
  return rows.map((row) => ({ ...row, detail: JSON.parse(row.detail) as ActivityListed['detail'] }));
}

/** Who did anything in a project, or in the whole office, and what: what its activity can be filtered by. */
export async function listActivityChoices(
  db: Db,
  office: number,
  project?: number,
): Promise<{ readonly people: readonly { readonly id: number; readonly name: string }[]; readonly whats: readonly string[] }> {
  const all = db.selectFrom('activity').where('activity.office', '=', office);
  const of = project === undefined ? all : all.where('activity.project', '=', project);
  const people = await of
    .innerJoin('person', 'person.id', 'activity.person')
    .select(['person.id', 'person.name'])
    .distinct()
    .orderBy('person.name')
    .execute();
  const whats = await of.select('activity.what').distinct().orderBy('activity.what').execute();
  return { people, whats: whats.map((one) => one.what) };
}
