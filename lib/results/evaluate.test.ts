import { expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { defaultSettings } from '@/lib/model/settings';
import { cantileverFrame } from './cantilever-frame';
import { evaluateFrame } from './evaluate';

const options = { second: false, all: false };

it('a modulus of elasticity with a slipped exponent stops its frame with the member named, and nothing else', () => {
  const frame = cantileverFrame('F1', {
    materials: cantileverFrame('F1').materials.map((material) => ({ ...material, E_Pa: 1e200 })),
    nodeLoads: [{ case: 1, node: 1, Fx_N: -2000, Fy_N: 0, Mz_Nm: 0 }],
  });
  const { status, failure, verdict } = evaluateFrame(createAnalyser(), frame, defaultSettings, options);
  expect({ status, verdict }).toEqual({ status: 'not solved', verdict: 'not checked' });
  expect(failure?.message).toContain('Member AB: E, A and I');
});

it('a fault met with a frame is its failure, not an exception', () => {
  const broken = { analyse: () => { throw new RangeError('Maximum call stack size exceeded'); } }; // prettier-ignore
  const { status, verdict, notChecked } = evaluateFrame(broken, cantileverFrame('F1'), defaultSettings, options);
  expect({ status, verdict }).toEqual({ status: 'not solved', verdict: 'not checked' });
  expect(notChecked[0]).toContain('met a fault');
});
