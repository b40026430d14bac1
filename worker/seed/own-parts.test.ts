import { expect, it } from 'vitest';
import { listOwnThings } from '@/db/queries/own-parts';
import { newDatabase } from '@/db/testing/database';
import { office } from '@/db/testing/sample';
import { insertOwnSeeded } from './own-parts';

it('the invented office keeps sections and a grade of its own, one of them in its second version', async () => {
  const { db } = await newDatabase();
  const own = await office(db, 'Northlight');
  await insertOwnSeeded(db, own.office, own.person);
  expect((await listOwnThings(db, own.office)).map(({ name, version }) => [name, version])).toEqual([
    ['PG 620', 2],
    ['Box 180x120', 1],
    ['Mill 420', 1],
  ]);
});
