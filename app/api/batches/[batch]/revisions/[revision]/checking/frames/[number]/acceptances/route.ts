import { atRevision } from '@/app/_server/at-revision';
import { refuse, requireChecker, requireMarkedFrame } from '@/app/_server/checking-detail';
import { door } from '@/app/_server/door';
import { parse, queryOf, readJson } from '@/app/_server/input';
import { db } from '@/db/client';
import { findCheckProgress } from '@/db/queries/checking-list';
import { endAcceptance, insertAcceptances } from '@/db/queries/checking-marks';
import { acceptedInput, acceptInput } from '@/lib/api/checking-inputs';

/** Accepts checks that are over or not checked, with the reason that is printed beside them. */
export const POST = door(
  atRevision<'number'>('check', async ({ request, person, revision, params }) => {
    await requireChecker(person, revision);
    const { checks, reason, alike } = await readJson(request, acceptInput);
    const frame = await requireMarkedFrame(revision, params.number);
    const made = await insertAcceptances(db(), revision, frame, person, { items: checks, reason, alike });
    refuse(typeof made === 'string' ? made : null);
    const progress = await findCheckProgress(db(), person.office, revision.id);
    return Response.json({ accepted: made, progress }, { status: 201 });
  }),
);

/** Takes the acceptance of a check back, `?check=3`. */
export const DELETE = door(
  atRevision<'number'>('check', async ({ request, person, revision, params }) => {
    await requireChecker(person, revision);
    const { check } = parse(acceptedInput, queryOf(request));
    refuse(await endAcceptance(db(), revision, await requireMarkedFrame(revision, params.number), person, check));
    return Response.json({ progress: await findCheckProgress(db(), person.office, revision.id) });
  }),
);
