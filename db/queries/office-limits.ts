import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import type { OfficeLimit } from '@/lib/model/office-limit';

/** The office's own limits on movement, in its order. */
export async function listOfficeLimits(db: Db, office: number): Promise<OfficeLimit[]> {
  const rows = await db
    .selectFrom('office_limit')
    .select(['applies_to', 'measure', 'ratio', 'source'])
    .where('office', '=', office)
    .orderBy('ordinal')
    .execute();
  return rows.map(({ applies_to, measure, ratio, source }) => ({
    appliesTo: applies_to as OfficeLimit['appliesTo'],
    measure,
    ratio,
    source,
  }));
}

/** Puts these in place of the office's limits, all at once. */
export async function updateOfficeLimits(
  db: Db,
  office: number,
  given: { readonly person: number; readonly limits: readonly OfficeLimit[] },
): Promise<void> {
  const at = instant();
  await db.transaction().execute(async (within) => {
    await within.deleteFrom('office_limit').where('office', '=', office).execute();
    for (const [ordinal, { appliesTo, measure, ratio, source }] of given.limits.entries())
      await within
        .insertInto('office_limit')
        .values({ office, ordinal, applies_to: appliesTo, measure, ratio, source, person: given.person, at })
        .execute();
  });
}
