/** How letters leave the outbox, who wants which, and the links in them that work once. Frozen. */
import { type Kysely, sql } from 'kysely';

const statements = [
  `create table outbox_kept (
     id integer primary key, office integer not null references office, recipient text not null, kind text not null,
     payload text not null, state text not null check (state in ('waiting','sent','failed')),
     idempotency_key text not null unique, attempts integer not null default 0, due_at text not null,
     last_error text, message_id text, created_at text not null, sent_at text
   ) strict`,
  `insert into outbox_kept (id, office, recipient, kind, payload, state, idempotency_key, due_at, created_at, sent_at)
     select id, office, recipient, kind, payload, state, 'tallyframe-' || lower(hex(randomblob(16))), created_at, created_at, sent_at
     from outbox`,
  `drop table outbox`,
  `alter table outbox_kept rename to outbox`,
  `create index outbox_due on outbox (state, due_at)`,
  `create index outbox_office on outbox (office, state, id)`,
  `create table mail_choice (
     office integer not null, person integer not null, kind text not null, wanted integer not null check (wanted in (0, 1)),
     primary key (office, person, kind), foreign key (office, person) references membership (office, person)
   ) strict, without rowid`,
  `create table invitation (
     id integer primary key, office integer not null references office, email text not null collate nocase,
     role text not null check (role in ('lead','analyst','checker','client')), invited_by integer not null references person,
     created_at text not null, ended_at text, ended_as text check (ended_as in ('accepted','revoked'))
   ) strict`,
  `create index invitation_office on invitation (office, id)`,
  `create unique index invitation_one_open on invitation (office, email) where ended_at is null`,
  `create table invitation_project (
     invitation integer not null references invitation, project integer not null references project,
     primary key (invitation, project)
   ) strict, without rowid`,
  `create table single_use_link (
     id integer primary key, purpose text not null check (purpose in ('invitation','password reset')),
     office integer not null references office, invitation integer references invitation, person integer references person,
     nonce text not null, hash text not null unique, created_at text not null, expires_at text not null, ended_at text,
     check ((purpose = 'invitation') = (invitation is not null)), check ((purpose = 'password reset') = (person is not null))
   ) strict`,
  `create index single_use_link_invitation on single_use_link (invitation)`,
  `create index single_use_link_person on single_use_link (person)`,
  `create table reset_request (
     id integer primary key, email text not null collate nocase, address text not null, at text not null, done_at text
   ) strict`,
  `create index reset_request_email on reset_request (email, at)`,
  `create index reset_request_address on reset_request (address, at)`,
  `create index reset_request_open on reset_request (id) where done_at is null`,
  `alter table batch add column keeper integer references person`,
];

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db);
}
