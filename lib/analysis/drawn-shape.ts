import type { SetJob, SetState } from './analyse-set';
import type { StateTrouble } from './failures';
import { turnOf } from './large-turns';
import { memberDataFor } from './member-data';
import { lengthenedState } from './second-order/lengthened-state';

/**
 * Shares above which the drawn shape does not hold: of a member's outermost strain where it grows, of its axial or bending
 * strain against that either way, of the largest movement where it grows. No clause gives them: EN 1993-1-1 5.2.1(2) speaks of
 * deformations that significantly modify the structural behaviour, and 5.2.1(3) neglects what comes to about a tenth.
 */
const mostGrowth = 0.05;
const mostChange = 0.1;
/** What the estimate must come to for a closer look. It falls short of the truth, at these shares by less than half. */
const suspect = { forces: 0.02, movements: 0.04 };

/**
 * Whether a second-order state changes so much with the lengthening of its turned members, which the analysis leaves out, that
 * it is no state; null where it holds. README §8.
 */
export function shapeTrouble(job: SetJob, { state, lengthening }: SetState): StateTrouble | null {
  const { frame, t, solved, space } = job;
  if (lengthening.forces <= suspect.forces && lengthening.movements <= suspect.movements) return null;
  const { method, factors, displacements } = state;
  const data = memberDataFor(frame, method);
  const slack = method?.slack ?? [];
  const { growth, change, movements, member } = lengthenedState(
    {
      frame,
      t,
      angles: solved.angles,
      data,
      slack: slack.length > 0 ? Uint8Array.from(frame.members, (_, i) => (slack.includes(i) ? 1 : 0)) : null,
      factors,
      loadScale: method?.loadScale ?? 1,
      notional: method?.notional ?? null,
      guess: null,
      space,
    },
    state,
  );
  if (growth <= mostGrowth && change <= mostChange && movements <= mostChange) return null;
  const scale = method?.loadScale ?? 1;
  const turns = data.map((m) => scale * turnOf(m, displacements));
  const turn = Math.max(...turns);
  const forces = Math.max(growth > mostGrowth ? growth : 0, change > mostChange ? change : 0);
  return { kind: 'drawn shape', turned: turns.indexOf(turn), turn, member, forces, movements };
}
