import { door } from '@/app/_server/door';
import { publicRevision } from '@/app/_server/public-revision';
import { atRevision } from '@/app/_server/at-revision';
import { db } from '@/db/client';
import { listSheets } from '@/db/queries/problems';

/** A revision: its state, its settings and where each comes from, what was read of each sheet. */
export const GET = door(
  atRevision('read a batch', async ({ person, revision }) => {
    const sheets = await listSheets(db(), person.office, revision.id);
    return Response.json({ revision: publicRevision(revision), sheets });
  }),
);
