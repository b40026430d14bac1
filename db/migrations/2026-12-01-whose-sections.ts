/** An office's own sections and materials, version by version, and what the frames of a revision are made of. Frozen. */
import { type Kysely, sql } from 'kysely';

const statements = [
  `create table own_part (
     id integer primary key, office integer not null references office,
     kind text not null check (kind in ('section', 'material')), name text not null, name_key text not null,
     retired_at text, retired_by integer references person, unique (office, kind, name_key)
   ) strict`,
  `create table own_part_version (
     part integer not null references own_part, version integer not null check (version > 0),
     units text not null check (units in ('metric', 'us')), cells text not null, resolved text not null, note text not null,
     person integer not null references person, at text not null, primary key (part, version)
   ) strict, without rowid`,
  `create table revision_part (
     revision integer not null references revision, ordinal integer not null,
     kind text not null check (kind in ('section', 'material')), name text not null,
     origin text not null check (origin in ('sheet', 'office', 'library')), own_part integer references own_part, version integer,
     note text, frames integer not null, primary key (revision, ordinal)
   ) strict, without rowid`,
  'create index revision_part_own on revision_part (own_part, version) where own_part is not null',
];

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db);
}
