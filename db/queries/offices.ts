import { instant } from '@/db/clock';
import type { Db } from '@/db/open';

export async function insertOffice(db: Db, name: string): Promise<number> {
  const row = await db.insertInto('office').values({ name, created_at: instant() }).returning('id').executeTakeFirstOrThrow();
  return row.id;
}

/** How many offices there are: 0 in a new database, which the demo fills. */
export async function countOffices(db: Db): Promise<number> {
  const { n } = await db
    .selectFrom('office')
    .select((eb) => eb.fn.countAll<number>().as('n'))
    .executeTakeFirstOrThrow();
  return n;
}
