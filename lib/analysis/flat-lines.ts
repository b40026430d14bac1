import type { Frame } from '@/lib/model/frame';
import type { MemberLine, ResultState } from '@/lib/results/result';
import { evenLineNumbers, hasEvenLines, writeEvenLines } from './even-lines';
import { evenStretches } from './even-stretches';
import { flattened, headNumbers, segmentNumbers } from './flat-line';
import { writeMemberLine } from './member-line';

type LineOf = (state: ResultState, member: number) => MemberLine;

/** Memory that the last lines to be forgotten left for the next ones; what is longer is not kept. */
let spare: Float64Array | null = null;
const longestSpare = 2 ** 18;
const shortest = 2 ** 12;

/**
 * Exact lines of a frame's members in every state as rows of numbers (flat-line.ts), each worked out when first asked for and
 * kept as long as this is, or until it is told to forget them.
 */
export class FlatLines {
  numbers: Float64Array = new Float64Array(0);
  private used = 0;
  private readonly known = new Map<ResultState, StateLines>();

  /** @param given where the lines come from; null = from here */
  constructor(
    private readonly frame: Frame,
    private readonly given: LineOf | null = null,
  ) {}

  of(state: ResultState): StateLines {
    let lines = this.known.get(state);
    if (!lines) this.known.set(state, (lines = new StateLines(this, state, this.frame.members.length)));
    return lines;
  }

  /** Leaves its memory to the lines of the next frame; what is asked for afterwards is worked out again. */
  forget(): void {
    if (this.numbers.length > 0 && this.numbers.length <= longestSpare) spare = this.numbers;
    this.numbers = new Float64Array(0);
    this.used = 0;
    for (const lines of this.known.values()) lines.forget();
  }

  /** Room for one more line of so many segments. @returns where it begins */
  room(segments: number): number {
    return this.roomFor(headNumbers + segments * segmentNumbers);
  }

  private roomFor(numbers: number): number {
    const more = this.used + numbers;
    if (more > this.numbers.length) {
      let longer = spare;
      spare = null;
      if (longer === null || longer.length < more) longer = new Float64Array(Math.max(shortest, 2 * more));
      longer.set(this.numbers.subarray(0, this.used));
      this.numbers = longer;
    }
    return this.used;
  }

  /**
   * Works out a line; with that of an even member to first order those of all even members of the state, which costs little more.
   * @param begins by member, where its line in this state begins; −1 = not worked out
   * @returns where it begins
   */
  add(state: ResultState, member: number, begins: number[]): number {
    if (this.given === null && hasEvenLines(state)) {
      const stretches = evenStretches(this.frame);
      if (stretches.even[member]) {
        const more = stretches.count * evenLineNumbers;
        const at = this.roomFor(more);
        writeEvenLines(this.frame, state, stretches, this.numbers, at, begins);
        this.used += more;
        return begins[member]!;
      }
    }
    return (begins[member] = this.addOne(state, member));
  }

  private addOne(state: ResultState, member: number): number {
    const at = this.used;
    if (this.given) {
      const row = flattened(this.given(state, member));
      const begin = this.room((row.length - headNumbers) / segmentNumbers);
      this.numbers.set(row, begin);
    } else writeMemberLine(this.frame, state, member, this);
    this.used = at + headNumbers + this.numbers[at]! * segmentNumbers;
    return at;
  }
}

/** The lines of one state. */
export class StateLines {
  private readonly begins: number[];

  constructor(
    private readonly all: FlatLines,
    private readonly state: ResultState,
    members: number,
  ) {
    this.begins = new Array<number>(members).fill(-1);
  }

  get numbers(): Float64Array {
    return this.all.numbers;
  }

  /** Where in `numbers` a member's line begins; `numbers` is to be looked up again after it. */
  at(member: number): number {
    const known = this.begins[member]!;
    return known >= 0 ? known : this.all.add(this.state, member, this.begins);
  }

  forget(): void {
    this.begins.fill(-1);
  }
}
