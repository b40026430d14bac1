import 'server-only';
import type { IssueFileRecord } from '@/db/queries/issue-files';
import type { QuestionRecord } from '@/db/queries/issue-questions';
import type { IssueListed, IssueRecord } from '@/db/queries/issues';

/** An issue as the API gives it. */
export function publicIssue(issue: IssueRecord) {
  const { id, project, batch, revision, number, state, note, cover, supersedes, supersededBy, engine } = issue;
  return {
    id,
    number,
    state,
    project,
    batch: batch.name,
    revision: revision.letter,
    note,
    prepared: cover.prepared,
    checked: cover.checked,
    approved: cover.approved,
    issuedAt: issue.issuedAt,
    supersedes,
    supersededBy,
    withdrawn: issue.withdrawn,
    acceptances: cover.acceptances,
    notIssued: cover.notIssued,
    engine,
  };
}

/** The same for staff, with what came of it. */
export function listedIssue(issue: IssueListed) {
  const { clients, downloads, receipts, questions, open } = issue;
  return { ...publicIssue(issue), clients, downloads, receipts, questions, openQuestions: open };
}

export const publicFile = ({ kind, name, size, sha256, pages }: IssueFileRecord) => ({ kind, name, size, sha256, pages });

export function publicQuestion({ id, name, frame, frameId, text, at, answers, open }: QuestionRecord) {
  return {
    id,
    by: name,
    frame: frame === null ? null : { number: frame + 1, id: frameId },
    text,
    at,
    open,
    answers: answers.map((one) => ({ by: one.name, text: one.text, at: one.at })),
  };
}
