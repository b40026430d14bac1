import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { clientsOf } from '@/app/_server/issue-preparing';
import { atIssue } from '@/app/_server/issue-things';
import { db } from '@/db/client';
import { sendIssueTo } from '@/db/queries/issue-acts';
import { listIssueClients } from '@/db/queries/issues';
import { ApiError } from '@/lib/api/error';
import { moreClientsInput } from '@/lib/api/issue-inputs';

/** To whom it was issued. */
export const GET = door(
  atIssue('read issues', async ({ issue }) => Response.json({ clients: await listIssueClients(db(), issue.office, issue.id) })),
);

/** Sends an issue that is in force to more clients of its project. */
export const POST = door(
  atIssue('issue', async ({ request, person, issue }) => {
    const { clients } = await readJson(request, moreClientsInput);
    if (issue.state !== 'issued')
      throw new ApiError('conflict', `It is ${issue.state}. Only an issue that is in force is sent to more people.`);
    const offered = (await clientsOf(issue.office, issue.project.id, null)).filter(({ id }) => clients.includes(id));
    if (offered.length !== new Set(clients).size) {
      const sentence = 'Choose clients who are assigned to the project.';
      throw new ApiError('bad-request', sentence, { fields: { clients: [sentence] } });
    }
    const sent = await sendIssueTo(db(), issue, { by: person, clients: offered });
    return Response.json({ sent: offered.filter(({ id }) => sent.includes(id)).map(({ name }) => name) });
  }),
);
