import type { Metadata } from 'next';
import Link from 'next/link';
import { pageRevision, type RevisionParams } from '@/app/_server/page-revision';
import { pageThing } from '@/app/_server/page-thing';
import { toParams, type SearchParams } from '@/app/_server/search-params';
import { FrameWalk } from '@/components/sheet-index/frame-walk';
import { TitleBlock } from '@/components/title-block/title-block';
import { Cautions, Empty } from '@/components/ui/notice';
import { Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { findFrame } from '@/db/queries/frames';
import { letterOf, listRevisions } from '@/db/queries/revisions';
import { may } from '@/lib/access/may';
import { pages } from '@/lib/api/addresses';
import { notFound } from '@/lib/api/error';
import { frameNumberInput } from '@/lib/api/inputs';
import { titleOf } from '../../../_head/revision-head';
import { TrySheet } from './try-sheet';

export const metadata: Metadata = { title: 'Try sections' };

interface TryPageProps {
  readonly params: Promise<RevisionParams & { readonly number: string }>;
  readonly searchParams: Promise<SearchParams>;
}

/** Other sections tried on one frame: ratios, checks and drawing change at once, and nothing is stored. */
export default async function TryPage({ params, searchParams }: TryPageProps) {
  const { number: asked } = await params;
  const search = toParams(await searchParams);
  const { person, revision } = await pageRevision(params, `frames/${asked}/try`);
  const number = frameNumberInput.safeParse(asked);
  const found = await pageThing(
    (async () => {
      const frame = number.success ? await findFrame(db(), revision.office, revision.id, number.data - 1) : undefined;
      if (frame === undefined) throw notFound('frame');
      return frame;
    })(),
  );
  const { batch, letter, settings, frames } = revision;
  const revisions = await listRevisions(db(), revision.office, batch);
  const here = found.index + 1;
  const neighbour = async (index: number) => {
    const frame = index < 0 || index >= frames ? undefined : await findFrame(db(), revision.office, revision.id, index);
    return frame === undefined ? null : { id: frame.id, href: pages.tryOn(batch, letter, index + 1) };
  };
  const nearLimit = settings?.nearLimit ?? 0.9;
  const { evaluation } = found;
  return (
    <Sheet>
      <TitleBlock
        {...titleOf(revision)}
        frame={{ id: found.id, number: here, of: frames }}
        verdict={{ verdict: evaluation?.verdict ?? 'not checked', ratio: evaluation?.governing?.ratio ?? null, nearLimit }}
      />
      <FrameWalk
        here={pages.tryOn(batch, letter, here)}
        previous={await neighbour(found.index - 1)}
        next={await neighbour(found.index + 1)}
        list={
          <Link href={pages.frame(batch, letter, here)}>
            <kbd>u</kbd> back to frame {found.id}
          </Link>
        }
        listHref={pages.frame(batch, letter, here)}
      />
      {found.frame === null || settings === null ? (
        <Zone title="Try sections" level={1}>
          <Empty>
            <p>Errors in its sheets stop this frame, so nothing can be tried on it.</p>
          </Empty>
        </Zone>
      ) : (
        <TrySheet
          key={`${letter} ${here}`}
          batch={batch}
          letter={letter}
          number={here}
          next={letterOf(revisions.length)}
          units={settings.units}
          nearLimit={nearLimit}
          mayChange={may(person, 'change a revision')}
          first={search.get('of')}
          to={search.get('to')}
        />
      )}
      <Cautions />
    </Sheet>
  );
}
