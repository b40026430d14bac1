/** The first tables. Frozen: a later change is a later migration. Why each is as it is: db/README.md. */
import { type Kysely, sql } from 'kysely';

const people = `
create table office (
  id integer primary key, name text not null, created_at text not null
) strict;

create table person (
  id integer primary key, email text not null collate nocase unique, name text not null,
  password_hash text not null, created_at text not null
) strict;

create table membership (
  office integer not null references office, person integer not null references person,
  role text not null check (role in ('lead','analyst','checker','client')),
  created_at text not null, ended_at text,
  primary key (office, person)
) strict, without rowid;
create index membership_person on membership (person);

create table session (
  id text primary key check (length(id) >= 43), person integer not null references person,
  office integer not null references office, created_at text not null, expires_at text not null, ended_at text,
  foreign key (office, person) references membership (office, person)
) strict, without rowid;
create index session_person on session (person);

create table sign_in_attempt (
  id integer primary key, email text not null collate nocase, address text not null, at text not null,
  succeeded integer not null check (succeeded in (0, 1))
) strict;
create index sign_in_attempt_email on sign_in_attempt (email, at);
create index sign_in_attempt_address on sign_in_attempt (address, at);

create table project (
  id integer primary key, office integer not null references office, name text not null, number text,
  created_by integer not null references person, created_at text not null,
  unique (office, name)
) strict;

create table project_person (
  project integer not null references project, person integer not null references person, created_at text not null,
  primary key (project, person)
) strict, without rowid;
create index project_person_person on project_person (person);
`;

const batches = `
create table batch (
  id integer primary key, office integer not null references office, project integer not null references project,
  name text not null, created_by integer not null references person, created_at text not null
) strict;
create index batch_project on batch (project);
create index batch_office on batch (office);

create table revision (
  id integer primary key, office integer not null references office, batch integer not null references batch,
  letter text not null, ordinal integer not null,
  state text not null check (state in ('reading','read','running','run','to check','checked','issued','returned',
    'stopped','failed','superseded','withdrawn')),
  reason text, title text, units text not null default 'metric' check (units in ('metric','us')),
  settings text, origins text, input_name text, input_sha256 text, input_files text, engine text,
  frames integer not null default 0, frames_stopped integer not null default 0,
  errors integer not null default 0, warnings integer not null default 0, notes integer not null default 0,
  stamp integer not null default 0,
  created_by integer not null references person, created_at text not null, changed_at text not null,
  run_by integer references person, run_started_at text, run_finished_at text,
  unique (batch, ordinal), unique (batch, letter)
) strict;

create table upload (
  id integer primary key, office integer not null references office, revision integer not null references revision,
  ordinal integer not null, name text not null, size integer not null, sha256 text not null, bytes blob not null,
  created_by integer not null references person, created_at text not null,
  unique (revision, ordinal)
) strict;

create table input_row (
  revision integer not null references revision, ordinal integer not null, sheet text not null, row integer not null,
  cells text not null,
  primary key (revision, ordinal)
) strict, without rowid;

create index input_row_place on input_row (revision, sheet, row);

create table sheet_read (
  revision integer not null references revision, ordinal integer not null, name text not null, file text not null,
  known text, heading_row integer, rows integer not null, headings text not null,
  primary key (revision, ordinal)
) strict, without rowid;

create table problem (
  revision integer not null references revision, ordinal integer not null,
  severity integer not null check (severity between 0 and 2), code text not null, sheet text not null, file text,
  row integer, heading text, cell text, frames text not null, found text, message text not null,
  stops_all integer not null check (stops_all in (0, 1)),
  primary key (revision, ordinal)
) strict, without rowid;
create index problem_severity on problem (revision, severity, ordinal);
create index problem_code on problem (revision, code, ordinal);
create index problem_sheet on problem (revision, sheet, ordinal);
`;

