import 'server-only';
import { db } from '@/db/client';
import { findSizing, type SizingRecord } from '@/db/queries/sizing';
import type { RevisionRecord } from '@/db/queries/revisions';
import { idInput } from '@/lib/api/inputs';
import { notFound } from '@/lib/api/error';
import type { SizingFound, SizingRequest } from '@/lib/sizing/sizing';
import { queue } from '@/worker/boot';

/** A sizing as pages and the API tell it. */
export interface SizingTold {
  readonly id: number;
  readonly by: string;
  readonly at: string;
  readonly finishedAt: string | null;
  readonly state: 'queued' | 'running' | 'stopping' | 'done' | 'stopped' | 'failed';
  readonly request: SizingRequest;
  readonly engine: string;
  readonly inputHash: string | null;
  /** Frames × candidates; the total is an estimate until it is done. */
  readonly done: number;
  readonly total: number;
  readonly rate: number | null;
  readonly secondsLeft: number | null;
  readonly seconds: number;
  readonly reason: string | null;
  readonly found: SizingFound | null;
}

/** With how far it is where it is going on. */
export function sizingTold(sizing: SizingRecord): SizingTold {
  const { id, person, at, finishedAt, state, request, engine, inputHash, done, total, seconds, reason, found } = sizing;
  const going = state === 'queued' || state === 'running' ? queue().sizingProgress(id) : null;
  const still = { state, done, total, rate: null, secondsLeft: null };
  const { rate, secondsLeft, ...how } = going ?? still;
  return { id, by: person, at, finishedAt, request, engine, inputHash, seconds, reason, found, ...how, rate, secondsLeft };
}

/** @throws {ApiError} not-found, for a sizing of another revision as for none */
export async function requireSizing(revision: RevisionRecord, sizing: string): Promise<SizingRecord> {
  const id = idInput.safeParse(sizing);
  const found = id.success ? await findSizing(db(), revision.office, revision.id, id.data) : undefined;
  if (found === undefined) throw notFound('sizing');
  return found;
}
