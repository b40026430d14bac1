import { mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { expect, it } from 'vitest';
import { migrate } from '@/db/migrate';
import { openDatabase } from '@/db/open';

it('brings an empty file up to date, and leaves one that is up to date alone', async () => {
  const folder = mkdtempSync(path.join(tmpdir(), 'tallyframe-db-'));
  const { db, raw, close } = openDatabase(path.join(folder, 'new', 'one.sqlite'));
  // every migration of the folder is registered
  const files = readdirSync(path.join(import.meta.dirname, 'migrations')).map((name) => name.replace(/\.ts$/, ''));
  expect(await migrate(db)).toEqual(files.sort());
  expect(await migrate(db)).toEqual([]);
  expect(raw.pragma('journal_mode', { simple: true })).toBe('wal');
  expect(raw.pragma('foreign_keys', { simple: true })).toBe(1);
  const tables = raw
    .prepare("select name from pragma_table_list where type = 'table' and schema = 'main' and strict = 0")
    .pluck()
    .all();
  expect(tables.filter((name) => !/^(sqlite_|kysely_)/.test(String(name)))).toEqual([]);
  await close();
  rmSync(folder, { recursive: true });
});
