import path from 'node:path';
import { expect, it } from 'vitest';
import { backUp } from '@/db/backup';
import { openDatabase } from '@/db/open';
import { listProjects } from '@/db/queries/projects';
import { newDatabase } from '@/db/testing/database';
import { office } from '@/db/testing/sample';

it('copies the open database to a file that opens by itself', async () => {
  const { db, raw, file } = await newDatabase();
  const own = await office(db, 'Northlight');
  const copy = path.join(path.dirname(file), 'copies', 'today.sqlite');
  await backUp(raw, copy);
  const opened = openDatabase(copy, { readonly: true });
  expect(await listProjects(opened.db, own.office)).toEqual(await listProjects(db, own.office));
  await expect(opened.db.deleteFrom('project').execute()).rejects.toThrow(/readonly/);
  await opened.close();
});

it('refuses to open for reading a file that is not there', async () => {
  const { file } = await newDatabase();
  expect(() => openDatabase(`${file}.missing`, { readonly: true })).toThrow();
});
