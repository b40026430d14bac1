/** An office's own sections and materials: versions, who uses which, and what a revision's frames are made of. */
import { instant } from '@/db/clock';
import type { Db, RawDatabase } from '@/db/open';
import { inShortTransactions } from '@/db/short-transactions';
import { idKey } from '@/lib/intake/ids';
import type { OwnKind, OwnRecord, OwnThing, PartOrigin } from '@/lib/intake/own/own-thing';
import type { Material, Section } from '@/lib/model/frame';

export interface OwnVersion {
  readonly version: number;
  readonly units: OwnRecord['units'];
  readonly cells: OwnRecord['cells'];
  readonly note: string;
  readonly person: string;
  readonly at: string;
}

/** A section or material as it stands, by its latest version. */
export interface OwnPart extends OwnVersion {
  readonly id: number;
  readonly kind: OwnKind;
  readonly name: string;
  readonly retiredAt: string | null;
  /** Null of a material. */
  readonly section: Section | null;
  /** For a thickness that is not known; null of a section. */
  readonly material: Material | null;
}

const latest = (db: Db, office: number) =>
  db
    .selectFrom('own_part as p')
    .innerJoin('own_part_version as v', 'v.part', 'p.id')
    .innerJoin('person', 'person.id', 'v.person')
    .select(['p.id', 'p.kind', 'p.name', 'p.retired_at', 'v.version', 'v.units', 'v.cells', 'v.resolved', 'v.note', 'v.at'])
    .select('person.name as person')
    .where('p.office', '=', office)
    .where('v.version', '=', (e) =>
      e
        .selectFrom('own_part_version as w')
        .whereRef('w.part', '=', 'p.id')
        .select((m) => m.fn.max('w.version').as('version')),
    );

type LatestRow = Awaited<ReturnType<ReturnType<typeof latest>['execute']>>[number];

function partOf({ cells, resolved, retired_at, ...row }: LatestRow): OwnPart {
  const value = JSON.parse(resolved) as unknown;
  return {
    ...row,
    cells: JSON.parse(cells) as OwnRecord['cells'],
    retiredAt: retired_at,
    section: row.kind === 'section' ? (value as Section) : null,
    material: row.kind === 'material' ? (value as Material) : null,
  };
}

/** Every section or material of the office by name, with those no longer offered at the end. */
export async function listOwnParts(db: Db, office: number, kind: OwnKind): Promise<OwnPart[]> {
  const rows = await latest(db, office).where('p.kind', '=', kind).orderBy('p.name_key').execute();
  const parts = rows.map(partOf);
  return [...parts.filter(({ retiredAt }) => retiredAt === null), ...parts.filter(({ retiredAt }) => retiredAt !== null)];
}

/** What a batch may take from its office: the latest version of each, retired ones too so that they can be told apart. */
export async function listOwnThings(db: Db, office: number): Promise<OwnThing[]> {
  const rows = await latest(db, office).orderBy('p.id').execute();
  return rows.map(({ kind, name, version, units, cells, note, retired_at }) => ({
    kind,
    name,
    version,
    units,
    cells: JSON.parse(cells) as OwnRecord['cells'],
    note,
    retired: retired_at !== null,
  }));
}

export async function findOwnPart(db: Db, office: number, kind: OwnKind, id: number): Promise<OwnPart | undefined> {
  const row = await latest(db, office).where('p.kind', '=', kind).where('p.id', '=', id).executeTakeFirst();
  return row && partOf(row);
}

/** Every version, the latest first. */
export async function listOwnVersions(db: Db, office: number, id: number): Promise<OwnVersion[]> {
  const rows = await db
    .selectFrom('own_part_version as v')
    .innerJoin('own_part as p', 'p.id', 'v.part')
    .innerJoin('person', 'person.id', 'v.person')
    .select(['v.version', 'v.units', 'v.cells', 'v.note', 'v.at', 'person.name as person'])
    .where('p.office', '=', office)
    .where('p.id', '=', id)
    .orderBy('v.version', 'desc')
    .execute();
  return rows.map((row) => ({ ...row, cells: JSON.parse(row.cells) as OwnRecord['cells'] }));
}

export interface OwnPartToKeep {
  readonly kind: OwnKind;
  readonly record: OwnRecord;
  readonly note: string;
  readonly resolved: Section | Material;
}

/**
 * Keeps each as a version: the first of a new one, the next of one that is known by its name, which is offered again if it was
 * retired. What says the same as the latest version makes none. All at once or nothing.
 *
 * @returns by part in order its id and version, and whether that version is new
 */
