/**
 * Revisions made from an earlier one by changes: from which, what was changed, by whom and why. Rows as typed say which
 * sheet they stand on and what their cells are, so that a revision can be read again from them. Frozen.
 */
import { type Kysely, sql } from 'kysely';

const statements = [
  'alter table revision add column made_from integer references revision',
  'alter table input_row add column part integer',
  'alter table input_row add column marks text',
  'alter table input_row add column changed_by text',
  "alter table sheet_read add column decimal_mark text check (decimal_mark in ('.', ','))",
  `create table change (
     id integer primary key, office integer not null references office, revision integer not null references revision,
     ordinal integer not null, kind text not null, what text not null, from_text text not null, to_text text not null,
     record text not null, reason text not null, person integer not null references person, at text not null,
     unique (revision, ordinal)
   ) strict`,
];

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db);
}
