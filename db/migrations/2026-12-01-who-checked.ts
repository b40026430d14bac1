/** Checking: who sent, returned and passed a revision, what had to be seen, who saw it, asked, accepted, and what they had themselves. Frozen. */
import { type Kysely, sql } from 'kysely';

const statements = [
  'alter table revision add column sent_by integer references person',
  'alter table revision add column sent_at text',
  'alter table revision add column checked_by integer references person',
  'alter table revision add column checked_at text',
  "create index revision_to_check on revision (office, sent_at) where state = 'to check'",
  `create table checking_act (
     id integer primary key, office integer not null references office, revision integer not null references revision,
     what text not null check (what in ('sent', 'returned', 'passed')), person integer not null references person,
     at text not null, note text not null, input_sha256 text not null, engine text not null
   ) strict`,
  'create index checking_act_revision on checking_act (revision, id)',
  `create table checking_list (
     revision integer not null references revision, frame integer not null, ordinal integer not null,
     part text not null check (part in ('over', 'not checked', 'near', 'sample')), reasons text not null, whole text,
     primary key (revision, frame)
   ) strict, without rowid`,
  'create unique index checking_list_order on checking_list (revision, ordinal)',
  'create index checking_list_whole on checking_list (revision, frame) where whole is not null',
  `create table checking_seen (
     revision integer not null references revision, frame integer not null, person integer not null references person,
     at text not null, input_sha256 text not null, engine text not null, frame_hash text not null,
     primary key (revision, frame, person)
   ) strict, without rowid`,
  `create table checking_query (
     id integer primary key, office integer not null references office, revision integer not null references revision,
     frame integer not null, subject text, check_name text, raised_by integer not null references person, raised_at text not null,
     input_sha256 text not null, engine text not null, closed_by integer references person, closed_at text
   ) strict`,
  'create index checking_query_frame on checking_query (revision, frame, id)',
  'create index checking_query_open on checking_query (revision, id) where closed_at is null',
  `create table checking_message (
     id integer primary key, query integer not null references checking_query, person integer not null references person,
     at text not null, text text not null
   ) strict`,
  'create index checking_message_query on checking_message (query, id)',
  `create table checking_acceptance (
     id integer primary key, office integer not null references office, revision integer not null references revision,
     frame integer not null, item integer not null, subject text, check_name text not null, combination text,
     verdict text not null check (verdict in ('over', 'not checked')), ratio real, reason text not null,
     person integer not null references person, at text not null, input_sha256 text not null, engine text not null,
     ended_by integer references person, ended_at text
   ) strict`,
  'create unique index checking_acceptance_standing on checking_acceptance (revision, frame, item) where ended_at is null',
  'create index checking_acceptance_revision on checking_acceptance (revision, id)',
  `create table checking_own_value (
     id integer primary key, office integer not null references office, revision integer not null references revision,
     frame integer not null, figure text not null, label text not null, quantity text not null, ours real not null,
     theirs real not null, typed text not null, note text not null, person integer not null references person, at text not null,
     input_sha256 text not null, engine text not null
   ) strict`,
  'create index checking_own_value_frame on checking_own_value (revision, frame, id)',
];

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db);
}
