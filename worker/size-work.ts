/** One sizing in the queue: the search asks for frames, threads evaluate them chunk by chunk, until it has found. */
import { finishJob, leaseJob, type JobRecord } from '@/db/queries/jobs';
import { findRevisionById } from '@/db/queries/revisions';
import { deletePieces, findSizing, updateSizingProgress, updateSizingState } from '@/db/queries/sizing';
import type { Settings } from '@/lib/model/settings';
import { chooseSections, type Wanted } from '@/lib/sizing/choose-sections';
import { KnownAnswers } from '@/lib/sizing/known-answers';
import type { SizingProblem } from '@/lib/sizing/problem';
import type { FrameAnswer, SizingFound } from '@/lib/sizing/sizing';
import { RunMeter } from './progress';
import type { QueueOptions } from './queue';
import type { ListSizingTask, SizeTask, SizingListed } from './threads/size';

/** Frames handed to a thread at once. */
const sizeChunkSize = 40;
const lease_ms = 10 * 60_000;

export interface SizeChunk {
  readonly run: SizeWork;
  /** Places among the frames of the problem, and what they are asked; null = find out what there is to do. */
  readonly wanted: Wanted | null;
  readonly versions: readonly number[];
}

export class SizeWork {
  readonly office: number;
  readonly revision: number;
  readonly sizing: number;
  /** Runs of the same office go before it. */
  readonly patient = true;
  meter: RunMeter | null = null;
  private settings: Settings | null = null;
  private problem: SizingProblem | null = null;
  private versions: readonly number[] = [];
  private known: KnownAnswers | null = null;
  private search: Generator<readonly Wanted[], SizingFound> | null = null;
  /** Chunks that the search waits for and no thread has yet. */
  private waiting: Wanted[] = [];
  private inThreads = 0;
  private found: SizingFound | null = null;
  private refused: string | null = null;
  private failure: string | null = null;
  private stopped = false;
  private answered = 0;
  private began = 0;

  constructor(
    readonly job: JobRecord,
    private readonly options: QueueOptions,
  ) {
    const { sizing } = job.payload;
    if (job.revision === null || typeof sizing !== 'number') throw new RangeError(`Expected job ${job.id} to name a revision and a sizing`); // prettier-ignore
    this.office = job.office;
    this.revision = job.revision;
    this.sizing = sizing;
  }

  get state(): 'queued' | 'running' | 'stopping' {
    return this.stopped ? 'stopping' : this.search ? 'running' : 'queued';
  }

  /** Frames × candidates that were asked, and about how many there will be: exactly how many shows when the search is over. */
  get counts(): { readonly done: number; readonly total: number } {
    const all = (this.problem?.groups ?? []).reduce((sum, { candidates }, g) => sum + candidates.length * this.framesOf(g), 0);
    return { done: this.answered, total: Math.max(all, this.answered + this.waiting.reduce((sum, { frames }) => sum + frames.length, 0)) };
  } // prettier-ignore

  get ended(): boolean {
    return this.inThreads === 0 && this.ending;
  }

  private get ending(): boolean {
    return this.stopped || this.failure !== null || this.refused !== null || this.found !== null;
  }

  stop(): void {
    this.stopped = true;
  }

  nextChunk(): SizeChunk | null {
    if (this.ending) return null;
    if (!this.search) {
      if (this.inThreads > 0) return null;
      this.inThreads += 1;
      return { run: this, wanted: null, versions: [] };
    }
    this.goOn();
    const wanted = this.waiting.shift();
    if (!wanted) return null;
    this.inThreads += 1;
    return { run: this, wanted, versions: wanted.frames.map((f) => this.versions[f] ?? -1) };
  }

  /** Does a chunk in a thread. A fault ends the sizing as failed; what is stored stays. */
  async solve({ wanted, versions }: SizeChunk): Promise<void> {
    try {
      await (wanted === null ? this.begin() : this.evaluate(wanted, versions));
    } catch (error) {
      this.fail(error);
    }
    this.inThreads -= 1;
    this.goOn();
  }

  private async evaluate({ choice, frames }: Wanted, versions: readonly number[]): Promise<void> {
    const { pools, file } = this.options;
    const groups = this.problem?.groups ?? [];
    const task: SizeTask = {
      file,
      revision: this.revision,
      sizing: this.sizing,
      settings: this.settings!,
      groups: groups.map(({ by, name }) => ({ by, name })),
      choice,
      taken: groups.map(({ candidates }, g) => candidates[choice[g] ?? -1]?.taken ?? null),
      versions,
    };
    const answers = (await pools.solve.run(task, { filename: pools.bundle('solve'), name: 'sizeChunk' })) as FrameAnswer[];
    for (const [i, f] of frames.entries()) {
      const answer = answers[i];
      if (answer) this.known?.put(choice, f, answer);
    }
    this.answered += frames.length;
    this.meter?.add([], frames.length);
  }

