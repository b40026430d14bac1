import type { Metadata } from 'next';
import Link from 'next/link';
import { checkedWords } from '@/app/_server/checked-words';
import { frameDetail } from '@/app/_server/frame-detail';
import { toParams, type SearchParams } from '@/app/_server/search-params';
import { pageRevision, type RevisionParams } from '@/app/_server/page-revision';
import { pageThing } from '@/app/_server/page-thing';
import { parametersOf } from '@/app/_server/view';
import { FrameWalk } from '@/components/sheet-index/frame-walk';
import { sentenceOf } from '@/components/tables/table-words';
import { TitleBlock } from '@/components/title-block/title-block';
import { Cautions, CheckedAtOnce } from '@/components/ui/notice';
import { Sheet } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { findFrame, findNeighbours, type Neighbours } from '@/db/queries/frames';
import { may } from '@/lib/access/may';
import { api, pages } from '@/lib/api/addresses';
import { listFromParams, listToSearch } from '@/lib/api/view-address';
import { offeredColumns } from '@/lib/tables/shown-columns';
import { CheckingLine } from '../../_head/checking-line';
import { MadeFrom } from '../../_head/made-from';
import { titleOf } from '../../_head/revision-head';
import type { View } from '@/lib/tables/view';
import { FrameSheet } from './frame-sheet';
import { TryLine } from './try-line';

interface FramePageProps {
  readonly params: Promise<RevisionParams & { readonly number: string }>;
  readonly searchParams: Promise<SearchParams>;
}

/** Names the frame on the tab, and at the head of a printed page. */
export async function generateMetadata({ params }: FramePageProps): Promise<Metadata> {
  const { number } = await params;
  const { person, revision } = await pageRevision(params, `frames/${number}`);
  const frame = await findFrame(db(), person.office, revision.id, Number(number) - 1);
  return { title: frame ? `Frame ${frame.id}, ${revision.batchName}, revision ${revision.letter}` : 'Frame' };
}

/** One frame: its drawing, its checks with their working, its figures; previous and next through the list it was opened from. */
export default async function FramePage({ params, searchParams }: FramePageProps) {
  const { number } = await params;
  const { person, revision } = await pageRevision(params, `frames/${number}`);
  const asked = toParams(await searchParams);
  const detail = await pageThing(frameDetail(revision, number, asked.get('show')));
  const view = listFromParams(asked);
  const mayChange = may(person, 'change a revision');
  const around = await findNeighbours(db(), person.office, revision.id, detail.number - 1, view);
  const { batch, letter, units } = revision;
  const filtered = view.filters.length > 0 || view.sort !== null || view.table !== 'frames';
  const parameters = filtered ? await parametersOf(revision) : [];
  const sentence = filtered
    ? listWords(sentenceOf(view, offeredColumns(view.table, parameters), units), view)
    : 'frames, in sheet order';
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
        here={pages.frame(batch, letter, detail.number, view)}
        previous={await neighbour(around.previous)}
        next={await neighbour(around.next)}
        list={placeWords(around, sentence)}
        listHref={pages.table(batch, letter, view)}
        tools={
          <>
            <a href={api.part(batch, letter, 'workbook')} download>
              Result workbook
            </a>
            {detail.drawing && <Link href={pages.tryOn(batch, letter, detail.number)}>Try a section</Link>}
            {mayChange && <Link href={pages.change(batch, letter, { frame: detail.id })}>Change a section</Link>}
          </>
        }
      />
      <CheckingLine revision={revision} />
      <MadeFrom revision={revision} />
      <CheckedAtOnce {...(detail.checks.length > 0 ? checkedWords(revision) : {})} />
      <h1 className="sr-only">
        Frame {detail.id}, {detail.verdict}
      </h1>
      {detail.drawing && <TryLine action={pages.tryOn(batch, letter, detail.number)} members={detail.drawing.members} />}
      <FrameSheet
        batch={batch}
        letter={letter}
        first={detail}
        list={listToSearch(view)}
        mayChange={mayChange}
        sent={revision.sent !== null}
      />
      <Cautions />
    </Sheet>
  );
}

/** "frames where verdict is over, sorted by ratio"; of another table, "frames of members where role is rafter, sorted by …" */
function listWords(sentence: string, { table }: View): string {
  const small = `${sentence[0]!.toLowerCase()}${sentence.slice(1)}`;
  return table === 'frames' ? small : `frames of ${small}`;
}

/** "3rd of 19 …" is left to the numbers: "3 of 19 frames where …". */
function placeWords({ place, of }: Neighbours, words: string): string {
  const count = of.toLocaleString('en-GB');
  const told = of === 1 ? words.replace(/^frames/, 'frame') : words;
  return place === null ? `not among the ${count} ${told}` : `${place.toLocaleString('en-GB')} of ${count} ${told}`;
}
