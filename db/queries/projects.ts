import { instant } from '@/db/clock';
import type { Db } from '@/db/open';

export interface ProjectRecord {
  readonly id: number;
  readonly office: number;
  readonly name: string;
  readonly number: string | null;
  readonly createdAt: string;
  readonly batches: number;
  /** When anything of it last changed: its newest revision's state, else its own beginning. */
  readonly changedAt: string;
}

/** Every project of the office, the last changed first. */
export async function listProjects(db: Db, office: number): Promise<ProjectRecord[]> {
  return projects(db, office).orderBy('changedAt', 'desc').orderBy('project.id', 'desc').execute();
}

/** The projects that a client is assigned to. */
export async function listProjectsOf(db: Db, office: number, person: number): Promise<ProjectRecord[]> {
  return projects(db, office)
    .where('project.id', 'in', (eb) => eb.selectFrom('project_person').select('project').where('person', '=', person))
    .orderBy('project.name')
    .execute();
}

export async function findProject(db: Db, office: number, project: number): Promise<ProjectRecord | undefined> {
  return projects(db, office).where('project.id', '=', project).executeTakeFirst();
}

/** @returns undefined where the office has a project of that name */
export async function insertProject(
  db: Db,
  office: number,
  project: { readonly name: string; readonly number: string | null; readonly person: number },
): Promise<number | undefined> {
  const row = await db
    .insertInto('project')
    .values({ office, name: project.name, number: project.number, created_by: project.person, created_at: instant() })
    .onConflict((conflict) => conflict.columns(['office', 'name']).doNothing())
    .returning('id')
    .executeTakeFirst();
  return row?.id;
}

/** Who is assigned to a project: its clients. */
export async function listAssigned(
  db: Db,
  office: number,
  project: number,
): Promise<{ id: number; name: string; email: string }[]> {
  return db
    .selectFrom('project_person')
    .innerJoin('project', 'project.id', 'project_person.project')
    .innerJoin('person', 'person.id', 'project_person.person')
    .select(['person.id', 'person.name', 'person.email'])
    .where('project.office', '=', office)
    .where('project.id', '=', project)
    .orderBy('person.name')
    .execute();
}

/**
 * Makes these people, and no others, the ones assigned to a project. People who are not of the office are left out.
 *
 * @returns false where the project is not the office's
 */
export async function updateAssigned(db: Db, office: number, project: number, people: readonly number[]): Promise<boolean> {
  return db.transaction().execute(async (within) => {
    if (!(await findProject(within, office, project))) return false;
    await within.deleteFrom('project_person').where('project', '=', project).execute();
    if (people.length === 0) return true;
    await within
      .insertInto('project_person')
      .columns(['project', 'person', 'created_at'])
      .expression((eb) =>
        eb
          .selectFrom('membership')
          .select((one) => [one.val(project).as('project'), 'person', one.val(instant()).as('created_at')])
          .where('office', '=', office)
          .where('person', 'in', [...people])
          .where('ended_at', 'is', null),
      )
      .execute();
    return true;
  });
}

function projects(db: Db, office: number) {
  return db
    .selectFrom('project')
    .select((eb) => [
      'project.id',
      'project.office',
      'project.name',
      'project.number',
      'project.created_at as createdAt',
      eb
        .selectFrom('batch')
        .select((one) => one.fn.countAll<number>().as('n'))
        .whereRef('batch.project', '=', 'project.id')
        .$asScalar()
        .$notNull()
        .as('batches'),
      eb.fn
        .coalesce(
          eb
            .selectFrom('revision')
            .innerJoin('batch', 'batch.id', 'revision.batch')
            .select((one) => one.fn.max('revision.changed_at').as('last'))
            .whereRef('batch.project', '=', 'project.id')
            .$asScalar(),
          'project.created_at',
        )
        .as('changedAt'),
    ])
    .where('project.office', '=', office);
}
