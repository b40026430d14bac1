import { atRevision } from '@/app/_server/at-revision';
import { comparedPage, comparedTwo, needRead, recordedBetween, settingsThatDiffer } from '@/app/_server/compared';
import { door } from '@/app/_server/door';
import { parse, queryOf } from '@/app/_server/input';
import { ApiError } from '@/lib/api/error';
import { compareInput } from '@/lib/api/inputs';

/**
 * This revision compared with another of its batch (`?with=A`; the one it was made from, else the one before, if not given):
 * settings and inputs that differ, changes recorded between them, figures of the whole, and a page of one `list` (frames,
 * members, reactions, inputs, cells) with `show` (moved, over, near, within, not-checked, only, critical, mass, all) and `by`.
 */
export const GET = door(
  atRevision('read a batch', async ({ request, person, revision }) => {
    const asked = parse(compareInput, queryOf(request));
    const two = await comparedTwo(person, revision, asked.with);
    if (two === null) throw new ApiError('conflict', 'This batch has no other revision to compare with.');
    needRead(two);
    const { totals, inputs, page, causes, matching } = await comparedPage(two, asked, false);
    return Response.json({
      before: two.before.letter,
      after: two.after.letter,
      settings: settingsThatDiffer(two),
      recorded: await recordedBetween(two),
      inputs,
      totals,
      list: page.list,
      rows: page.rows,
      causes,
      matching,
      page: asked.page,
      size: asked.size,
    });
  }),
);
