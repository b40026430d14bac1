import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import type { AlteredFrame } from '@/lib/issuing/altered-frame';

/** What came of evaluating an issued revision again by an engine. */
export interface EngineTest {
  readonly issue: number;
  readonly engine: string;
  readonly by: string;
  readonly at: string;
  readonly frames: number;
  readonly altered: number;
  /** Frames whose verdict would be another. */
  readonly verdicts: number;
  /** Largest difference of a ratio; null where none differs, or one has no end. */
  readonly largest: number | null;
  /** The first frames altered, those with another verdict before the rest. */
  readonly list: readonly AlteredFrame[];
}

/** The last test of each issue by an engine. */
export async function listEngineTests(db: Db, office: number, engine: string): Promise<ReadonlyMap<number, EngineTest>> {
  const rows = await db
    .selectFrom('engine_test')
    .innerJoin('person', 'person.id', 'engine_test.person')
    .selectAll('engine_test')
    .select('person.name as by')
    .where('engine_test.office', '=', office)
    .where('engine_test.engine', '=', engine)
    .execute();
  return new Map(
    rows.map(({ issue, engine: by_engine, by, at, frames, altered, verdicts, largest, list }) => [
      issue,
      { issue, engine: by_engine, by, at, frames, altered, verdicts, largest, list: JSON.parse(list) as AlteredFrame[] },
    ]),
  );
}

export async function findEngineTest(db: Db, office: number, issue: number, engine: string): Promise<EngineTest | undefined> {
  return (await listEngineTests(db, office, engine)).get(issue);
}

/** Keeps a test in the place of the one before it by the same engine. */
export async function insertEngineTest(
  db: Db,
  office: number,
  test: Omit<EngineTest, 'by' | 'at'> & { readonly person: number },
): Promise<void> {
  const { issue, engine, person, frames, altered, verdicts, largest } = test;
  const values = { person, at: instant(), frames, altered, verdicts, largest, list: JSON.stringify(test.list) };
  await db
    .insertInto('engine_test')
    .values({ office, issue, engine, ...values })
    .onConflict((conflict) => conflict.columns(['issue', 'engine']).doUpdateSet(values))
    .execute();
}
