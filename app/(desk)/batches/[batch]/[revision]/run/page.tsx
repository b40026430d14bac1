import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { pageRevision, type RevisionParams } from '@/app/_server/page-revision';
import { certificateSoFar } from '@/app/_server/certificate';
import { progressOf } from '@/app/_server/progress';
import { Sheet } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { findSummary } from '@/db/queries/summary';
import { may } from '@/lib/access/may';
import { pages } from '@/lib/api/addresses';
import { RevisionHead } from '../_head/revision-head';
import { RunSheet } from './run-sheet';

export const metadata: Metadata = { title: 'Run' };

/** How far the run is: the strip fills as frames are solved. */
export default async function RunPage({ params }: { readonly params: Promise<RevisionParams> }) {
  const { person, revision } = await pageRevision(params, 'run');
  const { batch, letter, runStartedAt } = revision;
  if (runStartedAt === null) redirect(pages.sheet(batch, letter, 'read'));
  const [summary, progress, certificate] = await Promise.all([
    findSummary(db(), person.office, revision.id),
    progressOf(person.office, batch, letter),
    certificateSoFar(revision),
  ]);
  if (summary === undefined) throw new Error(`Expected a summary of revision ${revision.id}`);
  return (
    <Sheet>
      <RevisionHead revision={revision} sheet="run" />
      <h1 className="sr-only">
        Run of {revision.batchName}, revision {letter}
      </h1>
      <RunSheet
        batch={batch}
        letter={letter}
        nearLimit={revision.settings?.nearLimit ?? 0.9}
        may={may(person, 'run')}
        first={{ progress, cells: summary.cells, certificate }}
      />
    </Sheet>
  );
}
