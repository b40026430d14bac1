import { atRevision } from '@/app/_server/at-revision';
import { frameChecking } from '@/app/_server/checking-detail';
import { door } from '@/app/_server/door';

/** A frame's marks, queries (of earlier revisions too), what is to be accepted of it, own values, and sums by hand (SI). */
export const GET = door(
  atRevision<'number'>('read a batch', async ({ person, revision, params }) =>
    Response.json({ frame: await frameChecking(person, revision, params.number) }),
  ),
);
