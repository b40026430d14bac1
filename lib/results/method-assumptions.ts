/** What the chosen method of analysis takes as given, beside what lib/analysis says of a frame. */
import { columnsOf } from '@/lib/analysis/imperfections/columns';
import { swayImperfection } from '@/lib/analysis/imperfections/sway-imperfection';
import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { ResultState } from '@/lib/results/result';

/** Of the settings alone, so the same for every frame of a batch. */
export function methodAssumptions(settings: Settings): string[] {
  const said: string[] = [];
  if (settings.analysis === 'second order' && settings.strengthCheck === 'elastic stress' && settings.stressFactor < 1)
    said.push(
      'second order: at the loads as given; the stress factor lowers the allowable stress and does not raise the loads, with which second-order effects grow',
    );
  if (settings.shearDeformation)
    said.push(
      'shear deformation: shear areas as typed (Av), else h·tw of I and channels, (5/6)·2·b·tf of turned ones, 2·h·t of rhs, A/2 of chs, 5A/6 of bars, 0.9A of round ones',
    );
  return said;
}

/**
 * Initial sway φ of a state with imperfections by EN 1993-1-1 5.3.2, from the first-order forces of its combination, as its
 * imperfection forces were worked out; null for other states, and where the frame has no load cases alone.
 */
export function initialSwayOf(
  frame: Frame,
  settings: Settings,
  states: readonly ResultState[],
  state: ResultState,
): number | null {
  if (settings.imperfections !== 'EN 1993-1-1' || !state.method?.notional) return null;
  const cases = states.filter(({ kind }) => kind === 'case');
  const columns = columnsOf(frame);
  if (cases.length !== frame.cases.length || columns.length === 0) return null;
  const forces = new Float64Array(6 * frame.members.length);
  cases.forEach(({ endForces }, c) => {
    const factor = state.factors[c] ?? 0;
    if (factor !== 0) for (let i = 0; i < forces.length; i++) forces[i] = forces[i]! + factor * endForces[i]!;
  });
  return swayImperfection(frame, columns, forces).phi;
}
