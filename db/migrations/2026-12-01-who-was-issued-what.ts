/**
 * Issues: a checked revision handed to clients, its files as made, who was sent and took them, who asked what; what an office
 * chose; and whether a newer engine would alter what was issued. Frozen.
 */
import { type Kysely, sql } from 'kysely';

const statements = [
  `create table office_setting (
     office integer not null references office, name text not null, value text not null,
     person integer not null references person, at text not null, primary key (office, name)
   ) strict, without rowid`,
  `create table issue (
     id integer primary key, office integer not null references office, project integer not null references project,
     batch integer not null references batch, revision integer not null references revision,
     number text not null, stem text not null, running integer not null,
     state text not null check (state in ('making', 'failed', 'issued', 'superseded', 'withdrawn')),
     note text, cover text not null, report_frames text not null, supersedes integer references issue,
     engine text not null, issued_by integer not null references person, issued_at text not null, handed_at text,
     failure text, withdrawn_by integer references person, withdrawn_at text, withdrawn_reason text,
     unique (office, number)
   ) strict`,
  'create index issue_project on issue (project, id)',
  'create index issue_revision on issue (revision, id)',
  'create index issue_batch on issue (batch, id)',
  'create index issue_office on issue (office, id)',
  // never two that hold for a batch, nor two in the making: each names the one it takes the place of
  "create unique index issue_in_force on issue (batch) where state = 'issued'",
  "create unique index issue_making on issue (batch) where state = 'making'",
  `create table issue_client (
     issue integer not null references issue, person integer not null references person, name text not null,
     sent_at text not null, primary key (issue, person)
   ) strict, without rowid`,
  'create index issue_client_person on issue_client (person, issue)',
  `create table issue_file (
     id integer primary key, issue integer not null references issue,
     kind text not null check (kind in ('report', 'workbook', 'input')), name text not null, size integer not null,
     sha256 text not null, pages integer, made_at text not null, unique (issue, kind)
   ) strict`,
  `create table issue_piece (
     id integer primary key, issue integer not null references issue, kind text not null, ordinal integer not null,
     bytes blob not null, unique (issue, kind, ordinal)
   ) strict`,
  `create table download (
     id integer primary key, office integer not null references office, issue integer not null references issue,
     file integer not null references issue_file, person integer not null references person, at text not null
   ) strict`,
  'create index download_issue on download (issue, id)',
  `create table receipt (
     issue integer not null references issue, person integer not null references person, at text not null,
     primary key (issue, person)
   ) strict, without rowid`,
  `create table question (
     id integer primary key, office integer not null references office, issue integer not null references issue,
     person integer not null references person, frame integer, frame_id text, text text not null, at text not null
   ) strict`,
  'create index question_issue on question (issue, id)',
  `create table answer (
     id integer primary key, office integer not null references office, question integer not null references question,
     person integer not null references person, text text not null, at text not null
   ) strict`,
  'create index answer_question on answer (question, id)',
  `create table engine_test (
     issue integer not null references issue, engine text not null, office integer not null references office,
     person integer not null references person, at text not null, frames integer not null, altered integer not null,
     verdicts integer not null, largest real, list text not null, primary key (issue, engine)
   ) strict, without rowid`,
];

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db);
}
