/**
 * The pump that moves queued work through the threads. What is to be done, is being done and is done stands in the
 * database; this only asks it and hands out chunks, office by office.
 */
import { EventEmitter } from 'node:events';
import PQueue from 'p-queue';
import type { OpenDatabase } from '@/db/open';
import { insertActivity } from '@/db/queries/activity';
import { listUnfinishedJobs, requeueJobs, type JobRecord } from '@/db/queries/jobs';
import { findRevisionById } from '@/db/queries/revisions';
import { countWaiting } from '@/db/queries/results';
import { failStrandedReadings } from '@/db/queries/waiting';
import { askForRun } from './ask';
import { makeOneIssue, retestOneIssue } from './issuing';
import type { Pools } from './pools';
import type { ProgressEvents, RunProgress, SizingProgress } from './progress';
import { readOneRevision } from './reading';
import { RunWork, type Chunk } from './run-work';
import { SizeWork, type SizeChunk } from './size-work';
import { Turns } from './turns';

/** Says what went wrong where no person is waiting for the answer. */
export type Log = (message: string, facts: Readonly<Record<string, unknown>>) => void;

export interface QueueOptions {
  readonly database: OpenDatabase;
  /** The same database's file, for the threads. */
  readonly file: string;
  readonly pools: Pools;
  readonly log: Log;
  /** Told of every chunk handed out, in order: for tests. */
  readonly onChunk?: (chunk: { readonly office: number; readonly revision: number; readonly frames: number }) => void;
}

/** Jobs that are one thread's work from beginning to end, by kind; one of them at a time, office by office. */
const wholeJobs: Readonly<Record<string, (options: QueueOptions, job: JobRecord) => Promise<void>>> = {
  issue: makeOneIssue,
  retest: retestOneIssue,
};

interface WholeWork {
  readonly office: number;
  readonly job: JobRecord;
  taken: boolean;
}

export class WorkQueue {
  readonly events: ProgressEvents = new EventEmitter();
  private readonly solving = new PQueue({ concurrency: 2 });
  private readonly reading = new PQueue({ concurrency: 1 });
  private readonly making = new PQueue({ concurrency: 1 });
  /** What goes through the solving threads chunk by chunk. */
  private readonly runs = new Turns<RunWork | SizeWork>();
  private readonly reads = new Turns<WholeWork>();
  private readonly wholes = new Turns<WholeWork>();
  private readonly known = new Set<number>();
  /** Versions that some thread has in hand: two runs of one batch may wait for the same frame. */
  private readonly inHand = new Set<number>();
  private pumping: Promise<void> | null = null;
  private again = false;
  private closed = false;

  constructor(private readonly options: QueueOptions) {
    this.events.setMaxListeners(0);
  }

  /** Takes up what an earlier process left unfinished, then whatever is queued. */
  async start(): Promise<void> {
    const { db, raw } = this.options.database;
    await requeueJobs(db, 'any');
    failStrandedReadings(raw, 'The files did not arrive completely before the server ended. Bring them in again.');
    this.wake();
  }

  /** To be called after a job was inserted; returns at once. */
  wake(): void {
    if (this.closed) return;
    this.again = true;
    this.pumping ??= this.pump()
      .catch((error: unknown) => this.options.log('the queue met a fault and goes on at the next request', { error }))
      .finally(() => (this.pumping = null));
  }

  /** Hands out no more chunks of a revision's run; those in hand are kept. False where it knows of no such run. */
  stop(revision: number): boolean {
    const runs = this.runs.all().filter((run) => run instanceof RunWork && run.revision === revision);
    for (const run of runs) run.stop();
    this.wake();
    return runs.length > 0;
  }

  progress(revision: number): RunProgress {
    const run = this.runs.all().find((each): each is RunWork => each instanceof RunWork && each.revision === revision);
    const { total, waiting } = run?.counts ?? countWaiting(this.options.database.raw, revision);
    const done = total - waiting;
    const rate = run?.meter?.rate ?? null;
    return {
      revision,
      state: run?.state ?? null,
      total,
      done,
      rate,
      secondsLeft: rate && run ? Math.ceil(waiting / rate) : null,
      inHand: run?.versionsInHand ?? [],
      last: run?.meter?.last ?? [],
    };
  }

  /** Hands out no more of a sizing. False where it knows of no such one. */
  stopSizing(sizing: number): boolean {
    const work = this.sizingWork(sizing);
    work?.stop();
    this.wake();
    return work !== undefined;
  }

