import 'server-only';
import { db } from '@/db/client';
import { listPlacesOf } from '@/db/queries/run-certificate';
import { countRevisionVerdicts, findRevision } from '@/db/queries/revisions';
import type { RunProgressData, RunState } from '@/components/run/run-data';
import { notFound } from '@/lib/api/error';
import { runProgress } from '@/worker/boot';
import { time } from './dates';

/** How far a run is, with the revision's state read anew. */
export interface Progress extends RunProgressData {
  readonly revisionState: string;
  /** Places, from 0, of the frames that are being solved now. */
  readonly inHand: readonly number[];
  /** The frames solved last, newest first. */
  readonly last: readonly { readonly frame: string; readonly verdict: string; readonly ratio: number | null }[];
}

export async function progressOf(office: number, batch: number, letter: string): Promise<Progress> {
  const revision = await findRevision(db(), office, batch, letter);
  if (revision === undefined) throw notFound('revision');
  const { state: going, total: different, done: differentDone, rate, secondsLeft, inHand, last } = runProgress(revision.id);
  // The queue counts different frames; people count the frames of their sheets, of which several may be the same.
  const total = revision.frames - revision.framesStopped;
  // Where all differ the running queue knows; counting 20,000 rows at every asking would keep other requests waiting.
  const known = going === 'running' && different === total;
  const waiting = known ? total - differentDone : (await countRevisionVerdicts(db(), office, revision.id)).waiting;
  return {
    revisionState: revision.state,
    state: runState(revision.state, going),
    total,
    done: Math.max(0, total - waiting),
    rate: rate === null || different === 0 ? null : (rate * total) / different,
    secondsLeft,
    started: revision.runStartedAt === null ? null : time(revision.runStartedAt),
    message: revision.state === 'failed' || revision.state === 'stopped' ? revision.reason : null,
    inHand: await listPlacesOf(db(), office, revision.id, inHand),
    last: last.map(({ frame, verdict, ratio }) => ({ frame, verdict, ratio })),
  };
}

function runState(revision: string, going: 'queued' | 'running' | 'stopping' | null): RunState {
  if (going === 'running' || going === 'stopping') return going;
  if (going === 'queued' || revision === 'running') return 'waiting';
  if (revision === 'stopped' || revision === 'failed') return revision;
  return revision === 'reading' || revision === 'read' ? 'waiting' : 'done';
}
