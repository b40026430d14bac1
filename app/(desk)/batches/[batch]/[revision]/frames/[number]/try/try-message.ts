import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { TriedSection } from '@/lib/sizing/taken-by';
import type { TryTold } from '@/lib/sizing/try-sections';

/** What the page asks of the worker. */
export interface TryAsked {
  readonly id: number;
  readonly frame: Frame;
  readonly settings: Settings;
  readonly tried: readonly TriedSection[];
  /** Case or combination to draw; null = the governing one. */
  readonly show: string | null;
}

export type TryAnswer = { readonly id: number } & (
  | { readonly told: TryTold }
  /** Why it cannot be tried, or the fault that was met, as a sentence. */
  | { readonly refused: string }
);
