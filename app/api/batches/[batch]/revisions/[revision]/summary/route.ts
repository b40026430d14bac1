import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { queryOf } from '@/app/_server/input';
import { db } from '@/db/client';
import { findSummary, listParameterRatios } from '@/db/queries/summary';
import { certificateSoFar } from '@/app/_server/certificate';
import { notFound } from '@/lib/api/error';

/**
 * A revision at a glance: every frame's ratio and verdict in sheet order, their spread, what governs, the worst.
 * `?over=PARAMETER` gives the ratios over a family's parameter instead.
 */
export const GET = door(
  atRevision('read a batch', async ({ request, person, revision }) => {
    const { over } = queryOf(request);
    if (over !== undefined) {
      return Response.json({ ratios: await listParameterRatios(db(), person.office, revision.id, over) });
    }
    const summary = await findSummary(db(), person.office, revision.id);
    if (summary === undefined) throw notFound('revision');
    const certificate = await certificateSoFar(revision);
    return Response.json({ state: revision.state, summary, certificate });
  }),
);
