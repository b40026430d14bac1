import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { attachment } from '@/app/_server/download';
import { parse, queryOf } from '@/app/_server/input';
import { makeChange, requireRead } from '@/app/_server/make-change';
import { previewChangesSheet } from '@/app/_server/preview-changes-sheet';
import { readUpload } from '@/app/_server/upload';
import { ApiError } from '@/lib/api/error';
import { changesSheetInput, changesTemplateInput } from '@/lib/api/own-inputs';
import { changesTemplate } from '@/lib/reports/template/own-template';

/** Problems, frames and members that are answered at most; the counts are of all. */
const mostListed = 500;

/** A Changes sheet to fill in: `?format=csv`. */
export const GET = door(
  atRevision('change a revision', ({ request, revision }) => {
    const { format } = parse(changesTemplateInput, queryOf(request));
    return Promise.resolve(
      attachment(`Tallyframe changes ${revision.letter}.${format}`, new Uint8Array(changesTemplate(format))),
    );
  }),
);

/**
 * A Changes sheet: what it would do, with every slip at its cell. With `make=yes` and a `reason` the batch's next revision is
 * made by it, and run where `run=yes`.
 */
export const POST = door(
  atRevision('change a revision', async ({ request, person, revision }) => {
    requireRead(revision);
    const { files, fields } = await readUpload(request);
    const { make, run, reason } = parse(changesSheetInput, { ...queryOf(request), ...fields });
    const { rows, problems, changes, refused } = await previewChangesSheet(person, revision, files);
    if (make === 'yes') {
      if (problems.some(({ severity }) => severity === 'error')) {
        const told = problems.slice(0, mostListed);
        throw new ApiError('problems', 'Nothing was changed: mend the cells that are named and send the sheet again.', {
          problems: told,
        });
      }
      if (refused !== null) throw new ApiError('bad-request', refused);
      if (reason === '')
        throw new ApiError('bad-request', 'Say why it is changed.', { fields: { reason: ['Say why it is changed.'] } });
      const known = new Map(changes.map(({ change, preview }) => [change, preview] as const));
      const all = changes.map(({ change }) => change);
      const letter = await makeChange(person, revision, { changes: all, reason, run: run === 'yes' }, known);
      return Response.json({ batch: { id: revision.batch, name: revision.batchName }, revision: letter }, { status: 201 });
    }
    const touched = new Map(changes.flatMap(({ preview }) => preview.touched.map((one) => [one.number, one] as const)));
    return Response.json({
      rows,
      problems: problems.slice(0, mostListed),
      more: Math.max(0, problems.length - mostListed),
      refused,
      frames: touched.size,
      carriedOver: revision.frames - revision.framesStopped - touched.size,
      touched: [...touched.values()].slice(0, mostListed),
      changes: changes.map(({ preview: { to, from, members, touched: own, mass } }) => ({
        to,
        from,
        mass,
        frames: own.length,
        count: members.length,
        members: members.slice(0, mostListed),
      })),
    });
  }),
);
