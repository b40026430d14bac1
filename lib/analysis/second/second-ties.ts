import type { Acting } from './second-loads';
import type { Given, Setup } from './second-setup';
import type { SecondState } from './second-state';

/** Share of the largest axial force that counts as none. */
const none = 1e-7;

/**
 * Whether every slack tie would be pushed if it were there, and every other tie is pulled: EA (Δ/L − ε₀), Δ how far its
 * nodes have moved apart along it.
 */
export function tiesStand({ members }: Setup, given: Given, acting: readonly Acting[], state: SecondState): boolean {
  const d = state.displacements;
  let most = 0;
  members.forEach((_, i) => (most = Math.max(most, Math.abs(state.endForces[6 * i]!), Math.abs(state.endForces[6 * i + 3]!))));
  return members.every(({ tensionOnly, start, end, ex, ey, L, EA }, i) => {
    if (!tensionOnly) return !given.slack.has(i);
    const apart = ex * (d[3 * end]! - d[3 * start]!) + ey * (d[3 * end + 1]! - d[3 * start + 1]!);
    const force = EA * (given.stiffness ? given.stiffness[2 * i]! : 1) * (apart / L - acting[i]!.strain);
    return given.slack.has(i) ? force <= none * most : force >= -none * most;
  });
}
