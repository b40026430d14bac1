import { door } from '@/app/_server/door';
import { parse, queryOf } from '@/app/_server/input';
import { issuedCells, issuedFrames } from '@/app/_server/issued-view';
import { atIssue } from '@/app/_server/issue-things';
import { issuedFramesInput } from '@/lib/api/issue-inputs';

/** Frames of an issue with verdict, ratio and sections: `find`, `group`, `verdict`, `page`, `size`. */
export const GET = door(
  atIssue('read what was issued', async ({ request, issue }) => {
    const asked = parse(issuedFramesInput, queryOf(request));
    const { rows, matching, groups } = await issuedFrames(issue, await issuedCells(issue), asked);
    return Response.json({ frames: rows, matching, groups, page: asked.page, size: asked.size });
  }),
);
