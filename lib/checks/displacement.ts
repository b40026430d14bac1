import type { Frame, Limit } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { ResultState } from '@/lib/results/result';
import { keepGoverning, type Findings } from './check-row';
import { limitsOf, nodesNamed } from './limits';
import { checkMovement } from './movement';

type Direction = NonNullable<Limit['direction']>;

/** Displacement of the nodes that Limits name, in every service combination; without a direction: the resultant. */
export function checkDisplacement(frame: Frame, settings: Settings, states: readonly ResultState[], findings: Findings): void {
  const given = limitsOf(frame, 'displacement');
  if (given.length === 0) return;
  const named = given.map((limit) => new Set(nodesNamed(limit, frame)));
  for (let node = 0; node < frame.nodes.length; node++) {
    const mine = given.filter((_, i) => named[i]!.has(node));
    // limits in x and in y on one node both apply; the worse governs the node
    const directions = [...new Set(mine.map(directionOf))];
    const found: Findings = { ...findings, checks: [], all: [], notChecked: new Set() };
    for (const direction of directions) {
      const limits = mine.filter((limit) => directionOf(limit) === direction);
      const measured = (c: number) => ({ value: displaced(states[c]!, node, direction), at: null });
      const inputs = (c: number) => ({
        direction,
        ux: states[c]!.displacements[3 * node]!,
        uy: states[c]!.displacements[3 * node + 1]!,
      });
      const subject = {
        subjectKind: 'node',
        subject: frame.nodes[node]!.id,
        check: 'displacement',
        quantity: 'displacement',
        reference: 'Limits',
        member: null,
      } as const;
      checkMovement(subject, 'displacement', limits, 0, settings, states, measured, inputs, found);
    }
    keepGoverning(findings, found.all ?? []);
  }
}

const directionOf = (limit: Limit): Direction => limit.direction ?? 'resultant';

function displaced(state: ResultState, node: number, direction: Direction): number {
  const ux = state.displacements[3 * node]!;
  const uy = state.displacements[3 * node + 1]!;
  return direction === 'x' ? Math.abs(ux) : direction === 'y' ? Math.abs(uy) : Math.hypot(ux, uy);
}
