import type { Metadata } from 'next';
import Link from 'next/link';
import { frameNumbers } from '@/app/_server/numbers/frame-numbers';
import { pageRevision, type RevisionParams } from '@/app/_server/page-revision';
import { pageThing } from '@/app/_server/page-thing';
import { toParams, type SearchParams } from '@/app/_server/search-params';
import { NumberSteps } from '@/components/numbers/number-steps';
import { FrameWalk } from '@/components/sheet-index/frame-walk';
import { TitleBlock } from '@/components/title-block/title-block';
import { Cautions, Empty } from '@/components/ui/notice';
import { Sheet, Zone } from '@/components/ui/sheet';
import { pages } from '@/lib/api/addresses';
import { listFromParams, listToSearch } from '@/lib/api/view-address';
import { titleOf } from '../../../_head/revision-head';
import { NumbersChoice } from './numbers-choice';

export const metadata: Metadata = { title: 'The numbers behind a member' };

interface NumbersPageProps {
  readonly params: Promise<RevisionParams & { readonly number: string }>;
  readonly searchParams: Promise<SearchParams>;
}

/** One member followed by hand in one result: numbering, matrices, loads, movements and end forces, all to be copied. */
export default async function NumbersPage({ params, searchParams }: NumbersPageProps) {
  const { number } = await params;
  const { revision } = await pageRevision(params, `frames/${number}/numbers`);
  const asked = toParams(await searchParams);
  const found = await pageThing(frameNumbers(revision, number, asked));
  const { batch, letter } = revision;
  const list = listFromParams(asked);
  const show = found.result === null ? {} : { show: found.result };
  const address = (of: string) =>
    pages.numbers(batch, letter, found.number, { of, ...show, ...(found.si ? { in: 'si' } : {}) }, listToSearch(list));
  const neighbour = (by: 1 | -1) => {
    const member = found.member === null ? undefined : found.members[found.members.indexOf(found.member) + by];
    return member === undefined ? null : { id: member, href: address(member) };
  };
  const back = pages.frame(batch, letter, found.number, list);
  const backHere =
    found.result === null ? back : `${back}${back.includes('?') ? '&' : '?'}show=${encodeURIComponent(found.result)}`;
  return (
    <Sheet>
      <TitleBlock
        {...titleOf(revision)}
        frame={{ id: found.id, number: found.number, of: revision.frames }}
        verdict={{ verdict: found.verdict, ratio: found.ratio, nearLimit: found.nearLimit }}
      />
      <FrameWalk
        noun="member"
        here={found.member === null ? '' : address(found.member)}
        previous={neighbour(-1)}
        next={neighbour(1)}
        list={
          <Link href={backHere}>
            <kbd>u</kbd> back to frame {found.id}
          </Link>
        }
        listHref={backHere}
      />
      {found.data === null ? (
        <Zone title="No numbers" level={1}>
          <Empty>
            <p>This frame has no result, so there is nothing to follow: {found.why}.</p>
          </Empty>
        </Zone>
      ) : (
        <>
          <Zone
            level={1}
            title={`The numbers behind ${found.data.member} under ${found.data.result}`}
            note={found.data.description}
            aside={
              <NumbersChoice
                members={found.members}
                results={found.results}
                notApplicable={found.notApplicable}
                member={found.data.member}
                result={found.data.result}
                si={found.si}
                units={revision.units}
              />
            }
          >
            <p className="numbers-words">
              Every figure is the engine’s own, as it was used for the results; nothing is worked out a second way. Tables are
              copied with all their digits as text that pastes into a spreadsheet. Units multiply out: {found.unitWords}.
            </p>
            <p className="numbers-words">{found.methodWords}</p>
          </Zone>
          <div className="numbers-page">
            <NumberSteps steps={[...found.data.steps, found.data.frame]} />
          </div>
        </>
      )}
      <Cautions />
    </Sheet>
  );
}
