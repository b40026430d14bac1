/** The whole chain in this process, as the threads do it: read, validate, solve, recover, check, store, write. */
import { join } from 'node:path';
import { PassThrough } from 'node:stream';
import { migrate } from '@/db/migrate';
import { openDatabase } from '@/db/open';
import { insertBatch } from '@/db/queries/batches';
import { insertIntake } from '@/db/queries/intake';
import { insertJob } from '@/db/queries/jobs';
import { insertOffice } from '@/db/queries/offices';
import { insertPerson } from '@/db/queries/people';
import { insertProject } from '@/db/queries/projects';
import { insertRevision } from '@/db/queries/revisions';
import { listVersions } from '@/db/queries/waiting';
import { readIntake } from '@/lib/intake/read-intake';
import { reportSheets } from '@/lib/reports/workbook/report-sheets';
import { writeXlsx } from '@/lib/reports/workbook/write-xlsx';
import { secondSample } from '@/lib/results/second-sample';
import { revisionSource } from '@/worker/threads/revision-source';
import { solveChunk } from '@/worker/threads/solve';
import { chunkSize } from '@/worker/run-work';

export type BareSheets = { readonly name: string; readonly rows: (string | number | null)[][] }[];
export type StageSeconds = Record<string, number>;

let runs = 0;

const cpu = (): number => {
  const { user, system } = process.cpuUsage();
  return (user + system) / 1e6;
};

/**
 * @param collect gives back every row of the workbook as well, to be written bare
 * @param stages filled with CPU seconds by stage, where given
 */
export async function storedChain(
  bytes: Uint8Array,
  folder: string,
  collect: boolean,
  stages: StageSeconds = {},
): Promise<BareSheets> {
  runs += 1;
  const file = join(folder, `chain-${runs}.sqlite`);
  const database = openDatabase(file);
  const { db, raw } = database;
  await migrate(db);
  let since = cpu();
  const lap = (stage: string): void => {
    const now = cpu();
    stages[stage] = (stages[stage] ?? 0) + now - since;
    since = now;
  };
  const office = await insertOffice(db, 'Bench');
  const person =
    (await insertPerson(db, office, { email: 'a@bench.example', name: 'A', role: 'analyst', passwordHash: '-' })) ?? 0;
  const project = (await insertProject(db, office, { name: 'P', number: null, person })) ?? 0;
  const batch = (await insertBatch(db, office, { project, name: 'B', person })) ?? 0;
  const revision = (await insertRevision(db, office, { batch, person }))?.id ?? 0;
  lap('set up');
  const intake = await readIntake([{ name: 'portals.xlsx', bytes }]);
  lap('read and validate');
  insertIntake(raw, office, revision, intake);
  lap('store the input');
  const job = (await insertJob(db, office, { kind: 'run', revision, person })) ?? 0;
  const versions = listVersions(raw, revision);
  const sample = secondSample(versions.map((each) => each.hash));
  const second = new Set(versions.filter((each) => sample.has(each.hash)).map((each) => each.version));
  for (let from = 0; from < versions.length; from += chunkSize) {
    const part = versions.slice(from, from + chunkSize).map((each) => each.version);
    solveChunk({ file, job, revision, versions: part, settings: intake.settings, second, person });
  }
  lap('solve, recover, check, store');
  const sink = new PassThrough();
  sink.resume();
  const sheets = await reportSheets(await revisionSource(database, office, revision));
  await writeXlsx(sheets, sink);
  lap('write');
  const kept: BareSheets = [];
  if (collect) {
    for (const sheet of sheets) {
      const rows: (string | number | null)[][] = [sheet.columns.map(({ heading }) => heading)];
      for await (const row of sheet.rows()) rows.push([...row]);
      kept.push({ name: sheet.name, rows });
    }
  }
  await database.close();
  return kept;
}
