import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { requireRead } from '@/app/_server/make-change';
import { db } from '@/db/client';
import { findFrame } from '@/db/queries/frames';
import { ApiError, notFound } from '@/lib/api/error';
import { frameNumberInput } from '@/lib/api/inputs';

/** One frame's model in SI as it is analysed, with the settings: what a try of other sections is worked out from. */
export const GET = door(
  atRevision<'number'>('read a batch', async ({ revision, params }) => {
    const settings = requireRead(revision);
    const number = frameNumberInput.safeParse(params.number);
    const found = number.success ? await findFrame(db(), revision.office, revision.id, number.data - 1) : undefined;
    if (found === undefined) throw notFound('frame');
    const { frame } = found;
    if (frame === null) throw new ApiError('conflict', 'Errors in its sheets stop this frame, so nothing can be tried on it.');
    return Response.json({ frame, settings, hash: found.hash });
  }),
);
