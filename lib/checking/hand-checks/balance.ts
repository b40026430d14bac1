import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { statesByHand, typedLoads } from './typed-loads';

export type Agreement = 'agrees' | 'differs';

export interface Sums {
  readonly H: number;
  readonly V: number;
  /** About the place named, anticlockwise. */
  readonly M: number;
}

export interface Balance {
  readonly result: string;
  readonly loads: Sums;
  readonly reactions: Sums;
  readonly agreement: Agreement;
}

/** What is left over beside the sizes that were added up: far above rounding, far below any slip. */
const tolerance = 1e-6;

/**
 * ΣH, ΣV and ΣM of the loads as typed against those of the stored reactions, for each load case (first order: forces act where
 * the frame was drawn). They agree where each pair cancels within 1e-6 of the sizes added up.
 *
 * @returns `about`: id of the node about which moments are taken, the first support's; N and N·m
 */
export function balanceByHand(frame: Frame, states: readonly ResultState[]): { about: string | null; lines: Balance[] } {
  const first = frame.supports[0];
  const origin = first ? frame.nodes[first.node]! : null;
  if (!origin) return { about: null, lines: [] };
  const lines = statesByHand(states).map((state): Balance => {
    const loads = typedLoads(frame, state).map(({ fx, fy, m, x, y }) => ({ fx, fy, m, x, y }));
    const reactions = frame.supports.map(({ node }, i) => {
      const { x_m: x, y_m: y } = frame.nodes[node]!;
      return { fx: state.reactions[3 * i]!, fy: state.reactions[3 * i + 1]!, m: state.reactions[3 * i + 2]!, x, y };
    });
    const [a, b] = [sums(loads, origin), sums(reactions, origin)];
    const reach = Math.max(...frame.nodes.map(({ x_m, y_m }) => Math.hypot(x_m - origin.x_m, y_m - origin.y_m)), 1e-9);
    // a moment without a lever is judged against the forces over the frame's reach, and the other way round
    const size = Math.max(a.sizeF + b.sizeF, (a.sizeM + b.sizeM) / reach);
    const within = (left: number, scale: number): boolean => Math.abs(left) <= tolerance * scale;
    const agrees = within(a.H + b.H, size) && within(a.V + b.V, size) && within(a.M + b.M, size * reach) && Number.isFinite(size);
    const only = ({ H, V, M }: Sums): Sums => ({ H, V, M });
    return { result: state.name, loads: only(a), reactions: only(b), agreement: agrees ? 'agrees' : 'differs' };
  });
  return { about: origin.id, lines };
}

interface Force {
  readonly fx: number;
  readonly fy: number;
  readonly m: number;
  readonly x: number;
  readonly y: number;
}

function sums(forces: readonly Force[], { x_m, y_m }: { x_m: number; y_m: number }) {
  const sum = { H: 0, V: 0, M: 0, sizeF: 0, sizeM: 0 };
  for (const { fx, fy, m, x, y } of forces) {
    const [up, across] = [(x - x_m) * fy, (y - y_m) * fx];
    sum.H += fx;
    sum.V += fy;
    sum.M += m + up - across;
    sum.sizeF += Math.abs(fx) + Math.abs(fy);
    sum.sizeM += Math.abs(m) + Math.abs(up) + Math.abs(across);
  }
  return sum;
}
