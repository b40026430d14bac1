import { changedSince, issuedCells, issuedCounts } from '@/app/_server/issued-view';
import { door } from '@/app/_server/door';
import { atIssue } from '@/app/_server/issue-things';
import { publicFile, publicIssue } from '@/app/_server/public-issue';
import { db } from '@/db/client';
import { findReceipt, listIssueFiles } from '@/db/queries/issue-files';
import { issueSentence } from '@/lib/issuing/issue-sentence';

/** One issue: its sentence, files with their SHA-256, and what changed since the one before it. */
export const GET = door(
  atIssue('read what was issued', async ({ person, issue }) => {
    const counts = issuedCounts(await issuedCells(issue), issue);
    return Response.json({
      issue: publicIssue(issue),
      sentence: issueSentence(counts),
      counts,
      files: (await listIssueFiles(db(), issue.office, issue.id)).map(publicFile),
      receivedAt: await findReceipt(db(), issue.id, person.id),
      changed: await changedSince(person, issue),
    });
  }),
);
