import { activityPage, askedActivity } from '@/app/_server/activity';
import { door } from '@/app/_server/door';
import { parse, queryOf } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { db } from '@/db/client';
import { listActivity } from '@/db/queries/activity';
import { activityInput } from '@/lib/api/people-inputs';

/** What was done in the office, people and settings included, the newest first, a page at a time. */
export const GET = door(async (request) => {
  const lead = await requirePerson(request, 'read the office’s activity');
  const asked = askedActivity(undefined, parse(activityInput, queryOf(request)));
  const entries = await listActivity(db(), lead.office, { ...asked, limit: activityPage });
  return Response.json({ entries, before: entries.length < activityPage ? null : entries.at(-1)!.id });
});
