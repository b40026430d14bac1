import { instant } from '@/db/clock';
import type { Db } from '@/db/open';

/** What an office chose, by name; each is off until somebody chose it. */
export type OfficeSetting = 'checkers issue';

/** @returns false where nothing was chosen */
export async function readOfficeSetting(db: Db, office: number, name: OfficeSetting): Promise<boolean> {
  const row = await db
    .selectFrom('office_setting')
    .select('value')
    .where('office', '=', office)
    .where('name', '=', name)
    .executeTakeFirst();
  return row?.value === 'yes';
}

export async function updateOfficeSetting(
  db: Db,
  office: number,
  chosen: { readonly name: OfficeSetting; readonly on: boolean; readonly person: number },
): Promise<void> {
  const values = { value: chosen.on ? 'yes' : 'no', person: chosen.person, at: instant() };
  await db
    .insertInto('office_setting')
    .values({ office, name: chosen.name, ...values })
    .onConflict((conflict) => conflict.columns(['office', 'name']).doUpdateSet(values))
    .execute();
}
