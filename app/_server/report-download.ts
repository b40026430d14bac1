import 'server-only';
import { databaseFile, db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import type { RevisionRecord } from '@/db/queries/revisions';
import type { Person } from '@/lib/access/may';
import { ApiError } from '@/lib/api/error';
import { readReportChoice } from '@/lib/reports/report-choice';
import { pools } from '@/worker/boot';
import { reportStream } from '@/worker/result-stream';
import { requireResults } from './result-download';
import { attachment } from './download';

/**
 * The calculation report of a revision as a draft.
 *
 * @param asked which frames are calculated in full: `all`, `flagged`, or places like `3,7-12`
 * @throws {ApiError} bad-request, and conflict as for other result files
 */
export async function reportDownload(person: Person, revision: RevisionRecord, asked: string): Promise<Response> {
  requireResults(revision);
  const choice = readReportChoice(asked, revision.frames);
  if ('wrong' in choice) throw new ApiError('bad-request', choice.wrong, { fields: { frames: [choice.wrong] } });
  const { project, batch, id } = revision;
  const detail = { file: 'report', frames: asked };
  await insertActivity(db(), person.office, {
    what: 'took results away',
    project,
    batch,
    revision: id,
    person: person.id,
    detail,
  });
  const content = reportStream(pools(), { file: databaseFile(), office: person.office, revision: id, frames: choice.frames });
  return attachment(`${revision.batchName} ${revision.letter} calculation report, draft.pdf`, content);
}
