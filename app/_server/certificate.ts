import 'server-only';
import { db } from '@/db/client';
import { findRunCertificate, type RunCertificate } from '@/db/queries/run-certificate';
import type { RevisionRecord } from '@/db/queries/revisions';

/** Above this many frames the figures are gathered once the run has ended: doing it again and again would slow other pages. */
const most = 5000;

/** The run's certificate; null while a long run goes on. */
export async function certificateSoFar({ office, id, frames, state }: RevisionRecord): Promise<RunCertificate | null> {
  if (state === 'running' && frames > most) return null;
  return (await findRunCertificate(db(), office, id)) ?? null;
}
