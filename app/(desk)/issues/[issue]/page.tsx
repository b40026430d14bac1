import type { Metadata } from 'next';
import Link from 'next/link';
import { Say } from '@/app/_client/issue-forms';
import { checkedWords } from '@/app/_server/checked-words';
import { day, dayTime } from '@/app/_server/dates';
import { clientsOf } from '@/app/_server/issue-preparing';
import { fileAbout, issueTitle, shownQuestion } from '@/app/_server/issue-shown';
import { requireIssue, revisionOfIssue } from '@/app/_server/issue-things';
import { issuedCells, issuedCounts } from '@/app/_server/issued-view';
import { requirePagePerson } from '@/app/_server/page-person';
import { pageThing } from '@/app/_server/page-thing';
import { IssueFiles } from '@/components/issues/issue-files';
import { IssueList } from '@/components/issues/issue-list';
import { IssueStanding } from '@/components/issues/issue-standing';
import { QuestionThread } from '@/components/issues/question-thread';
import { TitleBlock } from '@/components/title-block/title-block';
import { Cautions } from '@/components/ui/notice';
import { Columns, Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { findEngineTest } from '@/db/queries/engine-tests';
import { listDownloads, listIssueFiles } from '@/db/queries/issue-files';
import { listQuestions } from '@/db/queries/issue-questions';
import { listIssueClients, listIssues, type IssueRecord } from '@/db/queries/issues';
import type { Person } from '@/lib/access/may';
import { engineVersion } from '@/lib/analysis/engine-version';
import { api, pages } from '@/lib/api/addresses';
import { fileWords } from '@/lib/issuing/issue-file';
import { issueSentence } from '@/lib/issuing/issue-sentence';
import { mayWithdraw } from '@/lib/issuing/why-not-issue';
import { formatNumber } from '@/lib/units/format';
import { TestEngine } from '../test-engine';
import { SendToMore, Withdraw } from './issue-acts';

export const metadata: Metadata = { title: 'Issue' };

/** The record of an issue: what it is worth now, its files, who got and took them, what was asked and answered. */
export default async function IssuePage({ params }: { readonly params: Promise<{ readonly issue: string }> }) {
  const { issue: asked } = await params;
  const person = await requirePagePerson('read issues', `/issues/${asked}`);
  const issue = await pageThing(requireIssue(person, asked));
  const revision = await revisionOfIssue(issue);
  const cells = await issuedCells(issue);
  const { supersededBy: later, state, number } = issue;
  const title = issueTitle(issue, revision);
  return (
    <Sheet>
      <TitleBlock
        {...title}
        project={{ ...title.project, href: pages.project(issue.project.id) }}
        batch={{ ...title.batch, href: pages.revision(issue.batch.id, revision.letter) }}
      />
      {state !== 'issued' && (
        <div className="p-4 pb-0">
          <IssueStanding
            state={state}
            number={number}
            later={later && { number: later.number, href: pages.issue(later.id) }}
            withdrawn={issue.withdrawn && { ...issue.withdrawn, at: day(issue.withdrawn.at) }}
          />
        </div>
      )}
      <Columns
        main={
          <>
            <Zone>
              <h1 className="issue-answer">
                {number}: {issueSentence(issuedCounts(cells, issue))}
              </h1>
              <p className="issue-said">
                {issue.note} {issue.supersedes && `It takes the place of ${issue.supersedes.number}. `}
                <Link href={pages.revision(issue.batch.id, revision.letter)}>Revision {revision.letter} at the desk</Link>
              </p>
            </Zone>
            <QuestionsZone issue={issue} />
            <Clients person={person} issue={issue} />
            <Downloads issue={issue} />
          </>
        }
        side={
          <>
            <Files issue={issue} />
            <Engine issue={issue} />
            {state !== 'withdrawn' && mayWithdraw(person, issue.issuedBy.id) && (
              <Zone title="An error in it" note="it is withdrawn for good, and everyone who has it is told">
                <Withdraw address={api.issuePart(issue.id, 'withdraw')} number={number} />
              </Zone>
            )}
            <Others issue={issue} />
          </>
        }
      />
      <Cautions {...checkedWords(revision)} />
    </Sheet>
  );
}

async function Files({ issue }: { readonly issue: IssueRecord }) {
  const files = await listIssueFiles(db(), issue.office, issue.id);
  return (
    <Zone title="Files" note="as they were made; every download is recorded">
      <IssueFiles
        first={false}
        files={files.map((file) => ({ ...file, about: fileAbout(file), href: api.issueFile(issue.id, file.kind) }))}
      />
    </Zone>
  );
}

async function Downloads({ issue }: { readonly issue: IssueRecord }) {
  const downloads = await listDownloads(db(), issue.office, issue.id, { limit: 50 });
  return (
    <Zone title="Downloads" note={downloads.length === 50 ? 'the last 50' : undefined}>
      {downloads.length === 0 ? (
        <p>Nobody has taken a file yet.</p>
      ) : (
        <ul>
          {downloads.map(({ name, role, file, at }, index) => (
            <li key={index}>
              {dayTime(at)} <b>{name}</b> <span className="text-ink2">{role}</span>, {fileWords[file].toLowerCase()}
            </li>
          ))}
        </ul>
      )}
    </Zone>
  );
}

async function Engine({ issue }: { readonly issue: IssueRecord }) {
  const test = await findEngineTest(db(), issue.office, issue.id, engineVersion);
  return (
    <Zone title="Engine" note={issue.engine} aside={<TestEngine issue={issue.id} number={issue.number} />}>
      {!test && <p>Not tested by {engineVersion}: whether it would give the same numbers is not known.</p>}
      {test?.altered === 0 && (
        <p>
          Not altered: {test.frames} frames give the same numbers by {engineVersion} ({test.by}, {dayTime(test.at)}).
        </p>
      )}
      {test && test.altered > 0 && (
        <>
          <p className="issue-withdrawn">
            {engineVersion} would alter {test.altered} of {test.frames} frames, {test.verdicts} of them to another verdict.
          </p>
          <ul>
            {test.list.map(({ number, frame, before, now, what }) => (
              <li key={number}>
                <Link href={pages.frame(issue.batch.id, issue.revision.letter, number)}>{frame}</Link>{' '}
                {formatNumber(before.ratio, { significant: 4 })} {before.verdict} → {formatNumber(now.ratio, { significant: 4 })}{' '}
                {now.verdict} <span className="text-ink2">{what}</span>
              </li>
            ))}
          </ul>
        </>
      )}
    </Zone>
  );
}

async function Clients({ person, issue }: { readonly person: Person; readonly issue: IssueRecord }) {
  const clients = await listIssueClients(db(), issue.office, issue.id);
  const more = (await clientsOf(issue.office, issue.project.id, null)).filter(
    ({ id }) => !clients.some((client) => client.person === id),
  );
  const mayIssue = person.role === 'lead' || person.id === issue.issuedBy.id;
  return (
    <Zone title="Issued to">
      <div className="tbl-wrap" tabIndex={0} role="region" aria-label="Issued to">
        <table className="tbl issue-list">
          <caption className="sr-only">Clients who got this issue</caption>
          <thead>
            <tr>
              <th scope="col">Client</th>
              <th scope="col">E-mail</th>
              <th scope="col">Sent</th>
              <th scope="col">Receipt</th>
            </tr>
          </thead>
          <tbody>
            {clients.map(({ person: id, name, email, sentAt, receivedAt, active }) => (
              <tr key={id}>
                <th scope="row">{name}</th>
                <td>
                  {email}
                  {!active && <span className="text-ink2">, no longer of the project: sees it no more</span>}
                </td>
                <td>{dayTime(sentAt)}</td>
                <td>{receivedAt ? dayTime(receivedAt) : <span className="text-ink3">not acknowledged</span>}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {issue.state === 'issued' && mayIssue && more.length > 0 && (
        <SendToMore address={api.issuePart(issue.id, 'clients')} clients={more.map(({ id, name }) => ({ id, name }))} />
      )}
    </Zone>
  );
}

async function QuestionsZone({ issue }: { readonly issue: IssueRecord }) {
  const questions = await listQuestions(db(), issue.office, issue.id);
  return (
    <Zone title="Questions" note="who asked gets each answer by e-mail">
      {questions.length === 0 && <p>Nobody has asked anything.</p>}
      {questions.map((question) => (
        <QuestionThread
          key={question.id}
          question={shownQuestion(
            question,
            question.frame === null ? null : pages.frame(issue.batch.id, issue.revision.letter, question.frame + 1),
          )}
          waiting="waiting for an answer"
        >
          <Say address={api.answer(issue.id, question.id)} label={`Answer to ${question.name}`} button="Send the answer" />
        </QuestionThread>
      ))}
    </Zone>
  );
}

async function Others({ issue }: { readonly issue: IssueRecord }) {
  const issues = await listIssues(db(), issue.office, { batch: issue.batch.id });
  return (
    <Zone title="Issues of this batch" aside={<Link href={pages.issues(issue.project.id)}>of the project</Link>}>
      <IssueList
        issues={issues.map((one) => ({
          number: one.number,
          href: pages.issue(one.id),
          date: day(one.issuedAt),
          revision: one.revision.letter,
          state: one.state,
          here: one.id === issue.id,
        }))}
      />
    </Zone>
  );
}
