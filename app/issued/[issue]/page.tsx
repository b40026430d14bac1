import type { Metadata } from 'next';
import Link from 'next/link';
import { redirect } from 'next/navigation';
import { Acknowledge, Ask, Say } from '@/app/_client/issue-forms';
import { checkedWords } from '@/app/_server/checked-words';
import { day, dayTime } from '@/app/_server/dates';
import { fileAbout, issueTitle, shownQuestion } from '@/app/_server/issue-shown';
import { requireIssue, requireIssued, revisionOfIssue } from '@/app/_server/issue-things';
import { changedSince, issuedCells, issuedCounts, issuedFrames, type IssuedCell } from '@/app/_server/issued-view';
import { pagePerson, requirePagePerson } from '@/app/_server/page-person';
import { pageThing } from '@/app/_server/page-thing';
import { type SearchParams, toParams } from '@/app/_server/search-params';
import { stripFrames } from '@/app/(desk)/batches/[batch]/[revision]/_head/strip-frames';
import { IssueFiles } from '@/components/issues/issue-files';
import { IssueList } from '@/components/issues/issue-list';
import { IssueStanding } from '@/components/issues/issue-standing';
import { QuestionThread } from '@/components/issues/question-thread';
import { Strip } from '@/components/strip/strip';
import { TitleBlock } from '@/components/title-block/title-block';
import { Cautions } from '@/components/ui/notice';
import { Columns, Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { findReceipt, listDownloads, listIssueFiles } from '@/db/queries/issue-files';
import { listQuestions } from '@/db/queries/issue-questions';
import { listIssuesFor, type IssueRecord } from '@/db/queries/issues';
import { may, type Person } from '@/lib/access/may';
import { api, pages } from '@/lib/api/addresses';
import { issuedFramesInput } from '@/lib/api/issue-inputs';
import { fileWords } from '@/lib/issuing/issue-file';
import { issueSentence } from '@/lib/issuing/issue-sentence';
import { Changed } from './changed';
import { FramesTable } from './frames-table';

export const metadata: Metadata = { title: 'Issue' };

interface IssuedProps {
  readonly params: Promise<{ readonly issue: string }>;
  readonly searchParams: Promise<SearchParams>;
}

/** One issue as its client reads it: the answer first, then what to take away, the frames, and whom to ask. */
export default async function IssuedOnePage({ params, searchParams }: IssuedProps) {
  const { issue: asked } = await params;
  const anyone = await pagePerson();
  // a letter reaches the office's people too
  if (anyone && may(anyone, 'read issues')) redirect(pages.issue((await pageThing(requireIssue(anyone, asked))).id));
  const person = await requirePagePerson('read what was issued', `/issued/${asked}`);
  const issue = await pageThing(requireIssued(person, asked));
  const revision = await revisionOfIssue(issue);
  const search = toParams(await searchParams);
  const [cells, own] = [await issuedCells(issue), await listIssuesFor(db(), person.office, person.id)];
  const nearLimit = revision.settings?.nearLimit ?? 0.9;
  const later = issue.supersededBy;
  return (
    <Sheet>
      <TitleBlock {...issueTitle(issue, revision)} />
      {issue.state !== 'issued' && (
        <div className="p-4 pb-0">
          <IssueStanding
            state={issue.state}
            number={issue.number}
            later={
              later && { number: later.number, href: own.some(({ id }) => id === later.id) ? pages.issuedOne(later.id) : null }
            }
            withdrawn={issue.withdrawn && { ...issue.withdrawn, at: day(issue.withdrawn.at) }}
          />
        </div>
      )}
      <Columns
        main={<Answer issue={issue} cells={cells} nearLimit={nearLimit} />}
        side={<TakeAway person={person} issue={issue} />}
      />
      <Columns
        main={<Frames person={person} issue={issue} cells={cells} search={search} units={revision.units} nearLimit={nearLimit} />}
        side={
          <>
            <Questions person={person} issue={issue} frame={search.get('frame') ?? ''} />
            <Zone title="Issues">
              <IssueList
                issues={own
                  .filter((one) => one.batch.id === issue.batch.id)
                  .map((one) => ({
                    number: one.number,
                    href: pages.issuedOne(one.id),
                    date: day(one.issuedAt),
                    revision: one.revision.letter,
                    state: one.state,
                    here: one.id === issue.id,
                  }))}
              />
            </Zone>
          </>
        }
      />
      <Cautions {...checkedWords(revision)} />
    </Sheet>
  );
}

function Answer({ issue, cells, nearLimit }: { issue: IssueRecord; cells: readonly IssuedCell[]; nearLimit: number }) {
  const { acceptances, notIssued } = issue.cover;
  return (
    <Zone>
      <h1 className="issue-answer">{issueSentence(issuedCounts(cells, issue))}</h1>
      <p className="issue-said">
        {issue.state === 'issued' ? 'This issue is in force, with the cautions below.' : `This issue is ${issue.state}.`}
        {issue.supersedes && ` It takes the place of ${issue.supersedes.number}.`} {issue.note}
        {acceptances.length > 0 &&
          ` Of what is over or not checked, ${acceptances.length} ${acceptances.length === 1 ? 'check was' : 'checks were'} accepted by the checker, each with its reason beside it; the rest is not to be built from.`}
      </p>
      <Strip
        frames={stripFrames(cells)}
        nearLimit={nearLimit}
        filters={false}
        hrefPattern={`${pages.issuedOne(issue.id)}?frame={frame}#frames`}
      />
      {notIssued.length > 0 && (
        <details className="pt-2">
          <summary>
            Not issued: {notIssued.length} {notIssued.length === 1 ? 'frame' : 'frames'} of the sheets
          </summary>
          <ul>
            {notIssued.map(({ frame, reason }) => (
              <li key={frame}>
                <b>{frame}</b> {reason}
              </li>
            ))}
          </ul>
        </details>
      )}
    </Zone>
  );
}

async function TakeAway({ person, issue }: { person: Person; issue: IssueRecord }) {
  const [files, [last], received] = [
    await listIssueFiles(db(), issue.office, issue.id),
    await listDownloads(db(), issue.office, issue.id, { person: person.id, limit: 1 }),
    await findReceipt(db(), issue.id, person.id),
  ];
  return (
    <Zone title="Take away">
      <IssueFiles
        first={issue.state === 'issued'}
        files={files.map((file) => ({ ...file, about: fileAbout(file), href: api.issuedFile(issue.id, file.kind) }))}
      />
      <p className="text-ink2 pt-2">
        Downloads are recorded
        {last ? `: last by you, ${fileWords[last.file].toLowerCase()}, ${dayTime(last.at)}.` : '. You have taken nothing yet.'}
      </p>
      {received === null ? (
        <Acknowledge address={api.receipt(issue.id)} number={issue.number} />
      ) : (
        <p className="pt-2">You acknowledged receipt on {dayTime(received)}.</p>
      )}
    </Zone>
  );
}

interface FramesProps {
  readonly person: Person;
  readonly issue: IssueRecord;
  readonly cells: readonly IssuedCell[];
  readonly search: URLSearchParams;
  readonly units: 'metric' | 'us';
  readonly nearLimit: number;
}

async function Frames({ person, issue, cells, search, units, nearLimit }: FramesProps) {
  const read = issuedFramesInput.safeParse(Object.fromEntries(search));
  const chosen = cells.find(({ id }) => id === search.get('frame')) ?? null;
  const asked = read.success ? read.data : issuedFramesInput.parse({});
  // a frame that is named is on the page that is shown
  const at = search.has('page') || chosen === null ? -1 : cells.indexOf(chosen);
  const plain = asked.find === undefined && asked.group === undefined;
  const shown = at >= 0 && plain ? { ...asked, page: Math.floor(at / asked.size) + 1 } : asked;
  const { rows, matching, groups } = await issuedFrames(issue, cells, shown);
  const questions = await listQuestions(db(), issue.office, issue.id, { person: person.id });
  const counts = new Map<string, number>();
  for (const { frameId } of questions) if (frameId !== null) counts.set(frameId, (counts.get(frameId) ?? 0) + 1);
  const changed = await changedSince(person, issue);
  const lastPage = Math.max(1, Math.ceil(matching / shown.size));
  const hrefOf = (more: Readonly<Record<string, string>>): string => {
    const kept = new URLSearchParams();
    if (asked.find) kept.set('find', asked.find);
    if (asked.group) kept.set('group', asked.group);
    for (const [key, value] of Object.entries(more)) kept.set(key, value);
    return `${pages.issuedOne(issue.id)}?${kept.toString()}#frames`;
  };
  return (
    <>
      <Zone title="Frames" note={`${matching.toLocaleString('en-GB')} of ${cells.length.toLocaleString('en-GB')}`} flush>
        <form id="frames" className="issue-finder" action={pages.issuedOne(issue.id)} role="search" aria-label="Find a frame">
          <label>
            <span className="field-head">Find a frame</span>
            <span className="field-box">
              <input name="find" type="search" defaultValue={asked.find ?? ''} maxLength={100} autoComplete="off" />
            </span>
          </label>
          {groups.length > 1 && (
            <label>
              <span className="field-head">Group</span>
              <select name="group" defaultValue={asked.group ?? ''}>
                <option value="">all groups</option>
                {groups.map((group) => (
                  <option key={group}>{group}</option>
                ))}
              </select>
            </label>
          )}
          <button type="submit" className="btn btn-outline">
            Find
          </button>
        </form>
        {rows.length === 0 ? (
          <p className="p-4">No frame of this issue fits. Look for a part of its name.</p>
        ) : (
          <FramesTable
            rows={rows}
            units={units}
            nearLimit={nearLimit}
            chosen={chosen?.id ?? null}
            asked={counts}
            hrefOf={(frame) => hrefOf({ frame, page: String(shown.page) })}
          />
        )}
        {lastPage > 1 && (
          <nav aria-label="Pages of frames" className="flex flex-wrap gap-4 px-4 py-2">
            {shown.page > 1 && <Link href={hrefOf({ page: String(shown.page - 1) })}>Previous page</Link>}
            <span className="text-ink2">
              page {shown.page} of {lastPage}
            </span>
            {shown.page < lastPage && <Link href={hrefOf({ page: String(shown.page + 1) })}>Next page</Link>}
          </nav>
        )}
      </Zone>
      {changed && (
        <Zone title={`What changed since ${changed.issue.number}`} note={`issued ${day(changed.issue.at)}`}>
          <Changed changed={changed} nearLimit={nearLimit} />
        </Zone>
      )}
    </>
  );
}

async function Questions({ person, issue, frame }: { person: Person; issue: IssueRecord; frame: string }) {
  const questions = await listQuestions(db(), issue.office, issue.id, { person: person.id });
  return (
    <Zone title="Ask about a frame" note="the office answers here; other clients don’t see it">
      {questions.map((question) => (
        <QuestionThread
          key={question.id}
          question={shownQuestion(
            question,
            question.frameId && `${pages.issuedOne(issue.id)}?frame=${encodeURIComponent(question.frameId)}#frames`,
          )}
          waiting="waiting for the office"
        >
          {question.answers.length > 0 && (
            <Say address={api.issuedQuestion(issue.id, question.id)} label="Ask further" button="Send" />
          )}
        </QuestionThread>
      ))}
      <Ask address={api.issuedQuestions(issue.id)} frame={frame} />
    </Zone>
  );
}
