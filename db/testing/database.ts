/** A real database for each test: migrated once, copied for every use. */
import { copyFileSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, afterEach } from 'vitest';
import { migrate } from '@/db/migrate';
import { type OpenDatabase, openDatabase } from '@/db/open';

const folder = mkdtempSync(path.join(tmpdir(), 'tallyframe-db-'));
const open: OpenDatabase[] = [];
let template: Promise<string> | undefined;
let used = 0;

async function makeTemplate(): Promise<string> {
  const file = path.join(folder, 'template.sqlite');
  const { db, raw, close } = openDatabase(file);
  await migrate(db);
  raw.pragma('wal_checkpoint(TRUNCATE)');
  await close();
  return file;
}

/** A new, empty, migrated database, closed after the test. */
export async function newDatabase(): Promise<OpenDatabase & { readonly file: string }> {
  template ??= makeTemplate();
  const file = path.join(folder, `${(used += 1)}.sqlite`);
  copyFileSync(await template, file);
  const database = openDatabase(file);
  open.push(database);
  return { ...database, file };
}

afterEach(async () => {
  for (const database of open.splice(0)) await database.close();
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));
