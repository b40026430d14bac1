import { activityCsv, askedActivity } from '@/app/_server/activity';
import { door } from '@/app/_server/door';
import { attachment, bodyOf } from '@/app/_server/download';
import { parse, queryOf } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { activityInput } from '@/lib/api/people-inputs';

/** What was done in the office as CSV: every entry that the filters leave. */
export const GET = door(async (request) => {
  const lead = await requirePerson(request, 'read the office’s activity');
  const asked = askedActivity(undefined, parse(activityInput, queryOf(request)));
  return attachment(`Activity of ${lead.officeName}.csv`, bodyOf(activityCsv(lead.office, asked)));
});
