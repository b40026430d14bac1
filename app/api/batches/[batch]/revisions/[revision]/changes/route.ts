import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { makeChange } from '@/app/_server/make-change';
import { db } from '@/db/client';
import { listChanges } from '@/db/queries/changes';
import { changesInput } from '@/lib/api/inputs';

/** The changes by which a revision was made: what, from what to what, why, by whom; none where its files were brought in. */
export const GET = door(
  atRevision('read a batch', async ({ revision }) => {
    const changes = await listChanges(db(), revision.office, revision.id);
    return Response.json({ madeFrom: revision.madeFrom, changes });
  }),
);

/** Makes the batch's next revision from this one by changes, and runs it where that is asked; this one stays as it is. */
export const POST = door(
  atRevision('change a revision', async ({ request, person, revision }) => {
    const letter = await makeChange(person, revision, await readJson(request, changesInput));
    return Response.json({ batch: { id: revision.batch, name: revision.batchName }, revision: letter }, { status: 201 });
  }),
);
