import { expect, it } from 'vitest';
import { pickedFrames } from '@/db/lists/picked';
import { newDatabase } from '@/db/testing/database';

it('holds the frames of a list, again after a transaction was taken back, and side by side with others', async () => {
  const { raw } = await newDatabase();
  const held = (frames: readonly number[]) =>
    raw
      .prepare<[], number>(`select frame from (${pickedFrames(raw, frames)}) where frame >= 0 order by frame`)
      .pluck()
      .all();
  const one = [2, 5, 9];
  raw.exec('begin');
  expect(held(one)).toEqual(one);
  raw.exec('rollback');
  expect(held(one)).toEqual(one);
  const many = Array.from({ length: 25 }, (_, i) => [i, 100 + i]);
  for (const frames of many) expect(held(frames)).toEqual(frames);
  expect(held(one)).toEqual(one);
  for (const frames of many.slice(-15)) expect(held(frames)).toEqual(frames);
  expect(held([])).toEqual([]);
});
