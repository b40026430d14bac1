import type { Db } from '@/db/open';

/** Frames of a revision by verdict; `waiting` have none yet, `stopped` are kept from running by errors of their sheets. */
export interface VerdictCounts {
  readonly over: number;
  readonly notChecked: number;
  readonly near: number;
  readonly within: number;
  readonly waiting: number;
  readonly stopped: number;
}

/** Counts of several revisions at once, by revision. The caller has made sure of the office. */
export async function countVerdicts(db: Db, revisions: readonly number[]): Promise<Map<number, VerdictCounts>> {
  const rows = await db
    .selectFrom('revision_frame')
    .select((eb) => ['revision', 'verdict', 'status', eb.fn.countAll<number>().as('n')])
    .where('revision', 'in', [...revisions])
    .groupBy(['revision', 'verdict', 'status'])
    .execute();
  const counts = new Map(revisions.map((one) => [one, { over: 0, notChecked: 0, near: 0, within: 0, waiting: 0, stopped: 0 }]));
  for (const row of rows) {
    const count = counts.get(row.revision);
    if (!count) continue;
    if (row.status === 'stopped') count.stopped += row.n;
    else if (row.verdict === -1) count.waiting += row.n;
    else count[(['within', 'near', 'notChecked', 'over'] as const)[row.verdict] ?? 'waiting'] += row.n;
  }
  return counts;
}
