/** Where people stand in an office: role, projects, disabled or not, and what they look after. An office always keeps a lead. */
import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import type { OfficeRole } from '@/db/schema';
import { endLinks } from './links';
import { endTokens } from './tokens';

export interface PersonStanding {
  readonly id: number;
  readonly name: string;
  readonly email: string;
  readonly role: OfficeRole;
  readonly since: string;
  /** When they were disabled; null = they may sign in. */
  readonly disabledAt: string | null;
  /** Projects they are assigned to. */
  readonly projects: readonly number[];
  /** Batches they look after. */
  readonly batches: number;
}

/** Everyone of an office, the disabled too. */
export async function listStanding(db: Db, office: number): Promise<PersonStanding[]> {
  const people = await db
    .selectFrom('membership')
    .innerJoin('person', 'person.id', 'membership.person')
    .select((eb) => [
      'person.id',
      'person.name',
      'person.email',
      'membership.role',
      'membership.created_at as since',
      'membership.ended_at as disabledAt',
      eb
        .selectFrom('batch')
        .select((one) => one.fn.countAll<number>().as('n'))
        .where('batch.office', '=', office)
        .where((one) => one(one.fn.coalesce('batch.keeper', 'batch.created_by'), '=', one.ref('person.id')))
        .$asScalar()
        .$notNull()
        .as('batches'),
    ])
    .where('membership.office', '=', office)
    .orderBy('person.name')
    .orderBy('person.id')
    .execute();
  const assigned = await db
    .selectFrom('project_person')
    .innerJoin('project', 'project.id', 'project_person.project')
    .select(['project_person.person', 'project_person.project'])
    .where('project.office', '=', office)
    .execute();
  return people.map((one) => ({
    ...one,
    projects: assigned.filter((row) => row.person === one.id).map((row) => row.project),
  }));
}

export async function findStanding(db: Db, office: number, person: number): Promise<PersonStanding | undefined> {
  return (await listStanding(db, office)).find((one) => one.id === person);
}

/** Whether anyone else of the office could lead it. */
async function hasOtherLead(db: Db, office: number, person: number): Promise<boolean> {
  const other = await db
    .selectFrom('membership')
    .select('person')
    .where('office', '=', office)
    .where('role', '=', 'lead')
    .where('ended_at', 'is', null)
    .where('person', '!=', person)
    .executeTakeFirst();
  return other !== undefined;
}

/** @returns false where the office would be left without a lead; nothing is changed then */
export async function updateRole(db: Db, office: number, person: number, role: OfficeRole): Promise<boolean> {
  if (role !== 'lead' && !(await hasOtherLead(db, office, person))) return false;
  await db.updateTable('membership').set({ role }).where('office', '=', office).where('person', '=', person).execute();
  return true;
}

/**
 * Ends a person's sign-in at once: sessions, personal tokens and links for a new password with it.
 *
 * @returns false where the office would be left without a lead; nothing is changed then
 */
export async function disablePerson(db: Db, office: number, person: number): Promise<boolean> {
  if (!(await hasOtherLead(db, office, person))) return false;
  const ended_at = instant();
  const membership = db.updateTable('membership').set({ ended_at }).where('office', '=', office).where('person', '=', person);
  await membership.where('ended_at', 'is', null).execute();
  await endSessions(db, person);
  await endTokens(db, person);
  await endLinks(db, { person });
  return true;
}

export async function enablePerson(db: Db, office: number, person: number): Promise<void> {
  const membership = db.updateTable('membership').set({ ended_at: null });
  await membership.where('office', '=', office).where('person', '=', person).execute();
}

/** Ends a person's sessions. @param but one that stays */
export async function endSessions(db: Db, person: number, but?: string): Promise<void> {
  const query = db.updateTable('session').set({ ended_at: instant() }).where('person', '=', person).where('ended_at', 'is', null);
  await (but === undefined ? query : query.where('id', '!=', but)).execute();
}

/** Makes these projects of the office, and no others of it, the ones a person is assigned to. */
export async function updateProjectsOf(db: Db, office: number, person: number, projects: readonly number[]): Promise<void> {
  const own = db.selectFrom('project').select('id').where('office', '=', office);
  await db.deleteFrom('project_person').where('person', '=', person).where('project', 'in', own).execute();
  await assignProjects(db, office, person, projects);
}

/** Assigns a person to projects of the office besides those they have. */
export async function assignProjects(db: Db, office: number, person: number, projects: readonly number[]): Promise<void> {
  if (projects.length === 0) return;
  const created_at = instant();
  await db
    .insertInto('project_person')
    .columns(['project', 'person', 'created_at'])
    .expression((eb) =>
      eb
        .selectFrom('project')
        .select((one) => ['project.id', one.val(person).as('person'), one.val(created_at).as('created_at')])
        .where('office', '=', office)
        .where('id', 'in', [...projects]),
    )
    .onConflict((conflict) => conflict.doNothing())
    .execute();
}

/** Hands over what a person looks after: their batches, and their projects besides those the other has. Who prepared what stays as it was. */
export async function transferWork(
  db: Db,
  office: number,
  from: number,
  to: number,
): Promise<{ batches: number; projects: number }> {
  const { numUpdatedRows } = await db
    .updateTable('batch')
    .set({ keeper: to })
    .where('office', '=', office)
    .where((eb) => eb(eb.fn.coalesce('keeper', 'created_by'), '=', from))
    .executeTakeFirst();
  const projects = (await findStanding(db, office, from))?.projects ?? [];
  await assignProjects(db, office, to, projects);
  return { batches: Number(numUpdatedRows), projects: projects.length };
}

/** Who looks after a batch now: whoever made it, or took it over. Letters about it go to them. */
export async function findKeeper(
  db: Db,
  office: number,
  batch: number,
): Promise<{ readonly id: number; readonly name: string; readonly email: string } | undefined> {
  return db
    .selectFrom('batch')
    .innerJoin('person', (join) => join.on((eb) => eb('person.id', '=', eb.fn.coalesce('batch.keeper', 'batch.created_by'))))
    .select(['person.id', 'person.name', 'person.email'])
    .where('batch.office', '=', office)
    .where('batch.id', '=', batch)
    .executeTakeFirst();
}

export async function updatePassword(db: Db, person: number, passwordHash: string): Promise<void> {
  await db.updateTable('person').set({ password_hash: passwordHash }).where('id', '=', person).execute();
}
