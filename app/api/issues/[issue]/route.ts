import { door } from '@/app/_server/door';
import { atIssue } from '@/app/_server/issue-things';
import { publicFile, publicIssue, publicQuestion } from '@/app/_server/public-issue';
import { db } from '@/db/client';
import { listDownloads, listIssueFiles } from '@/db/queries/issue-files';
import { listQuestions } from '@/db/queries/issue-questions';
import { listIssueClients } from '@/db/queries/issues';

/** The record of an issue: files with their SHA-256, to whom, who took what, questions. */
export const GET = door(
  atIssue('read issues', async ({ issue }) => {
    const { office, id } = issue;
    const [files, clients, downloads, questions] = await Promise.all([
      listIssueFiles(db(), office, id),
      listIssueClients(db(), office, id),
      listDownloads(db(), office, id),
      listQuestions(db(), office, id),
    ]);
    return Response.json({
      issue: publicIssue(issue),
      files: files.map(publicFile),
      clients,
      downloads: downloads.map(({ name, role, file, at }) => ({ by: name, role, file, at })),
      questions: questions.map(publicQuestion),
    });
  }),
);
