/** One run in the queue: which frame versions are left, which are in hand, and how it ends. */
import { finishJob, leaseJob, updateJobProgress, type JobRecord } from '@/db/queries/jobs';
import { countRevisionVerdicts, findRevisionById, updateRevisionState } from '@/db/queries/revisions';
import { countWaiting } from '@/db/queries/results';
import { putRunFinished } from '@/db/queries/run-letter';
import type { Settings } from '@/lib/model/settings';
import { RunMeter } from './progress';
import type { QueueOptions } from './queue';
import type { FailuresTask } from './threads/failures';
import type { ListRunTask, RunListed } from './threads/list-run';
import type { SolvedFrame, SolveTask } from './threads/solve';

/** Frames handed to a thread at once: about a tenth of a second's work, so that offices alternate and a kill loses little. */
export const chunkSize = 50;

/** A lease outlives any chunk; the one process that works here takes all of them up again when it starts. */
const lease_ms = 10 * 60_000;

export interface Chunk {
  readonly run: RunWork;
  readonly versions: readonly number[];
}

export class RunWork {
  readonly office: number;
  readonly revision: number;
  meter: RunMeter | null = null;
  private waiting: readonly number[] | null = null;
  private settings: Settings | null = null;
  private second: ReadonlySet<number> = new Set();
  private total = 0;
  private left = 0;
  private chunksInHand = 0;
  private readonly ownInHand = new Set<number>();
  private stopped = false;
  private failure: string | null = null;

  constructor(
    readonly job: JobRecord,
    private readonly options: QueueOptions,
    private readonly inHand: Set<number>,
  ) {
    if (job.revision === null) throw new RangeError(`Expected the run of job ${job.id} to name a revision`);
    this.office = job.office;
    this.revision = job.revision;
  }

  get state(): 'queued' | 'running' | 'stopping' {
    return this.stopped ? 'stopping' : this.waiting ? 'running' : 'queued';
  }

  /** Different frames of the revision and those not solved yet; null before the run has begun. */
  get counts(): { readonly total: number; readonly waiting: number } | null {
    return this.waiting && { total: this.total, waiting: this.left };
  }

  /** Versions of this run that a thread has in hand. */
  get versionsInHand(): readonly number[] {
    return [...this.ownInHand];
  }

  /** Nothing more to give, nothing in hand. */
  get ended(): boolean {
    if (this.chunksInHand > 0) return false;
    return this.stopped || this.failure !== null || this.waiting?.length === 0;
  }

  stop(): void {
    this.stopped = true;
  }

  /** The next versions to solve, marked as in hand; null where there are none to give now. */
  async nextChunk(): Promise<Chunk | null> {
    if (this.stopped || this.failure !== null) return null;
    try {
      this.waiting ??= await this.begin();
    } catch (error) {
      this.fail(error);
      return null;
    }
    const versions: number[] = [];
    const left: number[] = [];
    for (const version of this.waiting) {
      if (versions.length < chunkSize && !this.inHand.has(version)) versions.push(version);
      else left.push(version);
    }
    // What another run has in hand comes later; the thread leaves alone what is solved by then.
    if (versions.length === 0) return null;
    this.waiting = left;
    for (const version of versions) {
      this.inHand.add(version);
      this.ownInHand.add(version);
    }
    this.chunksInHand++;
    return { run: this, versions };
  }

  /** Solves a chunk in a thread. A fault ends the run as failed; what is stored stays. */
  async solve({ versions }: Chunk): Promise<void> {
    const { pools, file } = this.options;
    const task: SolveTask = {
      file,
      job: this.job.id,
      revision: this.revision,
      versions,
      settings: this.settings!,
      second: new Set(versions.filter((version) => this.second.has(version))),
      person: this.job.person,
    };
    try {
      const name = 'solveChunk';
      const solved = (await pools.solve.run(task, { filename: pools.bundle('solve'), name })) as SolvedFrame[];
      this.meter?.add(solved, solved.length);
      this.left -= versions.length;
    } catch (error) {
      this.fail(error);
    } finally {
      for (const version of versions) {
        this.inHand.delete(version);
        this.ownInHand.delete(version);
      }
      this.chunksInHand--;
    }
  }

  /** Records how the run ended. */
  async finish(): Promise<void> {
    const { database, file, pools } = this.options;
    const { waiting } = countWaiting(database.raw, this.revision);
    const kept = `${await this.keptWords()} are kept`;
    if (waiting === 0 && this.failure === null) {
      const task: FailuresTask = { file, office: this.office, revision: this.revision };
      await pools.solve.run(task, { filename: pools.bundle('solve'), name: 'tellFailures' });
      await this.end('done', 'run');
    } else if (this.failure !== null) {
      const reason = `The run stopped before it finished. ${kept}. Start it again to do the rest. (${this.failure})`;
      await this.end('failed', 'failed', reason);
    } else {
      await this.end('stopped', 'stopped', `Stopped. ${kept}.`);
    }
  }

  /** Job, revision and the letter to whoever started it, all or none; no letter where a person stopped it. */
  private async end(job: 'done' | 'stopped' | 'failed', revision: 'run' | 'stopped' | 'failed', reason?: string): Promise<void> {
    const { db } = this.options.database;
    const counts = await countRevisionVerdicts(db, this.office, this.revision);
    await db.transaction().execute(async (within) => {
      const more = reason === undefined ? {} : { reason };
      await updateRevisionState(within, this.office, this.revision, ['running'], revision, more);
      const ended = await finishJob(within, this.job.id, job, this.failure);
      if (!ended || job === 'stopped' || this.job.person === null) return;
      await putRunFinished(within, this.office, {
        revision: this.revision,
        person: this.job.person,
        counts,
        stopped: job === 'failed',
      });
    });
  }

  /** "140 of 1,000 frames": those of the sheets, of which several may be the same and are solved once. */
  private async keptWords(): Promise<string> {
    const { over, near, within, notChecked, waiting } = await countRevisionVerdicts(
      this.options.database.db,
      this.office,
      this.revision,
    );
    const done = over + near + within + notChecked;
    return `${done.toLocaleString('en-GB')} of ${(done + waiting).toLocaleString('en-GB')} frames`;
  }

  private async begin(): Promise<readonly number[]> {
    const { database, file, pools } = this.options;
    const { db } = database;
    const until = new Date(Date.now() + lease_ms).toISOString();
    const job = await leaseJob(db, { owner: `${process.pid}`, until, job: this.job.id });
    const revision = await findRevisionById(db, this.office, this.revision);
    if (!job || !revision?.settings) throw new Error('The revision of this run is not there any more');
    this.settings = revision.settings;
    const task: ListRunTask = { file, revision: this.revision };
    const listed = (await pools.solve.run(task, { filename: pools.bundle('solve'), name: 'listRun' })) as RunListed;
    const { total, waiting, second } = listed;
    this.second = second;
    this.total = total;
    await updateJobProgress(db, this.job.id, { done: total - waiting.length, total });
    this.left = waiting.length;
    this.meter = new RunMeter();
    return waiting;
  }

  private fail(error: unknown): void {
    this.options.log('a chunk of a run failed', { error, revision: this.revision, job: this.job.id });
    const outOfMemory = error instanceof Error && 'code' in error && error.code === 'ERR_WORKER_OUT_OF_MEMORY';
    this.failure ??= outOfMemory
      ? 'a frame needed more memory than a thread may use'
      : 'a fault of the program, which was logged';
  }
}
