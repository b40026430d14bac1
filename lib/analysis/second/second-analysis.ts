import type { Frame } from '@/lib/model/frame';
import { firstOrderStates } from './first-order';
import { setUp } from './second-setup';
import type { SecondState } from './second-state';

/**
 * The second, independent analysis (engine, Certificate 3) of a frame's load cases, first order.
 *
 * @param shear whether members shear as well as bend   @returns a state for each case; null where the equations are singular
 */
export function secondAnalysis(frame: Frame, shear = false): SecondState[] | null {
  const unit = (c: number): number[] => frame.cases.map((_, i) => (i === c ? 1 : 0));
  return firstOrderStates(
    setUp(frame, shear),
    frame.cases.map((_, c) => unit(c)),
  );
}
