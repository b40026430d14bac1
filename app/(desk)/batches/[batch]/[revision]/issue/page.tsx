import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { checkedWords } from '@/app/_server/checked-words';
import { day } from '@/app/_server/dates';
import { makingOf, preparingOf, type Preparing } from '@/app/_server/issue-preparing';
import { requirePagePerson } from '@/app/_server/page-person';
import type { RevisionParams } from '@/app/_server/page-revision';
import { pageThing } from '@/app/_server/page-thing';
import { requireRevision } from '@/app/_server/things';
import { Fact } from '@/components/ui/fact';
import { Cautions, Notice } from '@/components/ui/notice';
import { Columns, Sheet, Zone } from '@/components/ui/sheet';
import { api, pages } from '@/lib/api/addresses';
import { wasHandedOver } from '@/lib/issuing/issue-states';
import { issueSentence } from '@/lib/issuing/issue-sentence';
import type { Signature } from '@/lib/reports/issue-cover';
import { RevisionHead } from '../_head/revision-head';
import { IssueForm } from './issue-form';

export const metadata: Metadata = { title: 'Issue' };

/** What issuing this revision gives, and the act itself; once it is issued, its record. */
export default async function IssuePage({ params }: { readonly params: Promise<RevisionParams> }) {
  const { batch, revision: letter } = await params;
  const person = await requirePagePerson('read issues', `/batches/${batch}/${letter}/issue`);
  const revision = await pageThing(requireRevision(person, batch, letter));
  const making = await makingOf(revision);
  if (making && wasHandedOver(making.state)) redirect(pages.issue(making.issue));
  const preparing = await preparingOf(person, revision);
  const { basis, why, clients } = preparing;
  return (
    <Sheet>
      <RevisionHead revision={revision} sheet="issue" />
      <Columns
        main={
          <>
            <Zone>
              <h1 className="issue-answer">
                {why.length === 0 || making?.state === 'making'
                  ? `Issue revision ${letter} as ${making?.state === 'making' ? making.number : basis.number.text}`
                  : `Revision ${letter} can’t be issued by you now`}
              </h1>
              {making?.state !== 'making' && why.length > 0 && (
                <ul>
                  {why.map((one) => (
                    <li key={one}>{one}</li>
                  ))}
                </ul>
              )}
              {making?.state === 'failed' && <Notice kind="error">{making.failure}</Notice>}
              <IssueForm
                address={api.toIssue(revision.batch, letter)}
                clients={clients}
                frames={revision.frames}
                flagged={basis.counts.over + basis.counts.notChecked + basis.counts.notIssued}
                may={why.length === 0}
                making={making?.state === 'making' ? making : null}
              />
              {clients.length === 0 && (
                <p>
                  No client is assigned to the project, so nobody would get it.{' '}
                  <Link href={pages.project(revision.project)}>The lead assigns people to the project.</Link>
                </p>
              )}
            </Zone>
          </>
        }
        side={<WhatIsIssued {...preparing} />}
      />
      <Cautions {...checkedWords(revision)} />
    </Sheet>
  );
}

function WhatIsIssued({ basis }: Preparing) {
  const { counts, notIssued, acceptances, prepared, checked, before } = basis;
  return (
    <>
      <Zone title="What is issued">
        <p>{issueSentence(counts)}</p>
        <dl className="facts">
          <Fact name="Prepared">{signed(prepared)}</Fact>
          <Fact name="Checked">{signed(checked)}</Fact>
          <Fact name="Takes the place of">{before ? `${before.number}, ${before.state}` : 'none'}</Fact>
        </dl>
      </Zone>
      {acceptances.length > 0 && (
        <Zone title="Accepted by the checker" note="printed beside each row">
          <ul>
            {acceptances.map(({ frame, subject, check, verdict, reason, by }) => (
              <li key={`${frame} ${subject} ${check}`}>
                <b>{frame}</b> {subject !== null && subject !== frame && `${subject}, `}
                {check}, {verdict}: {reason} <span className="text-ink2">{by.name}</span>
              </li>
            ))}
          </ul>
        </Zone>
      )}
      <Zone title="What is not issued" note="listed on the covers as not issued">
        {notIssued.length === 0 ? (
          <p>Every frame of the sheets has a solution and is issued.</p>
        ) : (
          <ul>
            {notIssued.map(({ frame, reason }) => (
              <li key={frame}>
                <b>{frame}</b> {reason}
              </li>
            ))}
          </ul>
        )}
      </Zone>
    </>
  );
}

const signed = (by: Signature | null): string => (by ? `${by.name}, ${day(by.at)}` : 'not yet');