  /** How far a sizing is; null where none such is queued or going on here. */
  sizingProgress(sizing: number): SizingProgress | null {
    const work = this.sizingWork(sizing);
    if (!work) return null;
    const { done, total } = work.counts;
    const rate = work.meter?.rate ?? null;
    return { state: work.state, done, total, rate, secondsLeft: rate ? Math.ceil((total - done) / rate) : null };
  }

  private sizingWork(sizing: number): SizeWork | undefined {
    return this.runs.all().find((each): each is SizeWork => each instanceof SizeWork && each.sizing === sizing);
  }

  /** Settles when nothing is queued or going on. */
  async idle(): Promise<void> {
    do {
      await this.pumping;
      await this.solving.onIdle();
      await this.reading.onIdle();
      await this.making.onIdle();
    } while (this.pumping || [this.solving, this.reading, this.making].some((queue) => queue.pending + queue.size > 0));
  }

  /** Hands out nothing more and waits for what is in hand; unfinished work is taken up by the next start. */
  async close(): Promise<void> {
    this.closed = true;
    await this.pumping;
    await this.solving.onIdle();
    await this.reading.onIdle();
    await this.making.onIdle();
  }

  private async pump(): Promise<void> {
    while (this.again && !this.closed) {
      this.again = false;
      await this.learn();
      while (this.reading.pending + this.reading.size < 1 && (await this.handOutReading()));
      while (this.making.pending + this.making.size < 1 && (await this.handOutWhole()));
      while (this.solving.pending + this.solving.size < 2 && (await this.handOutChunk()));
    }
  }

  /** Learns of jobs inserted since. */
  private async learn(): Promise<void> {
    for (const job of await listUnfinishedJobs(this.options.database.db)) {
      if (this.known.has(job.id)) continue;
      if (job.kind === 'read') this.reads.add({ office: job.office, job, taken: false });
      else if (job.kind === 'run') this.runs.add(new RunWork(job, this.options, this.inHand));
      else if (job.kind === 'size') this.runs.add(new SizeWork(job, this.options));
      else if (wholeJobs[job.kind]) this.wholes.add({ office: job.office, job, taken: false });
      else continue;
      this.known.add(job.id);
    }
  }

  private async handOutReading(): Promise<boolean> {
    const work = await this.reads.next((each) => (each.taken ? null : each));
    if (!work || this.closed) return false;
    work.taken = true;
    void this.reading.add(async () => {
      try {
        await readOneRevision(this.options, work.job);
        await this.runIfAsked(work.job);
      } catch (error) {
        this.options.log('a reading could not be recorded', { error, job: work.job.id });
      }
      this.reads.remove(work);
      this.moved(work.job.revision);
    });
    return true;
  }

  private async handOutWhole(): Promise<boolean> {
    const work = await this.wholes.next((each) => (each.taken ? null : each));
    if (!work || this.closed) return false;
    work.taken = true;
    void this.making.add(async () => {
      try {
        await wholeJobs[work.job.kind]!(this.options, work.job);
      } catch (error) {
        this.options.log('the end of a job could not be recorded', { error, job: work.job.id });
      }
      this.wholes.remove(work);
      this.moved(work.job.revision);
    });
    return true;
  }

  /** A revision made on screen may be asked for with its run: that begins once its rows are read. */
  private async runIfAsked({ payload, revision, office, person }: JobRecord): Promise<void> {
    if (payload['run'] !== true || revision === null || person === null) return;
    const { database } = this.options;
    if (!(await askForRun(this, database, { office, revision, person }))) return;
    const found = await findRevisionById(database.db, office, revision);
    const { project, batch } = found ?? {};
    await insertActivity(database.db, office, { what: 'started a run', revision, person, ...(found && { project, batch }) });
  }

  private async handOutChunk(): Promise<boolean> {
    const chunk = await this.runs.next<Chunk | SizeChunk>((run) => run.nextChunk());
    await this.settleRuns();
    if (!chunk || this.closed) return false;
    const { run } = chunk;
    this.options.onChunk?.({ office: run.office, revision: run.revision, frames: chunk.versions.length });
    void this.solving.add(async () => {
      await ('wanted' in chunk ? chunk.run.solve(chunk) : chunk.run.solve(chunk));
      await this.settleRuns();
      this.moved(run.revision);
    });
    return true;
  }

  /** Records the end of runs that have nothing more to give and nothing in hand. */
  private async settleRuns(): Promise<void> {
    for (const run of [...this.runs.all()]) {
      if (!run.ended) continue;
      this.runs.remove(run);
      try {
        await run.finish();
      } catch (error) {
        this.options.log('the end of a run could not be recorded', { error, job: run.job.id });
      }
      this.moved(run.revision);
    }
  }

  private moved(revision: number | null): void {
    if (revision !== null) this.events.emit('progress', revision);
    this.wake();
  }
}
