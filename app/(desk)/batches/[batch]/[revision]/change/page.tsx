import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { requirePagePerson } from '@/app/_server/page-person';
import { pageRevision, type RevisionParams } from '@/app/_server/page-revision';
import { toParams, type SearchParams } from '@/app/_server/search-params';
import { Notice } from '@/components/ui/notice';
import { Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { letterOf, listRevisions } from '@/db/queries/revisions';
import { pages } from '@/lib/api/addresses';
import { askedWords } from '@/lib/changes/members-asked';
import { mostMembers } from '@/lib/changes/change';
import { RevisionHead } from '../_head/revision-head';
import { ChangeSection } from './change-section';
import { ChooseMembers } from './choose-members';
import { FromSheet } from './from-sheet';
import { membersAsked } from './members-asked';
import { membersOffered } from './members-offered';

export const metadata: Metadata = { title: 'Change a section' };

interface ChangePageProps {
  readonly params: Promise<RevisionParams>;
  readonly searchParams: Promise<SearchParams>;
}

/** Other sections for members: which ones (the address is a view of the members table), which section, what it touches, and the next revision. */
export default async function ChangePage({ params, searchParams }: ChangePageProps) {
  const { batch: of, revision: at } = await params;
  await requirePagePerson('change a revision', `/batches/${of}/${at}/change`);
  const { revision } = await pageRevision(params, 'change');
  const { office, batch, letter, units } = revision;
  if (revision.state === 'reading' || revision.settings === null || revision.frames === 0)
    redirect(pages.sheet(batch, letter, 'read'));
  const search = toParams(await searchParams);
  const [asked, revisions, offered] = await Promise.all([
    membersAsked(revision, search),
    listRevisions(db(), office, batch),
    membersOffered(revision),
  ]);
  const latest = revisions.at(-1)?.letter ?? letter;
  const next = letterOf(revisions.length);
  return (
    <Sheet>
      <RevisionHead revision={revision} sheet="change" />
      <Zone title="Change a section" level={1} note={`makes revision ${next}; ${letter} stays as it is`}>
        {latest !== letter && (
          <Notice>
            The latest revision is {latest}. What is changed here starts from {letter}: what was changed or brought in after it is
            not in {next}.
          </Notice>
        )}
        <ChooseMembers
          key={search.toString()}
          action={pages.sheet(batch, letter, 'change')}
          chosen={asked.what}
          offered={offered}
        />
        {asked.tooMany && (
          <Notice kind="near">
            More than {mostMembers.toLocaleString('en-GB')} members fit this view. Choose them by section, role or group, or
            filter further.
          </Notice>
        )}
        {asked.none && <Notice kind="near">No member of revision {letter} fits this view.</Notice>}
      </Zone>
      {asked.what && (
        <ChangeSection
          // a form of its own for each choice: what was typed for one is nothing to another
          key={`${letter} ${search.toString()}`}
          batch={batch}
          letter={letter}
          next={next}
          units={units}
          what={asked.what}
          words={askedWords(asked.what)}
          first={search.get('to')}
        />
      )}
      <FromSheet key={letter} batch={batch} letter={letter} next={next} />
    </Sheet>
  );
}
