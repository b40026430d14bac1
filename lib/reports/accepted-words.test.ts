import { expect, it } from 'vitest';
import { cantileverFrame } from '@/lib/results/cantilever-frame';
import { acceptedWords, wholeFrameCheck } from './accepted-words';
import type { Acceptance } from './issue-cover';
import { flagsOf } from './workbook/frame-rows';

const accepted = (more: Partial<Acceptance>): Acceptance => ({
  frame: 'F1',
  subject: null,
  check: wholeFrameCheck,
  verdict: 'not checked',
  reason: 'The crane is gone.',
  by: { name: 'Che Cker', at: '2026-12-01T09:00:00.000Z' },
  ...more,
});
const words = 'accepted by Che Cker, 2026-12-01: The crane is gone.';

it('stands beside the check that it is about, and beside no other', () => {
  const of = acceptedWords([accepted({ subject: 'BC', check: 'stress', verdict: 'over' })]);
  const row = { frame: 'F1', subject: 'BC', check: 'stress', verdict: 'over' } as const;
  expect(of(row)).toBe(words);
  const others = [{ frame: 'F2' }, { subject: 'CD' }, { check: 'sway' }, { check: '' }, { verdict: 'not checked' }] as const;
  for (const other of others) expect(of({ ...row, ...other })).toBeNull();
});

it('of the frame as a whole stands beside the rows that name no check', () => {
  const each = { number: 1, id: 'F1', title: null, group: null, count: 1, note: null };
  const of = acceptedWords([accepted({})]);
  const frame = cantileverFrame('F1', { notChecked: ['torsion: loads out of plane'] });
  const rows = (id: string) => flagsOf({ ...each, id, frame, evaluation: null }, of).map(({ row }) => row);
  expect(rows('F1')).toEqual([['not checked', null, 'F1', 'F1', '', '', 'not run', words]]);
  expect(rows('F2')[0]?.at(-1)).toBeNull();
  expect(of({ frame: 'F1', subject: 'BC', check: 'stress', verdict: 'not checked' }), 'nor beside a check').toBeNull();
});
