import { expect, it } from 'vitest';
import { wholeFrameReason } from './whole-frame';

const rows = [
  { check: 'stability', reason: 'needs It' },
  { check: 'sway', reason: 'no service combinations' },
];

it('leaves nothing where the rows of checks say all that was not checked', () => {
  expect(wholeFrameReason(null, [])).toBeNull();
  expect(wholeFrameReason('', rows)).toBeNull();
  expect(wholeFrameReason('stability: needs It; sway: no service combinations', rows)).toBeNull();
  expect(wholeFrameReason('stability: needs It', [...rows, ...rows])).toBeNull();
});

it('keeps what only the sheets say, and what stands behind a check that is over', () => {
  expect(wholeFrameReason('notes say: haunch left out; stability: needs It', rows)).toBe('notes say: haunch left out');
  expect(wholeFrameReason('stability: needs It; deflection: needs L', rows)).toBe('deflection: needs L');
  expect(wholeFrameReason('nothing to check', [])).toBe('nothing to check');
});
