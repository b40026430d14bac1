/** Personal tokens for scripts. Frozen. */
import { type Kysely, sql } from 'kysely';

const statements = [
  `create table token (
     id integer primary key, office integer not null references office, person integer not null references person,
     name text not null, hash text not null unique, scope text not null check (scope in ('read','upload and run')),
     created_at text not null, expires_at text not null, used_at text, ended_at text,
     foreign key (office, person) references membership (office, person)
   ) strict`,
  `create index token_person on token (office, person)`,
  `create index activity_project_what on activity (project, what, id)`,
  `create index activity_project_person on activity (project, person, id)`,
];

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db);
}
