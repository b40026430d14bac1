import 'server-only';
import { standing, type ShownQuestion } from '@/components/issues/issue-data';
import type { IssueFileRecord } from '@/db/queries/issue-files';
import type { QuestionRecord } from '@/db/queries/issue-questions';
import type { IssueRecord } from '@/db/queries/issues';
import type { RevisionRecord } from '@/db/queries/revisions';
import type { Signature } from '@/lib/reports/issue-cover';
import { day, dayTime } from './dates';

const signed = (by: Signature | null): string | null => by && `${by.name}, ${day(by.at)}`;

/** What the title block of an issue says: names and dates as they stand on its covers. */
export function issueTitle(issue: IssueRecord, revision: RevisionRecord) {
  const { project, batch, cover, number, supersedes, state } = issue;
  return {
    project: { name: project.number ? `${project.number} ${project.name}` : project.name },
    batch: { name: batch.name },
    revision: { letter: revision.letter, date: day(revision.createdAt) },
    state: standing[state],
    prepared: signed(cover.prepared),
    checked: signed(cover.checked),
    issued: signed(cover.approved),
    inputHash: revision.input?.sha256 ?? null,
    more: [{ label: 'Issue', value: supersedes ? `${number}, replaces ${supersedes.number}` : number }],
  };
}

/** "PDF, 214 pages", "XLSX" */
export function fileAbout({ name, pages }: IssueFileRecord): string {
  const ending = (name.split('.').at(-1) ?? '').toUpperCase();
  return pages === null ? ending : `${ending}, ${pages.toLocaleString('en-GB')} ${pages === 1 ? 'page' : 'pages'}`;
}

export function shownQuestion(question: QuestionRecord, href: string | null): ShownQuestion {
  const { id, frameId, open, answers } = question;
  return {
    id,
    about: frameId === null ? 'The whole issue' : `Frame ${frameId}`,
    href,
    open,
    posts: [question, ...answers].map(({ person, name, text, at }) => ({
      by: name,
      text,
      at: dayTime(at),
      office: person !== question.person,
    })),
  };
}
