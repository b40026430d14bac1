import type { Db } from '@/db/open';
import type { OfficeRole } from '@/db/schema';
import { whyNotCheck, type Deed, type Work } from '@/lib/checking/independence';

/**
 * Everyone with a part in a revision, by name: who made and sent it, and who uploaded, changed or ran any frame of it. A frame
 * carried over counts as theirs too who had a part in it in an earlier revision, and a revision that was made by changes holds
 * what was brought in and changed in every one that it goes back to. [] for a revision that is not the office's.
 */
export async function listPreparers(db: Db, office: number, revision: number): Promise<Work[]> {
  const own = await db
    .selectFrom('revision')
    .select(['batch', 'ordinal', 'created_by', 'run_by', 'sent_by', 'made_from'])
    .where('id', '=', revision)
    .where('office', '=', office)
    .executeTakeFirst();
  if (!own) return [];
  const did = new Map<number, Set<Deed>>();
  const add = (person: number | null, deed: Deed): void => {
    if (person === null) return;
    const known = did.get(person);
    if (known) known.add(deed);
    else did.set(person, new Set([deed]));
  };
  const columns = ['uploaded_by', 'changed_by', 'run_by'] as const;
  const here = await db.selectFrom('revision_frame').select(columns).distinct().where('revision', '=', revision).execute();
  // frames whose content earlier revisions of the batch hold too, whoever brought it in then
  const before = await db
    .selectFrom('revision_frame as own')
    .innerJoin('revision_frame as earlier', 'earlier.version', 'own.version')
    .innerJoin('revision', 'revision.id', 'earlier.revision')
    .select(['earlier.uploaded_by', 'earlier.changed_by', 'earlier.run_by'])
    .distinct()
    .where('own.revision', '=', revision)
    .where('own.version', 'is not', null)
    .where('revision.ordinal', '<', own.ordinal)
    .execute();
  for (const row of [...here, ...before]) {
    add(row.uploaded_by, 'uploaded');
    add(row.changed_by, 'changed');
    add(row.run_by, 'ran');
  }
  for (const { created_by, made_from } of await revisionsBefore(db, own.made_from))
    add(created_by, made_from === null ? 'uploaded' : 'changed');
  add(own.run_by, 'ran');
  add(own.created_by, 'made');
  const sent = await db
    .selectFrom('checking_act')
    .select('person')
    .distinct()
    .where('revision', '=', revision)
    .where('what', '=', 'sent')
    .execute();
  for (const { person } of sent) add(person, 'sent');
  add(own.sent_by, 'sent');
  const names = await db
    .selectFrom('person')
    .select(['id', 'name'])
    .where('id', 'in', [...did.keys()])
    .orderBy('name')
    .orderBy('id')
    .execute();
  return names.map(({ id, name }) => ({ id, name, did: [...(did.get(id) ?? [])] }));
}

/** The revisions that one made by changes goes back to. A frame that was changed twice says only who changed it last. */
async function revisionsBefore(db: Db, from: number | null): Promise<{ created_by: number; made_from: number | null }[]> {
  if (from === null) return [];
  return db
    .withRecursive('chain', (one) =>
      one
        .selectFrom('revision')
        .select(['id', 'created_by', 'made_from'])
        .where('id', '=', from)
        .unionAll(
          one
            .selectFrom('revision')
            .innerJoin('chain', 'chain.made_from', 'revision.id')
            .select(['revision.id', 'revision.created_by', 'revision.made_from']),
        ),
    )
    .selectFrom('chain')
    .select(['created_by', 'made_from'])
    .execute();
}

export interface MayCheck {
  readonly id: number;
  readonly name: string;
  readonly email: string;
  readonly role: OfficeRole;
}

/** The office's people who may check a revision, by name. @param sender who is about to send it */
export async function listWhoMayCheck(db: Db, office: number, revision: number, sender?: number): Promise<MayCheck[]> {
  const work = await listPreparers(db, office, revision);
  if (work.length === 0) return [];
  const people = await db
    .selectFrom('membership')
    .innerJoin('person', 'person.id', 'membership.person')
    .select(['person.id', 'person.name', 'person.email', 'membership.role'])
    .where('membership.office', '=', office)
    .where('membership.ended_at', 'is', null)
    .orderBy('person.name')
    .orderBy('person.id')
    .execute();
  return people.filter((person) => person.id !== sender && whyNotCheck(person, work) === null);
}
