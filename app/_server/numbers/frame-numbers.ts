import 'server-only';
import type { ResultName } from '@/lib/drawing/drawing-data';
import { resultMethodWords } from '@/lib/drawing/result-method-words';
import type { NumbersData } from '@/components/numbers/numbers-data';
import { db } from '@/db/client';
import { findFrame, type FrameStored } from '@/db/queries/frames';
import type { RevisionRecord } from '@/db/queries/revisions';
import { notFound } from '@/lib/api/error';
import { frameNumberInput } from '@/lib/api/inputs';
import type { Frame } from '@/lib/model/frame';
import type { FrameEvaluation, ResultState, Verdict } from '@/lib/results/result';
import { noCasesAlone } from '@/lib/results/state-facts';
import { governingState, methodOf, notApplicable } from '@/lib/drawing/frame-drawing-data';
import { numberUnits } from './number-units';
import { numbersData } from './numbers-data';

/** What the page of the numbers behind a member says. */
export interface FrameNumbers {
  readonly number: number;
  readonly id: string;
  readonly verdict: Verdict;
  readonly ratio: number | null;
  readonly nearLimit: number;
  readonly members: readonly string[];
  readonly results: readonly ResultName[];
  readonly notApplicable: readonly string[];
  readonly member: string | null;
  readonly result: string | null;
  readonly si: boolean;
  readonly unitWords: string;
  readonly methodWords: string;
  /** Null where the frame has no result, with why. */
  readonly data: NumbersData | null;
  readonly why: string;
}

/**
 * The numbers behind a member of a revision's frame.
 *
 * @param asked `of` the member (else the governing one), `show` the result (else the governing one), `in=si` for N and m
 * @throws {ApiError} not-found
 */
export async function frameNumbers(revision: RevisionRecord, number: string, asked: URLSearchParams): Promise<FrameNumbers> {
  const place = frameNumberInput.safeParse(number);
  const stored = place.success ? await findFrame(db(), revision.office, revision.id, place.data - 1) : undefined;
  if (stored === undefined) throw notFound('frame');
  const { frame, evaluation } = stored;
  const states = evaluation?.states ?? [];
  const si = asked.get('in') === 'si';
  const units = numberUnits(si ? 'si' : null, revision.units);
  const show = asked.get('show');
  const state = show === null ? governingState(evaluation) : (states.find(({ name }) => name === show) ?? null);
  if (show !== null && states.length > 0 && state === null) throw notFound('load case or combination');
  const member = frame === null ? -1 : memberAsked(frame, evaluation, asked.get('of'));
  if (frame !== null && frame.members.length > 0 && member < 0) throw notFound('member');
  const there = frame !== null && state !== null && member >= 0;
  return {
    number: stored.index + 1,
    id: stored.id,
    verdict: evaluation?.verdict ?? 'not checked',
    ratio: evaluation?.governing?.ratio ?? null,
    nearLimit: revision.settings?.nearLimit ?? 0.9,
    members: frame?.members.map(({ id }) => id) ?? [],
    results: states.map(({ name, kind, purpose, criticalLoadFactor }) => ({ name, kind, purpose, criticalLoadFactor })),
    notApplicable: frame === null ? [] : notApplicable(frame, states),
    member: frame?.members[member]?.id ?? null,
    result: state?.name ?? null,
    si,
    unitWords: `${units.force}, ${units.length} and radians`,
    methodWords: there ? methodOfResult(frame, state) : '',
    data: there ? numbersData(frame, state, member, units) : null,
    why: whyNone(stored),
  };
}

/** The member named, else the one that governs, else the first; −1 where there is none of that name. */
function memberAsked({ members }: Frame, evaluation: FrameEvaluation | null, of: string | null): number {
  if (of !== null) return members.findIndex(({ id }) => id === of);
  const governing = evaluation?.governing?.subject;
  return Math.max(0, members.findIndex(({ id, span }) => id === governing || (span !== null && span === governing))); // prettier-ignore
}

function methodOfResult(frame: Frame, state: ResultState): string {
  const told = { method: methodOf(state), slack: state.method?.slack ?? [] };
  return `${state.name}: ${resultMethodWords({ members: frame.members, noCasesAlone: noCasesAlone(frame) }, told).join(' · ')}.`;
}

function whyNone({ status, evaluation }: FrameStored): string {
  if (status === 'stopped') return 'errors in its sheets stop it';
  if (status === 'waiting') return 'it has not been run yet';
  return evaluation?.failure?.message ?? 'it has no load case or combination';
}
