import { redirect } from 'next/navigation';
import { pageRevision, type RevisionParams } from '@/app/_server/page-revision';
import { pages } from '@/lib/api/addresses';

/** A revision's own address leads to what it is at: its reading, its run, or its results. */
export default async function RevisionStart({ params }: { readonly params: Promise<RevisionParams> }) {
  const { revision } = await pageRevision(params, '');
  const { batch, letter, state, runStartedAt } = revision;
  const at = state === 'running' ? 'run' : runStartedAt === null ? 'read' : 'glance';
  redirect(pages.sheet(batch, letter, at));
}
