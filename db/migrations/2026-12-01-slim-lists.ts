/**
 * What a solved frame costs to keep, made less. Extremes of members stand in their state's blob; lists of reactions and
 * movements are ordered by way of a row a frame or a row a result in place of four indexes over every row. Frozen.
 */
import { type Kysely, sql } from 'kysely';

const peaks = ['fx', 'fy', 'mz', 'ux', 'uy', 'rz'];
const columns = peaks.flatMap((one) => [`${one}_max`, `${one}_min`]);
const largest = (list: string[], t: string) => list.flatMap((one) => [`max(${t}.${one})`, `min(${t}.${one})`]).join(', ');

const statements = [
  'drop table member_result',
  // with a row id, a state of some 2 kB lies in its page and not beside it
  `create table state_kept (
     version integer not null references frame_version, ordinal integer not null, name text not null,
     kind text not null check (kind in ('case','combination')), purpose text check (purpose in ('strength','service')),
     order_of integer not null check (order_of in (1, 2)), critical_load_factor real, packed blob not null,
     unique (version, ordinal)
   ) strict`,
  'insert into state_kept select * from result_state order by version, ordinal',
  'drop table result_state',
  'alter table state_kept rename to result_state',
  ...['result', 'fx', 'fy', 'mz'].map((one) => `drop index reaction_row_${one}`),
  ...['result', 'ux', 'uy', 'rz'].map((one) => `drop index movement_row_${one}`),
  `create table frame_result (
     revision integer not null references revision, result_name text not null, frame integer not null, result integer not null,
     primary key (revision, result_name, frame, result)
   ) strict, without rowid`,
  `insert into frame_result select distinct revision, result_name, frame, result from movement_row`,
  `create table frame_peak (
     revision integer not null references revision, frame integer not null,
     ${columns.map((one) => `${one} real not null`).join(', ')},
     primary key (revision, frame)
   ) strict, without rowid`,
  `insert into frame_peak
     select r.revision, r.frame, ${largest(['fx', 'fy', 'mz'], 'r')},
       (select max(ux) from movement_row m where m.revision = r.revision and m.frame = r.frame),
       (select min(ux) from movement_row m where m.revision = r.revision and m.frame = r.frame),
       (select max(uy) from movement_row m where m.revision = r.revision and m.frame = r.frame),
       (select min(uy) from movement_row m where m.revision = r.revision and m.frame = r.frame),
       (select max(rz) from movement_row m where m.revision = r.revision and m.frame = r.frame),
       (select min(rz) from movement_row m where m.revision = r.revision and m.frame = r.frame)
     from reaction_row r group by r.revision, r.frame`,
  ...peaks.flatMap((one) => [
    `create index frame_peak_${one}_max on frame_peak (revision, ${one}_max desc, frame)`,
    `create index frame_peak_${one}_min on frame_peak (revision, ${one}_min, frame)`,
  ]),
];

export async function up(db: Kysely<unknown>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db);
}
