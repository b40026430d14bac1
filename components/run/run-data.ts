export type RunState = 'waiting' | 'running' | 'stopping' | 'stopped' | 'done' | 'failed';

export interface RunProgressData {
  readonly state: RunState;
  readonly done: number;
  readonly total: number;
  /** Frames a second; null until it is known. */
  readonly rate: number | null;
  readonly secondsLeft: number | null;
  /** "16:42:07", written by the page in the office's time. */
  readonly started: string | null;
  /** "4 members, 6 combinations, 13 checks" */
  readonly each?: string | null;
  /** Why it failed, and what is safe. */
  readonly message?: string | null;
}
