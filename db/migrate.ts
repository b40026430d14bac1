import { type Kysely, type Migration, Migrator } from 'kysely';
import { up as firstTables } from '@/db/migrations/2026-12-01-first-tables';
import { up as slimLists } from '@/db/migrations/2026-12-01-slim-lists';
import { up as trailOfChanges } from '@/db/migrations/2026-12-01-trail-of-changes';
import { up as whatIsCombined } from '@/db/migrations/2026-12-01-what-is-combined';
import { up as whichIsLightest } from '@/db/migrations/2026-12-01-which-is-lightest';
import { up as whoseCombinations } from '@/db/migrations/2026-12-01-whose-combinations';
import { up as whoChecked } from '@/db/migrations/2026-12-01-who-checked';
import { up as whoseSections } from '@/db/migrations/2026-12-01-whose-sections';
import { up as whoWasIssuedWhat } from '@/db/migrations/2026-12-01-who-was-issued-what';
import { up as whomMailReaches } from '@/db/migrations/2026-12-01-whom-mail-reaches';
import { up as withTokens } from '@/db/migrations/2026-12-01-with-tokens';
import type { DB } from '@/db/schema';

/** Registered by hand: bundlers see imports, not folders. */
const migrations: Record<string, Migration> = {
  '2026-12-01-first-tables': { up: firstTables },
  '2026-12-01-slim-lists': { up: slimLists },
  '2026-12-01-trail-of-changes': { up: trailOfChanges },
  '2026-12-01-what-is-combined': { up: whatIsCombined },
  '2026-12-01-which-is-lightest': { up: whichIsLightest },
  '2026-12-01-who-checked': { up: whoChecked },
  '2026-12-01-who-was-issued-what': { up: whoWasIssuedWhat },
  '2026-12-01-whom-mail-reaches': { up: whomMailReaches },
  '2026-12-01-whose-sections': { up: whoseSections },
  '2026-12-01-whose-combinations': { up: whoseCombinations },
  '2026-12-01-with-tokens': { up: withTokens },
};

/** Brings the database up to date; names of the migrations that ran. Safe to call at every start. */
export async function migrate(db: Kysely<DB>): Promise<string[]> {
  const migrator = new Migrator({ db, provider: { getMigrations: () => Promise.resolve(migrations) } });
  const { error, results } = await migrator.migrateToLatest();
  if (error) throw new Error('The database could not be brought up to date', { cause: error });
  return (results ?? []).map((result) => result.migrationName);
}
