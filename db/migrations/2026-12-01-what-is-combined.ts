/** What a revision's frames are combined by, as read, and an office's own limits on movement. Frozen. */
import { type Kysely, sql } from 'kysely';

const statements = [
  `create table combination_read (
     revision integer not null references revision, ordinal integer not null, name text not null,
     purpose text not null check (purpose in ('strength', 'service')), terms text not null, clause text, frames integer not null,
     primary key (revision, ordinal)
   ) strict, without rowid`,
  `create table office_limit (
     office integer not null references office, ordinal integer not null, applies_to text not null,
     measure text not null check (measure in ('deflection', 'sway')), ratio real not null check (ratio > 0), source text not null,
     person integer not null references person, at text not null, primary key (office, ordinal)
   ) strict, without rowid`,
];

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db);
}
