/** A thread of the threads.2.1 measurement: evaluates portals out of one workbook read once, stores nothing. */
import { createAnalyser } from '@/lib/analysis/analyser';
import { readIntake } from '@/lib/intake/read-intake';
import type { Intake } from '@/lib/intake/intake';
import { evaluateFrame } from '@/lib/results/evaluate';

let intake: Promise<Intake> | null = null;
const analyser = createAnalyser();

export interface SolveRange {
  readonly bytes: Uint8Array;
  readonly from: number;
  readonly to: number;
}

/** @returns how many were solved, so that the work cannot be left out */
export default async function solveRange({ bytes, from, to }: SolveRange): Promise<number> {
  intake ??= readIntake([{ name: 'portals.xlsx', bytes }]);
  const { frames, settings } = await intake;
  let solved = 0;
  for (let index = from; index < to; index += 1) {
    const frame = frames[index % frames.length]?.frame;
    if (frame && evaluateFrame(analyser, frame, settings, { second: false, all: false }).status === 'solved') solved += 1;
  }
  return solved;
}
