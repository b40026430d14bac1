/** Sizings: what was asked for, what frames answered so far, and what was found. Frozen. */
import { type Kysely, sql } from 'kysely';

const statements = [
  `create table sizing (
     id integer primary key, office integer not null references office, revision integer not null references revision,
     person integer not null references person, at text not null,
     request text not null, input_hash text, engine text not null,
     state text not null check (state in ('queued', 'running', 'done', 'stopped', 'failed')),
     total integer not null default 0, done integer not null default 0, seconds real not null default 0,
     found text, reason text, finished_at text
   ) strict`,
  'create index sizing_revision on sizing (revision, id)',
  // what frames said so far, so that a sizing taken up again asks nothing twice; emptied when it is done
  `create table sizing_piece (
     id integer primary key, sizing integer not null references sizing, choice text not null, packed blob not null
   ) strict`,
  'create index sizing_piece_of on sizing_piece (sizing, id)',
];

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db);
}
