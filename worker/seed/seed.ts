/** Fills a new database with an invented office: people, projects, and batches brought in and run as an office would. */
import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, renameSync, rmSync } from 'node:fs';
import { basename, join } from 'node:path';
import { migrate } from '@/db/migrate';
import { openDatabase, type Db, type OpenDatabase } from '@/db/open';
import { insertActivity } from '@/db/queries/activity';
import { insertCombinationSet } from '@/db/queries/combination-sets';
import { insertBatch } from '@/db/queries/batches';
import { countOffices, insertOffice } from '@/db/queries/offices';
import { insertPerson } from '@/db/queries/people';
import { insertProject, updateAssigned } from '@/db/queries/projects';
import { findRevisionById, insertRevision } from '@/db/queries/revisions';
import { insertUpload } from '@/db/queries/uploads';
import { hashPassword } from '@/lib/access/password';
import { rulesOf } from '@/lib/combinations/office-set';
import { askForReading, askForRun } from '@/worker/ask';
import { createPools } from '@/worker/pools';
import { WorkQueue } from '@/worker/queue';
import { checkSeeded } from './check';
import { issueSeeded } from './issue';
import { insertOwnSeeded } from './own-parts';
import { seedOffice, seedPeople, type SeedPerson } from './people';
import { seedProjects } from './projects';

export { seedOffice, seedPeople } from './people';

/**
 * Seeds the database at `file` unless an office is there already, and settles when every batch has been read and run.
 * It is filled beside its place and moved there whole: a start that was cut short begins afresh.
 *
 * @param samples folder of the sample sheets   @param bundles folder of the threads' bundles
 * @returns false where the database was left as it is
 */
export async function seed(options: {
  readonly file: string;
  readonly samples: string;
  readonly bundles: string;
  readonly say?: (line: string) => void;
}): Promise<boolean> {
  if (await hasOffice(options.file)) return false;
  const part = `${options.file}.part`;
  removeDatabase(part);
  const database = openDatabase(part);
  await migrate(database.db);
  const pools = createPools(options.bundles);
  const faults: string[] = [];
  const log = (message: string): number => faults.push(message);
  const queue = new WorkQueue({ database, file: part, pools, log });
  try {
    await fill(database, queue, options.samples, options.say ?? (() => undefined));
  } finally {
    await queue.close();
    await pools.close();
    database.raw.pragma('wal_checkpoint(TRUNCATE)');
    await database.close();
  }
  if (faults.length > 0) throw new Error(`The office was not filled completely: ${faults.join('; ')}`);
  removeDatabase(options.file);
  renameSync(part, options.file);
  return true;
}

async function hasOffice(file: string): Promise<boolean> {
  if (!existsSync(file)) return false;
  const database = openDatabase(file);
  await migrate(database.db);
  const offices = await countOffices(database.db);
  await database.close();
  return offices > 0;
}

/** A database with what SQLite keeps beside it. */
function removeDatabase(file: string): void {
  for (const end of ['', '-wal', '-shm']) rmSync(`${file}${end}`, { force: true });
}

async function fill(database: OpenDatabase, queue: WorkQueue, samples: string, say: (line: string) => void): Promise<void> {
  const { db } = database;
  const office = await insertOffice(db, seedOffice);
  const people = new Map<SeedPerson['key'], number>();
  for (const { key, email, name, role, password } of seedPeople) {
    const person = await insertPerson(db, office, { email, name, role, passwordHash: await hashPassword(password) });
    if (person === undefined) throw new Error(`The address ${email} is taken`);
    people.set(key, person);
  }
  const idOf = (key: SeedPerson['key']): number => people.get(key)!;
  const basedOn = 'EN 1990 6.10, live B, snow to 1000 m, service characteristic';
  await insertCombinationSet(db, office, {
    name: 'Sheds, category B',
    basedOn,
    level: 'factored',
    together: false,
    rules: rulesOf(basedOn),
    provenance:
      'The recommended values of EN 1990, as the office uses them for sheds up to 1000 m. Invented for this demonstration.',
    person: idOf('lead'),
  });
  await insertOwnSeeded(db, office, idOf('lead'));
  for (const { name, number, client, batches } of seedProjects) {
    const lead = idOf('lead');
    const project = (await insertProject(db, office, { name, number, person: lead }))!;
    await insertActivity(db, office, { what: 'made the project', project, person: lead });
    await updateAssigned(db, office, project, [idOf(client)]);
    for (const { name: batchName, by, revisions } of batches) {
      const person = idOf(by);
      const batch = (await insertBatch(db, office, { project, name: batchName, person }))!;
      for (const { source, run, check, issues } of revisions) {
        const place = { office, project, batch, person };
        const revision = await bringIn(db, place, filesOf(join(samples, source)));
        await askForReading(queue, database, { office, revision, person });
        await queue.idle();
        if (run && (await askForRun(queue, database, { office, revision, person })))
          await insertActivity(db, office, { what: 'started the run', project, batch, revision, person });
        await queue.idle();
        const named = (key: SeedPerson['key']) => ({
          id: idOf(key),
          name: seedPeople.find((one) => one.key === key)?.name ?? '',
        });
        if (check !== undefined) {
          await checkSeeded(db, { office, revision, by: named(by), checker: named('checker'), how: check });
        }
        if (issues !== undefined) {
          const signing = { by: named(by), checker: named('checker'), lead: named('lead'), client: named(client) };
          await issueSeeded(database, queue, { office, revision, ...signing }, issues);
        }
        const done = await findRevisionById(db, office, revision);
        say(`${batchName}, revision ${done?.letter}: ${done?.frames} frames, ${done?.state}`);
      }
    }
  }
}

async function bringIn(
  db: Db,
  { office, project, batch, person }: { office: number; project: number; batch: number; person: number },
  files: readonly string[],
): Promise<number> {
  const { id: revision } = (await insertRevision(db, office, { batch, person }))!;
  for (const path of files) {
    const bytes = readFileSync(path);
    const sha256 = createHash('sha256').update(bytes).digest('hex');
    await insertUpload(db, office, { revision, name: basename(path), size: bytes.length, sha256, bytes, person });
  }
  await insertActivity(db, office, { what: 'brought sheets in', project, batch, revision, person });
  return revision;
}

/** A workbook, or every CSV of a folder. */
function filesOf(source: string): string[] {
  if (source.endsWith('.xlsx')) return [source];
  const names = readdirSync(source).filter((name) => name.endsWith('.csv'));
  return names.sort().map((name) => join(source, name));
}
