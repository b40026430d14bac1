import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { frameDetail } from '@/app/_server/frame-detail';

/**
 * One frame by its place in sheet order from 1: geometry, supports, checks with their working, and the loads,
 * reactions, movements and sampled N, V, M of one load case or combination (`?result=C1`; else the governing one).
 */
export const GET = door(
  atRevision<'number'>('read a batch', async ({ request, revision, params }) => {
    const result = new URL(request.url).searchParams.get('result');
    return Response.json({ frame: await frameDetail(revision, params.number, result) });
  }),
);
