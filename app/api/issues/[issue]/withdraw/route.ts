import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { atIssue } from '@/app/_server/issue-things';
import { db } from '@/db/client';
import { withdrawIssue } from '@/db/queries/issue-acts';
import { ApiError } from '@/lib/api/error';
import { withdrawInput } from '@/lib/api/issue-inputs';
import { mayWithdraw } from '@/lib/issuing/why-not-issue';

/** Withdraws an issue with its reason; everyone who was sent it or took a file of it is told. */
export const POST = door(
  atIssue('issue', async ({ request, person, issue }) => {
    const { reason } = await readJson(request, withdrawInput);
    if (!mayWithdraw(person, issue.issuedBy.id))
      throw new ApiError('not-allowed', `The lead withdraws an issue, or ${issue.issuedBy.name}, who issued it.`);
    const told = await withdrawIssue(db(), issue, { by: person, reason });
    if (told === undefined) {
      const why =
        issue.state === 'withdrawn' ? 'It is withdrawn already.' : 'Nobody has it yet, so there is nothing to withdraw.';
      throw new ApiError('conflict', why);
    }
    return Response.json({ issue: { id: issue.id, number: issue.number, state: 'withdrawn' }, told });
  }),
);
