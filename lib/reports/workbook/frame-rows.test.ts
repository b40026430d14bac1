import { expect, it } from 'vitest';
import type { FrameEvaluation } from '@/lib/results/result';
import { cantileverFrame } from '@/lib/results/cantilever-frame';
import { frameRow } from './frame-rows';

const evaluation = (reasons: number): FrameEvaluation => ({
  status: 'solved',
  failure: null,
  verdict: 'not checked',
  governing: null,
  notChecked: Array.from({ length: reasons }, (_, i) => `column C${i + 1}: buckling not negligible`),
  assumptions: [],
  mass: null,
  states: [],
  checks: [],
  allChecks: null,
  certificate: null,
});

it('the Frames sheet names the first reasons of a frame that is not checked and how many more there are', () => {
  const frame = cantileverFrame('F1');
  const cell = (reasons: number): string =>
    String(
      frameRow({ number: 1, id: 'F1', title: null, group: null, count: 1, note: null, frame, evaluation: evaluation(reasons) }, 'metric')
        .find((one) => typeof one === 'string' && one.startsWith('column C1')),
    ); // prettier-ignore
  expect(cell(40).split('; ')).toHaveLength(40);
  expect(cell(493)).toMatch(/C40: buckling not negligible; and 453 more, see Flags$/);
});