  /** Records how it ended. */
  async finish(): Promise<void> {
    const { db, raw } = this.options.database;
    await updateSizingProgress(db, this.sizing, this.found ? { done: this.answered, total: this.answered } : this.counts);
    const seconds = this.began === 0 ? 0 : (performance.now() - this.began) / 1000;
    const end = (to: 'done' | 'stopped' | 'failed', more: { reason?: string; found?: SizingFound } = {}) =>
      updateSizingState(db, this.office, this.sizing, ['queued', 'running'], to, { ...more, seconds });
    if (this.found) {
      await end('done', { found: this.found });
      deletePieces(raw, this.sizing);
      await finishJob(db, this.job.id, 'done');
    } else if (this.refused !== null) {
      await end('failed', { reason: this.refused });
      await finishJob(db, this.job.id, 'failed', this.refused);
    } else if (this.failure !== null) {
      const reason = `It ended before it had found (${this.failure}). What frames answered is kept: start it again to go on.`;
      await end('failed', { reason });
      await finishJob(db, this.job.id, 'failed', this.failure);
    } else {
      await end('stopped', { reason: 'Stopped. What frames answered is kept.' });
      await finishJob(db, this.job.id, 'stopped');
    }
  }

  private framesOf(g: number): number {
    return (this.problem?.frames ?? []).reduce((sum, { mask }) => sum + (mask & (1 << g) ? 1 : 0), 0);
  }

  /** Lets the search go on where everything it waits for is known. */
  private goOn(): void {
    if (!this.search || this.inThreads > 0 || this.waiting.length > 0 || this.found || this.failure !== null) return;
    try {
      const step = this.search.next();
      if (step.done) this.found = step.value;
      else this.waiting = step.value.flatMap(({ choice, frames }) => chunksOf(frames).map((some) => ({ choice, frames: some })));
    } catch (error) {
      this.fail(error);
    }
  }

  private async begin(): Promise<void> {
    const { database, file, pools } = this.options;
    const { db } = database;
    const until = new Date(Date.now() + lease_ms).toISOString();
    const job = await leaseJob(db, { owner: `${process.pid}`, until, job: this.job.id });
    const [revision, sizing] = await Promise.all([
      findRevisionById(db, this.office, this.revision),
      findSizing(db, this.office, this.revision, this.sizing),
    ]);
    if (!job || !revision?.settings || !sizing) throw new Error('What this sizing is of is not there any more');
    this.settings = revision.settings;
    this.began = performance.now();
    await updateSizingState(db, this.office, this.sizing, ['queued'], 'running');
    const task: ListSizingTask = {
      file,
      office: this.office,
      revision: this.revision,
      sizing: this.sizing,
      request: sizing.request,
    };
    const call = { filename: pools.bundle('solve'), name: 'listSizing' };
    const listed = (await pools.solve.run(task, call)) as SizingListed | { readonly refused: string };
    if ('refused' in listed) {
      this.refused = listed.refused;
      return;
    }
    const { problem, versions, pieces } = listed;
    this.problem = problem;
    this.versions = versions;
    const known = new KnownAnswers(Uint8Array.from(problem.frames, ({ mask }) => mask));
    const places = new Map(versions.map((version, f) => [version, f]));
    for (const piece of pieces) {
      for (const [i, version] of piece.versions.entries()) {
        const [f, answer] = [places.get(version), piece.answers[i]];
        if (f === undefined || !answer) continue;
        known.put(piece.choice, f, answer);
        this.answered += 1;
      }
    }
    this.known = known;
    this.search = chooseSections(problem, known);
    this.meter = new RunMeter();
  }

  private fail(error: unknown): void {
    this.options.log('a chunk of a sizing failed', { error, revision: this.revision, job: this.job.id });
    const outOfMemory = error instanceof Error && 'code' in error && error.code === 'ERR_WORKER_OUT_OF_MEMORY';
    this.failure ??= outOfMemory
      ? 'a frame needed more memory than a thread may use'
      : 'a fault of the program, which was logged';
  }
}

/** Few frames go out one by one, so that both threads have some; many in chunks. */
function chunksOf(frames: readonly number[]): number[][] {
  const size = frames.length <= 2 ? 2 : Math.min(sizeChunkSize, Math.ceil(frames.length / 2));
  return Array.from({ length: Math.ceil(frames.length / size) }, (_, i) => frames.slice(size * i, size * (i + 1)));
}