export async function insertOwnVersions(
  db: Db,
  office: number,
  person: number,
  parts: readonly OwnPartToKeep[],
): Promise<{ id: number; name: string; version: number; isNew: boolean }[]> {
  const at = instant();
  return db.transaction().execute(async (within) => {
    const kept: { id: number; name: string; version: number; isNew: boolean }[] = [];
    for (const { kind, record, note, resolved } of parts) {
      const found = await within
        .selectFrom('own_part')
        .select(['id', 'name', 'retired_at'])
        .where('office', '=', office)
        .where('kind', '=', kind)
        .where('name_key', '=', idKey(record.name))
        .executeTakeFirst();
      const { id, name } =
        found ??
        (await within
          .insertInto('own_part')
          .values({ office, kind, name: record.name, name_key: idKey(record.name), retired_at: null, retired_by: null })
          .returning(['id', 'name'])
          .executeTakeFirstOrThrow());
      const before = await within
        .selectFrom('own_part_version')
        .select(['version', 'units', 'cells', 'note'])
        .where('part', '=', id)
        .orderBy('version', 'desc')
        .limit(1)
        .executeTakeFirst();
      const cells = JSON.stringify(record.cells);
      const same = before?.cells === cells && before.units === record.units && before.note === note;
      if (found && found.retired_at !== null)
        await within.updateTable('own_part').set({ retired_at: null, retired_by: null }).where('id', '=', id).execute();
      if (same) {
        kept.push({ id, name, version: before.version, isNew: false });
        continue;
      }
      const version = (before?.version ?? 0) + 1;
      await within
        .insertInto('own_part_version')
        .values({ part: id, version, units: record.units, cells, resolved: JSON.stringify(resolved), note, person, at })
        .execute();
      kept.push({ id, name, version, isNew: true });
    }
    return kept;
  });
}

/** Takes it from what is offered; what was read with it stays. False where it is not the office's, or retired already. */
export async function retireOwnPart(db: Db, office: number, kind: OwnKind, id: number, person: number): Promise<boolean> {
  const { numUpdatedRows } = await db
    .updateTable('own_part')
    .set({ retired_at: instant(), retired_by: person })
    .where('office', '=', office)
    .where('kind', '=', kind)
    .where('id', '=', id)
    .where('retired_at', 'is', null)
    .executeTakeFirst();
  return numUpdatedRows > 0n;
}

export interface OwnUse {
  readonly version: number;
  readonly project: string;
  readonly batch: number;
  readonly batchName: string;
  readonly letter: string;
  readonly state: string;
  /** The name it bears there. */
  readonly name: string;
  readonly frames: number;
}

/** Revisions whose frames are made of it, the latest first. */
export async function listOwnUses(db: Db, office: number, id: number, most = 500): Promise<OwnUse[]> {
  return db
    .selectFrom('revision_part as u')
    .innerJoin('revision as r', 'r.id', 'u.revision')
    .innerJoin('batch as b', 'b.id', 'r.batch')
    .innerJoin('project', 'project.id', 'b.project')
    .select([
      'u.version',
      'project.name as project',
      'b.id as batch',
      'b.name as batchName',
      'r.letter',
      'r.state',
      'u.name',
      'u.frames',
    ])
    .where('u.own_part', '=', id)
    .where('r.office', '=', office)
    .orderBy('r.id', 'desc')
    .limit(most)
    .$narrowType<{ version: number }>()
    .execute();
}

/** Keeps what a revision's frames are made of, in place of what was kept before. */
export function insertRevisionParts(raw: RawDatabase, office: number, revision: number, parts: readonly PartOrigin[]): void {
  raw.prepare('delete from revision_part where revision = ?').run(revision);
  const id = raw
    .prepare<[number, string, string], number>('select id from own_part where office = ? and kind = ? and name_key = ?')
    .pluck();
  const add = raw.prepare('insert into revision_part values (?, ?, ?, ?, ?, ?, ?, ?, ?)');
  inShortTransactions(raw, parts.entries(), ([i, { kind, name, origin, version, note, frames, own }]) =>
    add.run(
      revision,
      i,
      kind,
      name,
      origin,
      own === null ? null : (id.get(office, kind, idKey(own)) ?? null),
      version,
      note,
      frames,
    ),
  );
}

/** What a revision's frames are made of, in order of first use; none of one that an earlier version read. */
export async function listRevisionParts(db: Db, office: number, revision: number): Promise<PartOrigin[]> {
  return db
    .selectFrom('revision_part as u')
    .innerJoin('revision as r', 'r.id', 'u.revision')
    .leftJoin('own_part as p', 'p.id', 'u.own_part')
    .select(['u.kind', 'u.name', 'u.origin', 'u.version', 'u.note', 'u.frames', 'p.name as own'])
    .where('r.office', '=', office)
    .where('u.revision', '=', revision)
    .orderBy('u.ordinal')
    .execute();
}