const results = `
create table frame_version (
  id integer primary key, batch integer not null references batch, hash text not null, engine text not null,
  state text not null check (state in ('waiting','solved','not solved')),
  model blob not null, evaluation blob,
  verdict integer check (verdict between 0 and 3), ratio real, check_name text, subject text, section text,
  combination text, critical_load_factor real, mass real, reason text,
  residual real, equilibrium real, condition real, digits real, second real, second_reason text,
  solved_at text,
  unique (batch, hash)
) strict;

create table frame_parameter (
  version integer not null references frame_version, name text not null, number real, text text, quantity text not null,
  primary key (version, name)
) strict, without rowid;

create table result_state (
  version integer not null references frame_version, ordinal integer not null, name text not null,
  kind text not null check (kind in ('case','combination')), purpose text check (purpose in ('strength','service')),
  order_of integer not null check (order_of in (1, 2)), critical_load_factor real, packed blob not null,
  primary key (version, ordinal)
) strict, without rowid;

create table member_result (
  version integer not null references frame_version, result integer not null, member integer not null,
  n_max real not null, n_max_at real not null, n_min real not null, n_min_at real not null,
  v_max real not null, v_max_at real not null, v_min real not null, v_min_at real not null,
  m_max real not null, m_max_at real not null, m_min real not null, m_min_at real not null,
  deflection real not null, deflection_at real not null, ratio real, verdict integer check (verdict between 0 and 3),
  primary key (version, result, member)
) strict, without rowid;

create table revision_frame (
  revision integer not null references revision, frame integer not null, frame_id text not null,
  title text, group_name text not null, family text not null, count integer not null, note text,
  version integer references frame_version,
  status text not null check (status in ('stopped','waiting','solved','not solved')),
  verdict integer not null check (verdict between -1 and 3), ratio real not null, check_name text not null, subject text,
  section text not null, combination text not null, critical_load_factor real not null, mass real not null, reason text,
  uploaded_by integer references person, changed_by integer references person, run_by integer references person,
  primary key (revision, frame)
) strict, without rowid;
create index revision_frame_id on revision_frame (revision, frame_id);
create index revision_frame_version on revision_frame (version);
create index revision_frame_ratio on revision_frame (revision, ratio desc, frame);
create index revision_frame_verdict on revision_frame (revision, verdict desc, frame);
create index revision_frame_verdict_ratio on revision_frame (revision, verdict, ratio desc, frame);
create index revision_frame_group on revision_frame (revision, group_name, ratio desc, frame);
create index revision_frame_family on revision_frame (revision, family, ratio desc, frame);
create index revision_frame_check on revision_frame (revision, check_name, ratio desc, frame);
create index revision_frame_section on revision_frame (revision, section, ratio desc, frame);
create index revision_frame_combination on revision_frame (revision, combination, ratio desc, frame);
create index revision_frame_status on revision_frame (revision, status, frame);
create index revision_frame_critical on revision_frame (revision, critical_load_factor, frame);
create index revision_frame_mass on revision_frame (revision, mass desc, frame);
`;

