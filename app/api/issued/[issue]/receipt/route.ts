import { door } from '@/app/_server/door';
import { atIssue } from '@/app/_server/issue-things';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { findReceipt, insertReceipt } from '@/db/queries/issue-files';

/** Acknowledges receipt; once is enough, and again does no harm. */
export const POST = door(
  atIssue('ask about an issue', async ({ person, issue }) => {
    if (await insertReceipt(db(), issue.id, person.id)) {
      await insertActivity(db(), issue.office, {
        what: 'acknowledged receipt',
        project: issue.project.id,
        batch: issue.batch.id,
        revision: issue.revision.id,
        person: person.id,
        detail: { issue: issue.id, number: issue.number },
      });
    }
    return Response.json({ receivedAt: await findReceipt(db(), issue.id, person.id) });
  }),
);
