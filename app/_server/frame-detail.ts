import 'server-only';
import type { CertificateData } from '@/components/certificate/certificate';
import type { DrawingData } from '@/lib/drawing/drawing-data';
import { db } from '@/db/client';
import { findFrame } from '@/db/queries/frames';
import type { RevisionRecord } from '@/db/queries/revisions';
import { certificateLines } from '@/lib/analysis/certificate-lines';
import { notFound } from '@/lib/api/error';
import { frameNumberInput } from '@/lib/api/inputs';
import type { MemberGoverning } from '@/lib/results/member-results';
import { checkLines, type CheckLine } from '@/lib/results/check-line';
import type { Certificate, Verdict } from '@/lib/results/result';
import { drawingData } from '@/lib/drawing/frame-drawing-data';
import { settingLines } from './setting-lines';

/** Everything the frame page and its route say of one frame; figures in SI. */
export interface FrameDetail {
  /** Place in sheet order from 1, and how many there are. */
  readonly number: number;
  readonly of: number;
  readonly id: string;
  readonly title: string | null;
  readonly group: string | null;
  readonly count: number;
  readonly note: string | null;
  readonly status: 'stopped' | 'waiting' | 'solved' | 'not solved';
  /** Why it has no solution. */
  readonly failure: string | null;
  readonly verdict: Verdict;
  readonly ratio: number | null;
  readonly notChecked: readonly string[];
  readonly assumptions: readonly string[];
  readonly mass: number | null;
  readonly certificate: Certificate | null;
  /** The same in words, with engine, hashes and settings. */
  readonly vouched: CertificateData;
  readonly units: 'metric' | 'us';
  readonly nearLimit: number;
  /** By member of the drawing: its governing check; [] where it was not solved. */
  readonly members: readonly MemberGoverning[];
  /** Worst first. */
  readonly checks: readonly CheckLine[];
  /** Null where errors of its sheets stop the frame. */
  readonly drawing: DrawingData | null;
}

/**
 * One frame of a revision.
 *
 * @param number its place in sheet order from 1, as the address has it
 * @param result the case or combination to draw; null = the governing one
 * @throws {ApiError} not-found
 */
export async function frameDetail(revision: RevisionRecord, number: string, result: string | null): Promise<FrameDetail> {
  const asked = frameNumberInput.safeParse(number);
  const stored = asked.success ? await findFrame(db(), revision.office, revision.id, asked.data - 1) : undefined;
  if (stored === undefined) throw notFound('frame');
  const { frame, evaluation, status, id, title, group, count, note } = stored;
  const { units, settings } = revision;
  const nearLimit = settings?.nearLimit ?? 0.9;
  const states = evaluation?.states ?? [];
  if (result !== null && !states.some((state) => state.name === result)) throw notFound('load case or combination');
  return {
    number: stored.index + 1,
    of: revision.frames,
    id,
    title,
    group,
    count,
    note,
    status,
    failure: evaluation?.failure?.message ?? null,
    verdict: evaluation?.verdict ?? 'not checked',
    ratio: evaluation?.governing?.ratio ?? null,
    // why it has no solution is said once, above
    notChecked: (evaluation?.notChecked ?? []).filter((reason) => !evaluation?.failure || !reason.startsWith('not solved')),
    assumptions: evaluation?.assumptions ?? [],
    mass: evaluation?.mass ?? null,
    certificate: evaluation?.certificate ?? null,
    vouched: {
      lines: evaluation?.certificate ? certificateLines(evaluation.certificate) : [],
      engine: evaluation === null ? null : stored.engine,
      inputHash: revision.input?.sha256 ?? null,
      frameHash: stored.hash,
      settings: await settingLines(revision),
    },
    units,
    nearLimit,
    members: stored.members,
    checks: frame && settings ? checkLines(frame, evaluation?.checks ?? [], revision) : [],
    drawing: frame && drawingData({ frame, evaluation, members: stored.members, units, nearLimit, chosen: result }),
  };
}
