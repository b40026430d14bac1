import { z } from 'zod';
import { door } from '@/app/_server/door';
import { parse, queryOf } from '@/app/_server/input';
import { requirePerson } from '@/app/_server/person';
import { listedIssue } from '@/app/_server/public-issue';
import { requireProject } from '@/app/_server/things';
import { db } from '@/db/client';
import { listIssues } from '@/db/queries/issues';
import { engineVersion } from '@/lib/analysis/engine-version';

/** Issues of the office, or of one project (`?project=`), the newest first, beside the engine that works now. */
export const GET = door(async (request) => {
  const person = await requirePerson(request, 'read issues');
  const { project } = parse(z.object({ project: z.string().optional() }), queryOf(request));
  const of = project === undefined ? {} : { project: (await requireProject(person, project)).id };
  const issues = await listIssues(db(), person.office, of);
  return Response.json({ engine: engineVersion, issues: issues.map(listedIssue) });
});
