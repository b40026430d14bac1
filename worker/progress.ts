/** How far a run is: what pages show while it goes on. Counts are the database's, rate and last frames are kept in memory. */
import type { EventEmitter } from 'node:events';
import type { SolvedFrame } from '@/worker/threads/solve';

export interface RunProgress {
  readonly revision: number;
  /** Null: no run of this revision is queued or going on. */
  readonly state: 'queued' | 'running' | 'stopping' | null;
  /** Different frames to be solved, and those that are (earlier runs' and carried-over ones included). */
  readonly total: number;
  readonly done: number;
  /** Frames a second over the last seconds; null until known. */
  readonly rate: number | null;
  readonly secondsLeft: number | null;
  /** Different frames that a thread has in hand now. */
  readonly inHand: readonly number[];
  /** The frames solved last, newest first. */
  readonly last: readonly Omit<SolvedFrame, 'version'>[];
}

/** Of a sizing: frames × candidates, the total as well as it is known by then. */
export interface SizingProgress {
  readonly state: 'queued' | 'running' | 'stopping';
  readonly done: number;
  readonly total: number;
  readonly rate: number | null;
  readonly secondsLeft: number | null;
}

const window_ms = 5_000;
const mostLast = 12;

/** Rate and last frames of one run. */
export class RunMeter {
  private readonly moments: { readonly at: number; readonly frames: number }[] = [];
  private newest: Omit<SolvedFrame, 'version'>[] = [];

  constructor(private readonly now: () => number = () => performance.now()) {
    this.moments.push({ at: this.now(), frames: 0 });
  }

  add(solved: readonly SolvedFrame[], frames: number): void {
    const at = this.now();
    this.moments.push({ at, frames });
    while (this.moments.length > 2 && at - this.moments[1]!.at > window_ms) this.moments.shift();
    const seen = solved.map(({ frame, verdict, ratio }) => ({ frame, verdict, ratio }));
    this.newest = [...seen.reverse(), ...this.newest].slice(0, mostLast);
  }

  get rate(): number | null {
    const [first] = this.moments;
    const last = this.moments.at(-1)!;
    if (!first || last.at <= first.at) return null;
    const frames = this.moments.slice(1).reduce((sum, each) => sum + each.frames, 0);
    return frames / ((last.at - first.at) / 1000);
  }

  get last(): readonly Omit<SolvedFrame, 'version'>[] {
    return this.newest;
  }
}

/** Says 'progress' with a revision's id whenever something of it has moved. */
export type ProgressEvents = EventEmitter<{ progress: [revision: number] }>;
