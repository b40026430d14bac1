import type { Db, RawDatabase } from '@/db/open';
import { inShortTransactions } from '@/db/short-transactions';
import type { CombinationShown } from '@/lib/combinations/shown-combinations';

/** Most that are kept to be shown; the frames themselves hold all of theirs. */
const mostKept = 20_000;

/** Keeps what a revision's frames are combined by. */
export function insertCombinations(raw: RawDatabase, revision: number, shown: readonly CombinationShown[]): void {
  const add = raw.prepare('insert into combination_read values (?, ?, ?, ?, ?, ?, ?)');
  inShortTransactions(raw, shown.slice(0, mostKept).entries(), ([i, { name, purpose, terms, clause, frames }]) =>
    add.run(revision, i, name, purpose, JSON.stringify(terms), clause, frames),
  );
}

/** A revision's combinations in order, the first `most`, and how many there are. */
export async function listCombinations(
  db: Db,
  office: number,
  revision: number,
  most: number,
): Promise<{ readonly list: CombinationShown[]; readonly all: number }> {
  const own = db
    .selectFrom('combination_read')
    .innerJoin('revision', 'revision.id', 'combination_read.revision')
    .where('revision.office', '=', office)
    .where('combination_read.revision', '=', revision);
  const [rows, { all }] = await Promise.all([
    own.selectAll('combination_read').orderBy('combination_read.ordinal').limit(most).execute(),
    own.select((eb) => eb.fn.countAll<number>().as('all')).executeTakeFirstOrThrow(),
  ]);
  return {
    all,
    list: rows.map(({ name, purpose, terms, clause, frames }) => ({
      name,
      purpose,
      terms: JSON.parse(terms) as CombinationShown['terms'],
      clause,
      frames,
    })),
  };
}
