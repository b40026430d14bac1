import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { day } from '@/app/_server/dates';
import { groupsToSize } from '@/app/_server/groups-to-size';
import { pageRevision, type RevisionParams } from '@/app/_server/page-revision';
import { sizingTold } from '@/app/_server/sizings';
import { toParams, type SearchParams } from '@/app/_server/search-params';
import { Cautions, Notice } from '@/components/ui/notice';
import { Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { letterOf, listRevisions } from '@/db/queries/revisions';
import { listSizings } from '@/db/queries/sizing';
import { may } from '@/lib/access/may';
import { pages } from '@/lib/api/addresses';
import { rangeNames } from '@/lib/sections/library';
import { RevisionHead } from '../_head/revision-head';
import { SizeSheet } from './size-sheet';

export const metadata: Metadata = { title: 'Size sections' };

interface SizePageProps {
  readonly params: Promise<RevisionParams>;
  readonly searchParams: Promise<SearchParams>;
}

/** The lightest sections of groups of members that fit every frame. */
export default async function SizePage({ params, searchParams }: SizePageProps) {
  const { person, revision } = await pageRevision(params, 'size');
  const { office, id, batch, letter, units, settings, state, framesStopped } = revision;
  if (settings === null || state === 'reading') redirect(pages.sheet(batch, letter, 'read'));
  const [sizings, revisions, offered] = await Promise.all([
    listSizings(db(), office, id),
    listRevisions(db(), office, batch),
    groupsToSize(revision),
  ]);
  const wanted = Number(toParams(await searchParams).get('sizing'));
  const shown = sizings.find((one) => one.id === wanted) ?? sizings[0] ?? null;
  const latest = revisions.at(-1)?.letter ?? letter;
  return (
    <Sheet>
      <RevisionHead revision={revision} sheet="size" />
      <Zone
        title="Size sections"
        level={1}
        note={`the lightest section with which every check of every frame is within its limit; ${letter} stays as it is`}
      >
        {latest !== letter && (
          <Notice>
            The latest revision is {latest}. What is found here is of {letter}, and a change made of it starts from {letter}.
          </Notice>
        )}
        {framesStopped > 0 && (
          <Notice kind="near">
            {framesStopped.toLocaleString('en-GB')} {framesStopped === 1 ? 'frame is' : 'frames are'} stopped by errors in the
            sheets and left out: a section found here says nothing of them.
          </Notice>
        )}
      </Zone>
      <SizeSheet
        key={shown?.id ?? 0}
        batch={batch}
        letter={letter}
        next={letterOf(revisions.length)}
        units={units}
        nearLimit={settings.nearLimit}
        may={{ size: may(person, 'size sections'), change: may(person, 'change a revision') }}
        offered={offered}
        ranges={rangeNames}
        first={shown && sizingTold(shown)}
      />
      {sizings.length > 1 && (
        <Zone title="Sizings of this revision">
          <ul className="list-disc pl-5">
            {sizings.map((one) => (
              <li key={one.id}>
                <Link href={pages.size(batch, letter, one.id)} aria-current={one.id === shown?.id ? 'page' : undefined}>
                  {one.request.groups.map(({ by, name, range }) => `${by} ${name}, ${range}`).join('; ')}
                </Link>{' '}
                {one.person}, {day(one.at)}, {one.found?.outcome ?? one.state}
              </li>
            ))}
          </ul>
        </Zone>
      )}
      <Cautions />
    </Sheet>
  );
}