const lists = `
create table member_row (
  revision integer not null references revision, frame integer not null, member integer not null, member_id text not null,
  role text not null, section text not null, group_name text not null, length real not null, combination text,
  n real, v real, m real, at real, deflection real, check_name text not null, ratio real not null,
  verdict integer not null check (verdict between 0 and 3),
  primary key (revision, frame, member)
) strict, without rowid;
create index member_row_ratio on member_row (revision, ratio desc, frame, member);
create index member_row_verdict on member_row (revision, verdict desc, frame, member);
create index member_row_verdict_ratio on member_row (revision, verdict, ratio desc, frame, member);
create index member_row_role on member_row (revision, role, frame, member);
create index member_row_role_ratio on member_row (revision, role, ratio desc, frame, member);
create index member_row_section on member_row (revision, section, frame, member);
create index member_row_section_ratio on member_row (revision, section, ratio desc, frame, member);
create index member_row_group on member_row (revision, group_name, frame, member);
create index member_row_group_ratio on member_row (revision, group_name, ratio desc, frame, member);
create index member_row_check on member_row (revision, check_name, frame, member);
create index member_row_check_ratio on member_row (revision, check_name, ratio desc, frame, member);

create table check_row (
  revision integer not null references revision, frame integer not null, ordinal integer not null, subject text,
  role text not null, section text not null, check_name text not null, combination text not null, at real, face text,
  value real, limit_value real, quantity text not null, ratio real not null,
  verdict integer not null check (verdict between 0 and 3), reason text, reference text not null,
  primary key (revision, frame, ordinal)
) strict, without rowid;
create index check_row_ratio on check_row (revision, ratio desc, frame, ordinal);
create index check_row_verdict on check_row (revision, verdict desc, frame, ordinal);
create index check_row_verdict_ratio on check_row (revision, verdict, ratio desc, frame, ordinal);
create index check_row_check on check_row (revision, check_name, frame, ordinal);
create index check_row_check_ratio on check_row (revision, check_name, ratio desc, frame, ordinal);
create index check_row_role on check_row (revision, role, ratio desc, frame, ordinal);
create index check_row_section on check_row (revision, section, ratio desc, frame, ordinal);
create index check_row_combination on check_row (revision, combination, ratio desc, frame, ordinal);

create table reaction_row (
  revision integer not null references revision, frame integer not null, result integer not null, support integer not null,
  node text not null, result_name text not null, kind integer not null check (kind in (0, 1)),
  fx real not null, fy real not null, mz real not null,
  primary key (revision, frame, result, support)
) strict, without rowid;
create index reaction_row_result on reaction_row (revision, result_name, frame, result, support);
create index reaction_row_fx on reaction_row (revision, fx desc, frame, result, support);
create index reaction_row_fy on reaction_row (revision, fy desc, frame, result, support);
create index reaction_row_mz on reaction_row (revision, mz desc, frame, result, support);

create table movement_row (
  revision integer not null references revision, frame integer not null, result integer not null, node_index integer not null,
  node text not null, place text not null, result_name text not null, kind integer not null check (kind in (0, 1)),
  ux real not null, uy real not null, rz real not null,
  primary key (revision, frame, result, node_index)
) strict, without rowid;
create index movement_row_result on movement_row (revision, result_name, frame, result, node_index);
create index movement_row_ux on movement_row (revision, ux desc, frame, result, node_index);
create index movement_row_uy on movement_row (revision, uy desc, frame, result, node_index);
create index movement_row_rz on movement_row (revision, rz desc, frame, result, node_index);

create table tally (
  revision integer not null references revision, list text not null check (list in ('members','checks','reactions','movements')),
  a text not null, b text not null, c text not null, d text not null, e text not null, rows integer not null,
  primary key (revision, list, a, b, c, d, e)
) strict, without rowid;
`;

const work = `
create table job (
  id integer primary key, kind text not null, office integer not null references office,
  revision integer references revision, person integer references person, payload text not null,
  state text not null check (state in ('queued','running','done','stopped','failed')),
  total integer not null default 0, done integer not null default 0,
  lease_by text, lease_until text, error text,
  created_at text not null, started_at text, finished_at text
) strict;
create index job_state on job (state, id);
create index job_revision on job (revision, id);
create unique index job_one_active on job (revision, kind) where state in ('queued','running');

create table activity (
  id integer primary key, office integer not null references office, project integer references project,
  batch integer references batch, revision integer references revision, person integer references person,
  what text not null, detail text not null, at text not null
) strict;
create index activity_office on activity (office, id);
create index activity_project on activity (project, id);
create trigger activity_is_not_changed before update on activity begin select raise(abort, 'Activity is only added to'); end;
create trigger activity_is_not_removed before delete on activity begin select raise(abort, 'Activity is only added to'); end;

create table outbox (
  id integer primary key, office integer not null references office, recipient text not null, kind text not null,
  payload text not null, state text not null check (state in ('waiting','sent','failed')), created_at text not null, sent_at text
) strict;
create index outbox_state on outbox (state, id);
`;

// A trigger's body holds a semicolon, so statements end at one that stands at the end of its line.
const statements = (text: string): string[] => text.split(/;\n/).filter((one) => one.trim() !== '');

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of [people, batches, results, lists, work].flatMap(statements)) await sql.raw(statement).execute(db);
}
