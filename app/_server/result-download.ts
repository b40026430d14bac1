import 'server-only';
import { databaseFile, db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import type { RevisionRecord } from '@/db/queries/revisions';
import type { Person } from '@/lib/access/may';
import { ApiError } from '@/lib/api/error';
import { pools } from '@/worker/boot';
import { resultStream } from '@/worker/result-stream';
import { attachment } from './download';

const files = {
  workbook: { as: 'xlsx', ending: 'xlsx' },
  json: { as: 'json', ending: 'json' },
  csv: { as: 'csv', ending: 'zip' },
} as const;

/**
 * A revision's results as a file, once its run has ended or was stopped.
 *
 * @throws {ApiError} conflict while there is nothing to take away, or it still changes
 */
export async function resultDownload(person: Person, revision: RevisionRecord, file: keyof typeof files): Promise<Response> {
  requireResults(revision);
  const { project, batch, id } = revision;
  const { as, ending } = files[file];
  await insertActivity(db(), person.office, {
    what: 'took results away',
    project,
    batch,
    revision: id,
    person: person.id,
    detail: { file },
  });
  const content = resultStream(pools(), { file: databaseFile(), office: person.office, revision: id, as });
  return attachment(`${revision.batchName} ${revision.letter} results.${ending}`, content);
}

/** @throws {ApiError} conflict while a revision has nothing to take away, or it still changes */
export function requireResults(revision: Pick<RevisionRecord, 'state' | 'settings'>): void {
  if (revision.state === 'reading') throw new ApiError('conflict', 'The sheets are still being read. Ask again in a moment.');
  if (revision.state === 'running') {
    throw new ApiError('conflict', 'The run goes on. Take the results away when it has ended, or stop it first.');
  }
  if (revision.settings === null)
    throw new ApiError('conflict', 'Nothing of these sheets could be read, so there are no results.');
}
