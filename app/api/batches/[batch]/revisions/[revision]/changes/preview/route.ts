import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { requireRead } from '@/app/_server/make-change';
import { previewChanges } from '@/app/_server/preview-changes';
import { previewInput } from '@/lib/api/inputs';

/** Members listed one by one; the counts are of all. */
const mostListed = 500;

/** What a change of section would do, before anything runs: sections, frames and members it touches. Nothing is stored. */
export const POST = door(
  atRevision('change a revision', async ({ request, person, revision }) => {
    requireRead(revision);
    const { change } = await readJson(request, previewInput);
    const [preview] = await previewChanges(person, revision, [change]);
    if (!preview) throw new Error('Expected a preview of the change');
    const { members, touched, ...rest } = preview;
    return Response.json({
      ...rest,
      frames: touched.length,
      touched: touched.slice(0, mostListed),
      count: members.length,
      members: members.slice(0, mostListed),
    });
  }),
);
