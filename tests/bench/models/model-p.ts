import { readIntake } from '@/lib/intake/read-intake';
import type { Combination, Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import { portalWorkbook } from '../portals';
import { shuffled } from './shuffled';

/** Factors on dead, snow, live, wind, wind 2: nine strength combinations, three service ones. */
const strength = [
  [1, 1, 0, 0, 0], [1, 0, 1, 0, 0], [1, 0, 0, 1, 0], [1, 0, 0, 0, 1], [1, 0.75, 0, 0.75, 0],
  [1, 0.75, 0, 0, 0.75], [1, 0, 0.75, 0.75, 0], [0.6, 0, 0, 1, 0], [0.6, 0, 0, 0, 1],
] as const; // prettier-ignore
const service = [[1, 1, 0, 0, 0], [1, 0, 0, 1, 0], [1, 0.5, 0, 0, 0.5]] as const; // prettier-ignore

function combination(name: string, purpose: Combination['purpose'], factors: readonly number[]): Combination {
  return { name, purpose, terms: factors.flatMap((factor, index) => (factor === 0 ? [] : { case: index, factor })) };
}

/** P: pitched portals of `portals.ts` with twelve combinations, and what their workbook says of how they are checked. */
export async function modelP(count: number): Promise<{ frames: Frame[]; settings: Settings }> {
  const { frames, settings } = await readIntake([{ name: 'portals.xlsx', bytes: await portalWorkbook(count) }]);
  const combinations = [
    ...strength.map((factors, i) => combination(`C${i + 1}`, 'strength', factors)),
    ...service.map((factors, i) => combination(`S${i + 1}`, 'service', factors)),
  ];
  return { settings, frames: frames.flatMap(({ frame }) => (frame ? shuffled({ ...frame, combinations }) : [])) };
}
