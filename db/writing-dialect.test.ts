import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { expect, it } from 'vitest';
import { migrate } from '@/db/migrate';
import { openDatabase } from '@/db/open';

it('a transaction that reads before it writes stands, whatever another thread wrote meanwhile', async () => {
  const folder = mkdtempSync(path.join(tmpdir(), 'tallyframe-db-'));
  const file = path.join(folder, 'one.sqlite');
  const one = openDatabase(file);
  await migrate(one.db);
  const other = openDatabase(file);
  other.raw.pragma('busy_timeout = 50');
  let refused = '';
  await one.db.transaction().execute(async (within) => {
    expect(await within.selectFrom('office').select('id').execute()).toEqual([]);
    try {
      other.raw.prepare("insert into office (name, created_at) values ('South', '2026-12-01')").run();
    } catch (cause) {
      refused = (cause as { code?: string }).code ?? '';
    }
    await within.insertInto('office').values({ name: 'North', created_at: '2026-12-01' }).execute();
  });
  expect(refused).toBe('SQLITE_BUSY');
  other.raw.prepare("insert into office (name, created_at) values ('South', '2026-12-01')").run();
  expect(await one.db.selectFrom('office').select('name').orderBy('id').execute()).toEqual([
    { name: 'North' },
    { name: 'South' },
  ]);
  await one.close();
  await other.close();
  rmSync(folder, { recursive: true });
});
