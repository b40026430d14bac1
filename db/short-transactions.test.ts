import { expect, it } from 'vitest';
import { inShortTransactions } from '@/db/short-transactions';
import { newDatabase } from '@/db/testing/database';

it('divides long work between items, and lets others write between', async () => {
  const { raw } = await newDatabase();
  raw.exec('create table done (item integer, transactions integer)');
  const insert = raw.prepare('insert into done values (?, ?)');
  let transactions = 0;
  const slow = (item: number) => {
    insert.run(item, transactions);
    const until = performance.now() + 12;
    while (performance.now() < until);
  };
  inShortTransactions(raw, [1, 2, 3, 4, 5, 6, 7, 8], slow, () => (transactions += 1));
  expect(transactions).toBeGreaterThan(1);
  expect(raw.prepare('select item from done order by item').pluck().all()).toEqual([1, 2, 3, 4, 5, 6, 7, 8]);
});

it('keeps the transactions before a fault and nothing of its own', async () => {
  const { raw } = await newDatabase();
  raw.exec('create table done (item integer)');
  const insert = raw.prepare('insert into done values (?)');
  const faulty = (item: number) => {
    insert.run(item);
    if (item === 2) throw new Error('broken');
  };
  expect(() => inShortTransactions(raw, [1, 2], faulty)).toThrow('broken');
  expect(raw.inTransaction).toBe(false);
  expect(raw.prepare('select count(*) from done').pluck().get()).toBe(0);
});

it('begins no transaction where there is nothing to do', async () => {
  const { raw } = await newDatabase();
  let ended = 0;
  inShortTransactions(raw, [], () => undefined, () => (ended += 1)); // prettier-ignore
  expect(ended).toBe(0);
});
