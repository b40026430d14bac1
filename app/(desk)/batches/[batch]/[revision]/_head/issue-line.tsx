import Link from 'next/link';
import { day } from '@/app/_server/dates';
import { db } from '@/db/client';
import { findIssueOfRevision } from '@/db/queries/issues';
import type { RevisionRecord } from '@/db/queries/revisions';
import { engineVersion } from '@/lib/analysis/engine-version';
import { pages } from '@/lib/api/addresses';

/** Where a checked revision goes on to, or what became of its issue; nothing before it is checked. */
export async function IssueLine({ revision }: { readonly revision: RevisionRecord }) {
  const { office, id, batch, letter, state, engine } = revision;
  if (state === 'checked') {
    return (
      <p className="issue-line">
        Passed by the checker. <Link href={pages.toIssue(batch, letter)}>Issue it</Link>
      </p>
    );
  }
  if (state !== 'issued' && state !== 'superseded' && state !== 'withdrawn') return null;
  const issue = await findIssueOfRevision(db(), office, id);
  if (!issue) return null;
  const { number, supersededBy, withdrawn, issuedAt, issuedBy } = issue;
  return (
    <p className={`issue-line ${state === 'issued' ? '' : 'issue-line-over'}`}>
      {state === 'issued' && 'Issued as '}
      {state === 'superseded' && 'Superseded: it was issued as '}
      {state === 'withdrawn' && 'Withdrawn: it was issued as '}
      <Link href={pages.issue(issue.id)}>{number}</Link> on {day(issuedAt)} by {issuedBy.name}.{' '}
      {supersededBy && (
        <>
          <Link href={pages.issue(supersededBy.id)}>{supersededBy.number}</Link> took its place.{' '}
        </>
      )}
      {withdrawn && `${withdrawn.by} withdrew it on ${day(withdrawn.at)}: ${withdrawn.reason} `}
      {engine !== null && engine !== engineVersion && (
        <>
          What is shown are the numbers as stored, by {engine}; drawings and diagrams are drawn by {engineVersion}.{' '}
          <Link href={pages.issues()}>Would it alter them?</Link>
        </>
      )}
    </p>
  );
}
