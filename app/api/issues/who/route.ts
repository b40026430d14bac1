import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { readOfficeSetting, updateOfficeSetting } from '@/db/queries/office-settings';
import { checkersIssueInput } from '@/lib/api/issue-inputs';

/** Whether checkers of this office may issue, beside the lead. */
export const GET = door(async (request) => {
  const person = await requirePerson(request, 'read issues');
  return Response.json({ checkersIssue: await readOfficeSetting(db(), person.office, 'checkers issue') });
});

export const PUT = door(async (request) => {
  const lead = await requirePerson(request, 'choose who issues');
  const { checkersIssue } = await readJson(request, checkersIssueInput);
  await updateOfficeSetting(db(), lead.office, { name: 'checkers issue', on: checkersIssue, person: lead.id });
  const detail = { checkersIssue: checkersIssue ? 'yes' : 'no' };
  await insertActivity(db(), lead.office, { what: 'chose who issues', person: lead.id, detail });
  return Response.json({ checkersIssue });
});
