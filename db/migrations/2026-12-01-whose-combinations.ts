/** An office's own combination sets with their versions, and its limits on every measure and by combination. Frozen. */
import { type Kysely, sql } from 'kysely';

const statements = [
  `create table combination_set (
     id integer primary key, office integer not null references office, name text not null collate nocase,
     person integer not null references person, at text not null, withdrawn_at text, unique (office, name)
   ) strict`,
  `create table combination_set_version (
     office integer not null references office, set_id integer not null references combination_set, version integer not null,
     based_on text, level text not null check (level in ('factored', 'allowable')),
     together integer not null check (together in (0, 1)), rules text not null, provenance text not null,
     person integer not null references person, at text not null, primary key (set_id, version)
   ) strict, without rowid`,
  `create index change_of_set on change (office, json_extract(record, '$.set')) where kind = 'office combinations'`,
  `create table office_limit_by_combination (
     office integer not null references office, ordinal integer not null, applies_to text not null,
     measure text not null check (measure in ('deflection', 'sway', 'displacement', 'spread')),
     direction text check (direction in ('x', 'y', 'resultant')), to_place text, ratio real check (ratio > 0),
     absolute_m real check (absolute_m > 0), combination text, source text not null,
     person integer not null references person, at text not null, primary key (office, ordinal),
     check (ratio is not null or absolute_m is not null)
   ) strict, without rowid`,
  `insert into office_limit_by_combination
     select office, ordinal, applies_to, measure, null, null, ratio, null, null, source, person, at from office_limit`,
  'drop table office_limit',
  'alter table office_limit_by_combination rename to office_limit',
];

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db);
}
