import type { Metadata } from 'next';
import { checkedWords } from '@/app/_server/checked-words';
import { frameDetail } from '@/app/_server/frame-detail';
import { toParams, type SearchParams } from '@/app/_server/search-params';
import { pageRevision, type RevisionParams } from '@/app/_server/page-revision';
import { pageThing } from '@/app/_server/page-thing';
import { parametersOf } from '@/app/_server/view';
import { FrameWalk } from '@/components/sheet-index/frame-walk';
import { sentenceOf } from '@/components/tables/table-words';
import { TitleBlock } from '@/components/title-block/title-block';
import { Cautions } from '@/components/ui/notice';
import { Sheet } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { findFrame, findNeighbours } from '@/db/queries/frames';
import { api, pages } from '@/lib/api/addresses';
import { viewFromParams } from '@/lib/api/view-address';
import { offeredColumns } from '@/lib/tables/shown-columns';
import { titleOf } from '../../_head/revision-head';
import { FrameSheet } from './frame-sheet';

export const metadata: Metadata = { title: 'Frame' };

interface FramePageProps {
  readonly params: Promise<RevisionParams & { readonly number: string }>;
  readonly searchParams: Promise<SearchParams>;
}

/** One frame: its drawing, its checks with their working, its figures; previous and next through the list it was opened from. */
export default async function FramePage({ params, searchParams }: FramePageProps) {
  const { number } = await params;
  const { person, revision } = await pageRevision(params, `frames/${number}`);
  const asked = toParams(await searchParams);
  const detail = await pageThing(frameDetail(revision, number, null));
  const view = { ...viewFromParams('frames', asked), columns: null };
  const around = await findNeighbours(db(), person.office, revision.id, detail.number - 1, view);
  const { batch, letter, units } = revision;
  const filtered = view.filters.length > 0 || view.sort !== null;
  const parameters = filtered ? await parametersOf(revision) : [];
  const sentence = filtered ? sentenceOf(view, offeredColumns('frames', parameters), units) : 'Frames, in sheet order';
  const neighbour = async (index: number | null) => {
    const frame = index === null ? undefined : await findFrame(db(), person.office, revision.id, index);
    return frame === undefined ? null : { id: frame.id, href: pages.frame(batch, letter, frame.index + 1, view) };
  };
  return (
    <Sheet>
      <TitleBlock
        {...titleOf(revision)}
        frame={{ id: detail.id, number: detail.number, of: detail.of }}
        verdict={{ verdict: detail.verdict, ratio: detail.ratio, nearLimit: detail.nearLimit }}
      />
      <FrameWalk
        previous={await neighbour(around.previous)}
        next={await neighbour(around.next)}
        list={`in ${around.of.toLocaleString('en-GB')} ${sentence[0]!.toLowerCase()}${sentence.slice(1)}`}
        listHref={pages.table(batch, letter, view)}
        tools={
          <a href={api.part(batch, letter, 'workbook')} download>
            Result workbook
          </a>
        }
      />
      <h1 className="sr-only">
        Frame {detail.id}, {detail.verdict}
      </h1>
      <FrameSheet batch={batch} letter={letter} first={detail} />
      <Cautions {...checkedWords(revision)} />
    </Sheet>
  );
}
