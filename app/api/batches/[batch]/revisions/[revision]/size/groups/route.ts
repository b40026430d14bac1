import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { requireRead } from '@/app/_server/make-change';
import { groupsToSize } from '@/app/_server/groups-to-size';

/** Roles, groups and sections that members of the revision have, each with how many. */
export const GET = door(
  atRevision('read a batch', async ({ revision }) => {
    requireRead(revision);
    return Response.json({ groups: await groupsToSize(revision) });
  }),
);
