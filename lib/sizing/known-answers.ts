import type { FrameAnswer } from '@/lib/sizing/sizing';

/** A candidate's place for each group; `asItIs` = its members keep what they have. */
export type Choice = readonly number[];
export const asItIs = -1;

const outcomes = ['fits', 'not checked', 'over', 'not solved'] as const satisfies readonly FrameAnswer['outcome'][];
const unknown = 255;

interface Column {
  readonly outcome: Uint8Array;
  /** NaN = none. */
  readonly ratio: Float64Array;
  readonly governs: Int32Array;
}

/**
 * What frames have said of choices so far. A choice of sections for a group of which a frame has no member is nothing to that
 * frame, so it is known whatever that group takes. Some 13 bytes an answer: a million of them fit.
 */
export class KnownAnswers {
  private readonly columns = new Map<string, Column>();
  private readonly words: string[] = [];
  private readonly places = new Map<string, number>();
  /** By choice and mask: answers are asked for by the million. */
  private readonly keys = new WeakMap<Choice, string[]>();

  /** @param masks by frame: bit g is set where it has members of group g */
  constructor(private readonly masks: Uint8Array) {}

  /** What a frame says of a choice; null = it was not asked yet. */
  get(choice: Choice, frame: number): FrameAnswer | null {
    const column = this.columns.get(this.keyOf(choice, frame));
    const outcome = column?.outcome[frame] ?? unknown;
    if (!column || outcome === unknown) return null;
    const ratio = column.ratio[frame] ?? NaN;
    return {
      outcome: outcomes[outcome] ?? 'not solved',
      ratio: Number.isNaN(ratio) ? null : ratio,
      governs: this.words[column.governs[frame] ?? -1] ?? '',
    };
  }

  put(choice: Choice, frame: number, { outcome, ratio, governs }: FrameAnswer): void {
    const key = this.keyOf(choice, frame);
    let column = this.columns.get(key);
    if (!column) {
      const frames = this.masks.length;
      column = {
        outcome: new Uint8Array(frames).fill(unknown),
        ratio: new Float64Array(frames).fill(NaN),
        governs: new Int32Array(frames).fill(-1),
      };
      this.columns.set(key, column);
    }
    column.outcome[frame] = outcomes.indexOf(outcome);
    column.ratio[frame] = ratio ?? NaN;
    let place = this.places.get(governs);
    if (place === undefined) this.places.set(governs, (place = this.words.push(governs) - 1));
    column.governs[frame] = place;
  }

  private keyOf(choice: Choice, frame: number): string {
    const mask = this.masks[frame];
    if (mask === undefined) throw new RangeError(`Expected a frame below ${this.masks.length}, got ${frame}`);
    let keys = this.keys.get(choice);
    if (!keys) this.keys.set(choice, (keys = []));
    return (keys[mask] ??= choice.map((c, g) => (mask & (1 << g) ? c : '')).join());
  }
}
