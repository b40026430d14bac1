import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import { countVerdicts, type VerdictCounts } from '@/db/queries/verdict-counts';
import type { RevisionState } from '@/db/schema';

export interface BatchRecord {
  readonly id: number;
  readonly office: number;
  readonly project: number;
  readonly projectName: string;
  readonly projectNumber: string | null;
  readonly name: string;
  readonly createdAt: string;
}

/** A batch as a project's page lists it, by its latest revision. */
export interface BatchListed extends BatchRecord {
  readonly latest: {
    readonly id: number;
    readonly letter: string;
    readonly state: RevisionState;
    readonly frames: number;
    readonly errors: number;
    readonly warnings: number;
    readonly createdBy: string;
    readonly createdAt: string;
    readonly changedAt: string;
    readonly verdicts: VerdictCounts;
  } | null;
}

export async function findBatch(db: Db, office: number, batch: number): Promise<BatchRecord | undefined> {
  return batches(db, office).where('batch.id', '=', batch).executeTakeFirst();
}

/** A project's batches, the newest first. */
export async function listBatches(db: Db, office: number, project: number): Promise<BatchListed[]> {
  const found = await batches(db, office).where('batch.project', '=', project).orderBy('batch.id', 'desc').execute();
  if (found.length === 0) return [];
  const latest = await db
    .selectFrom('revision')
    .innerJoin('person', 'person.id', 'revision.created_by')
    .select((eb) => [
      'revision.id',
      'revision.batch',
      'revision.letter',
      'revision.state',
      'revision.frames',
      'revision.errors',
      'revision.warnings',
      'person.name as createdBy',
      'revision.created_at as createdAt',
      'revision.changed_at as changedAt',
      eb.fn.max('revision.ordinal').as('ordinal'),
    ]) // prettier-ignore
    .where(
      'revision.batch',
      'in',
      found.map((batch) => batch.id),
    ) // prettier-ignore
    .groupBy('revision.batch')
    .execute();
  const verdicts = await countVerdicts(db, latest.map((one) => one.id)); // prettier-ignore
  const byBatch = new Map(latest.map((one) => [one.batch, one]));
  return found.map((batch) => {
    const one = byBatch.get(batch.id);
    if (!one) return { ...batch, latest: null };
    const { id, letter, state, frames, errors, warnings, createdBy, createdAt, changedAt } = one;
    const counts = verdicts.get(id)!;
    return {
      ...batch,
      latest: { id, letter, state, frames, errors, warnings, createdBy, createdAt, changedAt, verdicts: counts },
    };
  });
}

/** @returns undefined where the project is not the office's */
export async function insertBatch(
  db: Db,
  office: number,
  batch: { readonly project: number; readonly name: string; readonly person: number },
): Promise<number | undefined> {
  const row = await db
    .insertInto('batch')
    .columns(['office', 'project', 'name', 'created_by', 'created_at'])
    .expression((eb) =>
      eb
        .selectFrom('project')
        .select((one) => [
          'project.office',
          'project.id',
          one.val(batch.name).as('name'),
          one.val(batch.person).as('created_by'),
          one.val(instant()).as('created_at'),
        ])
        .where('project.id', '=', batch.project)
        .where('project.office', '=', office),
    )
    .returning('id')
    .executeTakeFirst();
  return row?.id;
}

function batches(db: Db, office: number) {
  return db
    .selectFrom('batch')
    .innerJoin('project', 'project.id', 'batch.project')
    .select([
      'batch.id',
      'batch.office',
      'batch.project',
      'project.name as projectName',
      'project.number as projectNumber',
      'batch.name',
      'batch.created_at as createdAt',
    ])
    .where('batch.office', '=', office);
}
