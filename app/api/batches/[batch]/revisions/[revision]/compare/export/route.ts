import { atRevision } from '@/app/_server/at-revision';
import { comparedTwo, needRead, recordedBetween, settingsThatDiffer } from '@/app/_server/compared';
import { door } from '@/app/_server/door';
import { attachment } from '@/app/_server/download';
import { parse, queryOf } from '@/app/_server/input';
import { databaseFile } from '@/db/client';
import type { RevisionRecord } from '@/db/queries/revisions';
import { ApiError } from '@/lib/api/error';
import { compareInput } from '@/lib/api/inputs';
import { defaultSettings } from '@/lib/model/settings';
import { pools } from '@/worker/boot';
import { compareStream } from '@/worker/result-stream';

/** The differences between two revisions as a workbook, written in a thread: figures, inputs, frames, members, reactions, steel. */
export const GET = door(
  atRevision('take results away', async ({ request, person, revision }) => {
    const asked = parse(compareInput, queryOf(request));
    const two = await comparedTwo(person, revision, asked.with);
    if (two === null) throw new ApiError('conflict', 'This batch has no other revision to compare with.');
    needRead(two);
    const { before, after } = two;
    const content = compareStream(pools(), {
      file: databaseFile(),
      office: person.office,
      batch: after.batchName,
      before: sideOf(before),
      after: sideOf(after),
      units: after.units,
      nearLimit: after.settings?.nearLimit ?? defaultSettings.nearLimit,
      by: asked.by,
      settings: settingsThatDiffer(two),
      recorded: await recordedBetween(two),
    });
    return attachment(`${after.batchName} ${before.letter} to ${after.letter}.xlsx`, content);
  }),
);

const sideOf = ({ id, letter, state, input }: RevisionRecord) => ({
  revision: id,
  letter,
  state,
  input: input === null ? '' : `${input.name}, SHA-256 ${input.sha256}`,
});
