import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import type { OfficeLimit } from '@/lib/model/office-limit';

/** The office's own limits on movement, in its order. */
export async function listOfficeLimits(db: Db, office: number): Promise<OfficeLimit[]> {
  const rows = await db
    .selectFrom('office_limit')
    .select(['applies_to', 'measure', 'direction', 'to_place', 'ratio', 'absolute_m', 'combination', 'source'])
    .where('office', '=', office)
    .orderBy('ordinal')
    .execute();
  return rows.map(({ applies_to, measure, direction, to_place, ratio, absolute_m, combination, source }) => ({
    appliesTo: applies_to,
    measure,
    ratio,
    source,
    ...(direction === null ? {} : { direction }),
    ...(to_place === null ? {} : { toPlace: to_place }),
    ...(absolute_m === null ? {} : { absolute_m }),
    ...(combination === null ? {} : { combination }),
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
    for (const [ordinal, limit] of given.limits.entries())
      await within
        .insertInto('office_limit')
        .values({
          office,
          ordinal,
          applies_to: limit.appliesTo,
          measure: limit.measure,
          direction: limit.direction ?? null,
          to_place: limit.toPlace ?? null,
          ratio: limit.ratio,
          absolute_m: limit.absolute_m ?? null,
          combination: limit.combination ?? null,
          source: limit.source,
          person: given.person,
          at,
        })
        .execute();
  });
}
