import type { Metadata } from 'next';
import { BringSheets } from '@/app/_client/bring-sheets';
import { requirePagePerson } from '@/app/_server/page-person';
import { pageRevision, type RevisionParams } from '@/app/_server/page-revision';
import { TitleBlock } from '@/components/title-block/title-block';
import { Sheet, Zone } from '@/components/ui/sheet';
import { api } from '@/lib/api/addresses';
import { titleOf } from '../_head/revision-head';

export const metadata: Metadata = { title: 'Bring mended sheets in' };

/** Mended files become the batch's next revision; this one stays as it is. */
export default async function BringNextPage({ params }: { readonly params: Promise<RevisionParams> }) {
  const { batch, revision: letter } = await params;
  await requirePagePerson('bring sheets in', `/batches/${batch}/${letter}/bring`);
  const { revision } = await pageRevision(params, 'bring');
  return (
    <Sheet>
      <TitleBlock {...titleOf(revision)} sheet="bring in" />
      <Zone title="Bring mended sheets in" note={`they become the revision after the latest; ${letter} stays as it is`} level={1}>
        <BringSheets to={api.revisions(revision.batch)} named={false} />
      </Zone>
    </Sheet>
  );
}
