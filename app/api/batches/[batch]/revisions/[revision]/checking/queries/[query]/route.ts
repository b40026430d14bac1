import { atRevision } from '@/app/_server/at-revision';
import { refuse } from '@/app/_server/checking-detail';
import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { db } from '@/db/client';
import { listPreparers } from '@/db/queries/checking-people';
import { answerQuery } from '@/db/queries/checking-queries';
import { answerInput } from '@/lib/api/checking-inputs';
import { notFound } from '@/lib/api/error';
import { idInput } from '@/lib/api/inputs';
import { whyNotCheck } from '@/lib/checking/independence';

/** Adds to a query (`text`), closes it (`close`: who raised it), or both. */
export const POST = door(
  atRevision<'query'>('answer a query', async ({ request, person, revision, params }) => {
    const { text, close } = await readJson(request, answerInput);
    const id = idInput.safeParse(params.query);
    const mayClose = whyNotCheck(person, await listPreparers(db(), person.office, revision.id)) === null;
    const said = { text: text === '' ? null : text, close, mayClose };
    const done = id.success ? await answerQuery(db(), revision, id.data, person, said) : undefined;
    if (done === undefined) throw notFound('query');
    refuse(done);
    return Response.json({ query: id.data, closed: close });
  }),
);
