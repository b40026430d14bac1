import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { balanceByHand, type Balance } from './balance';
import { spansByHand, type SpanIdentity, type SpanLeftOut } from './span-identity';
import { swayByHand, type SwayBounds, type SwayLeftOut } from './sway-bounds';

/** What a checker works out beside the results of a frame, SI; made anew from the sheets' loads and the stored results. */
export interface HandChecks {
  /** Node about which moments are taken; null where there is no support. */
  readonly about: string | null;
  readonly balance: readonly Balance[];
  readonly spans: readonly SpanIdentity[];
  readonly spansLeftOut: readonly SpanLeftOut[];
  readonly sway: readonly SwayBounds[];
  readonly swayLeftOut: readonly SwayLeftOut[];
  /** Why there is none of it; null = there is. */
  readonly none: string | null;
}

/** @param states the stored results of the frame; [] where it was not solved */
export function handChecks(frame: Frame, states: readonly ResultState[]): HandChecks {
  const { about, lines: balance } = balanceByHand(frame, states);
  const { lines: spans, leftOut: spansLeftOut } = spansByHand(frame, states);
  const { lines: sway, leftOut: swayLeftOut } = swayByHand(frame, states);
  const none =
    states.length === 0
      ? 'The frame has no results.'
      : balance.length === 0
        ? 'Every result of this frame is of second order: forces act on the moved shape, so sums on the drawn shape do not hold.'
        : null;
  return { about, balance, spans, spansLeftOut, sway, swayLeftOut, none };
}
