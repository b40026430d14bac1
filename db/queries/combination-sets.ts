import { sql } from 'kysely';
import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import type { OfficeRule, OfficeSet } from '@/lib/combinations/office-set';

/** A version of an office's set, who kept it and when. */
export interface SetVersion extends OfficeSet {
  readonly set: number;
  readonly version: number;
  readonly person: string;
  readonly at: string;
  /** Since when the set is not offered any more; null = it is. */
  readonly withdrawnAt: string | null;
}

/** A set as it stands. */
export interface SetRecord extends SetVersion {
  /** Revisions that were made by it, in any version. */
  readonly used: number;
}

/** A revision whose combinations a set made. */
export interface SetUse {
  readonly version: number;
  readonly project: string;
  readonly batch: number;
  readonly batchName: string;
  readonly letter: string;
  readonly person: string;
  readonly at: string;
}

type Row = Awaited<ReturnType<ReturnType<typeof versionsOf>['execute']>>[number];

const versionsOf = (db: Db, office: number) =>
  db
    .selectFrom('combination_set_version as v')
    .innerJoin('combination_set as s', 's.id', 'v.set_id')
    .innerJoin('person as p', 'p.id', 'v.person')
    .selectAll('v')
    .select(['s.name', 's.withdrawn_at', 'p.name as by'])
    .where('v.office', '=', office)
    .where('s.office', '=', office);

const versionOf = (row: Row): SetVersion => ({
  set: row.set_id,
  version: row.version,
  name: row.name,
  basedOn: row.based_on,
  level: row.level,
  together: row.together === 1,
  rules: JSON.parse(row.rules) as OfficeRule[],
  provenance: row.provenance,
  person: row.by,
  at: row.at,
  withdrawnAt: row.withdrawn_at,
});

/** The office's sets in their latest versions, by name; those out of use last. */
export async function listCombinationSets(db: Db, office: number): Promise<SetRecord[]> {
  const rows = await versionsOf(db, office)
    .where('v.version', '=', (e) =>
      e
        .selectFrom('combination_set_version as latest')
        .select((of) => of.fn.max('latest.version').as('last'))
        .whereRef('latest.set_id', '=', 'v.set_id'),
    )
    .select((e) =>
      e
        .selectFrom('change')
        .select((of) => of.fn.countAll<number>().as('n'))
        .where('change.office', '=', office)
        .where('change.kind', '=', 'office combinations')
        .where(sql`json_extract(change.record, '$.set')`, '=', e.ref('v.set_id'))
        .as('used'),
    )
    .orderBy((e) => e('s.withdrawn_at', 'is not', null))
    .orderBy('s.name')
    .execute();
  return rows.map((row) => ({ ...versionOf(row), used: row.used ?? 0 }));
}

/** Every version of a set, the latest first; empty where the office has no such set. */
export async function listSetVersions(db: Db, office: number, set: number): Promise<SetVersion[]> {
  const rows = await versionsOf(db, office).where('v.set_id', '=', set).orderBy('v.version', 'desc').execute();
  return rows.map(versionOf);
}

/** One version of a set; undefined where the office has none. */
export async function findSetVersion(db: Db, office: number, set: number, version: number): Promise<SetVersion | undefined> {
  const row = await versionsOf(db, office).where('v.set_id', '=', set).where('v.version', '=', version).executeTakeFirst();
  return row && versionOf(row);
}

/** The revisions that a set made, the latest first. */
export async function listSetUses(db: Db, office: number, set: number): Promise<SetUse[]> {
  const rows = await db
    .selectFrom('change as c')
    .innerJoin('revision as r', 'r.id', 'c.revision')
    .innerJoin('batch as b', 'b.id', 'r.batch')
    .innerJoin('project as o', 'o.id', 'b.project')
    .innerJoin('person as p', 'p.id', 'c.person')
    .select([
      'o.name as project',
      'b.id as batch',
      'b.name as batchName',
      'r.letter',
      'p.name as person',
      'c.at',
      sql<number>`json_extract(c.record, '$.version')`.as('version'),
    ])
    .where('c.office', '=', office)
    .where('r.office', '=', office)
    .where('c.kind', '=', 'office combinations')
    .where(sql`json_extract(c.record, '$.set')`, '=', set)
    .orderBy('c.id', 'desc')
    .execute();
  return rows;
}

type Given = Pick<OfficeSet, 'basedOn' | 'level' | 'together' | 'rules' | 'provenance'>;

const rowOf = ({ basedOn, level, together, rules, provenance }: Given) => ({
  based_on: basedOn,
  level,
  together: together ? 1 : 0,
  rules: JSON.stringify(rules),
  provenance,
});

/** Keeps a new set as its version 1; undefined where the office has one of this name. */
export async function insertCombinationSet(
  db: Db,
  office: number,
  given: Given & { readonly name: string; readonly person: number },
): Promise<number | undefined> {
  const { name, person } = given;
  return db.transaction().execute(async (within) => {
    const at = instant();
    const made = await within
      .insertInto('combination_set')
      .values({ office, name, person, at })
      .onConflict((on) => on.doNothing())
      .returning('id')
      .executeTakeFirst();
    if (!made) return undefined;
    const row = { office, set_id: made.id, version: 1, person, at, ...rowOf(given) };
    await within.insertInto('combination_set_version').values(row).execute();
    return made.id;
  });
}

/** Keeps the next version of a set, where `after` is its latest; false where it is not, or the office has no such set. */
export async function insertSetVersion(
  db: Db,
  office: number,
  given: Given & { readonly set: number; readonly after: number; readonly person: number },
): Promise<boolean> {
  const { set, after, person } = given;
  return db.transaction().execute(async (within) => {
    const [latest] = await listSetVersions(within, office, set);
    if (latest?.version !== after) return false;
    const row = { office, set_id: set, version: after + 1, person, at: instant(), ...rowOf(given) };
    await within.insertInto('combination_set_version').values(row).execute();
    return true;
  });
}

/** Offers a set again, or no longer; false where the office has none. */
export async function updateSetOffered(db: Db, office: number, set: number, offered: boolean): Promise<boolean> {
  const { numUpdatedRows } = await db
    .updateTable('combination_set')
    .set({ withdrawn_at: offered ? null : instant() })
    .where('office', '=', office)
    .where('id', '=', set)
    .executeTakeFirst();
  return numUpdatedRows > 0n;
}
