import { door } from '@/app/_server/door';
import { atIssue } from '@/app/_server/issue-things';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { findEngineTest } from '@/db/queries/engine-tests';
import { findLatestJob, insertJob } from '@/db/queries/jobs';
import { engineVersion } from '@/lib/analysis/engine-version';
import { ApiError } from '@/lib/api/error';
import { wasHandedOver } from '@/lib/issuing/issue-states';
import { queue } from '@/worker/boot';

/** Whether the present engine would alter what was issued, as it was tested last; and how far a test is. */
export const GET = door(
  atIssue('read issues', async ({ issue }) => {
    const test = await findEngineTest(db(), issue.office, issue.id, engineVersion);
    const job = await findLatestJob(db(), issue.office, issue.revision.id, 'retest');
    const going = job && (job.state === 'queued' || job.state === 'running') ? { done: job.done, of: job.total } : null;
    return Response.json({
      issuedBy: issue.engine,
      engine: engineVersion,
      test: test ?? null,
      going,
      failure: job?.error ?? null,
    });
  }),
);

/** Evaluates every frame again by the present engine and compares; nothing of the issue is changed. */
export const POST = door(
  atIssue('test issued numbers', async ({ person, issue }) => {
    const { id, office, project, batch, revision } = issue;
    if (!wasHandedOver(issue.state)) throw new ApiError('conflict', 'It is not issued yet.');
    await insertJob(db(), office, { kind: 'retest', revision: revision.id, person: person.id, payload: { issue: id } });
    queue().wake();
    const detail = { issue: id, number: issue.number, engine: engineVersion };
    const place = { project: project.id, batch: batch.id, revision: revision.id };
    await insertActivity(db(), office, { what: 'tested issued numbers', ...place, person: person.id, detail });
    return Response.json({ issue: { id, number: issue.number }, engine: engineVersion }, { status: 202 });
  }),
);
