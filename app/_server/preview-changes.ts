import 'server-only';
import type { RevisionRecord } from '@/db/queries/revisions';
import { databaseFile } from '@/db/client';
import type { Person } from '@/lib/access/may';
import { ApiError } from '@/lib/api/error';
import type { Change } from '@/lib/changes/change';
import type { SectionPreview } from '@/lib/changes/section-preview';
import { pools } from '@/worker/boot';
import type { PreviewAnswer, PreviewTask } from '@/worker/threads/preview-changes';

/**
 * What changes of section would do, by change (null for other kinds): its rows are changed and read again in a thread.
 *
 * @throws {ApiError} bad-request with the reason where one cannot be done
 */
export async function previewChanges(
  person: Person,
  revision: RevisionRecord,
  changes: readonly Change[],
): Promise<readonly (SectionPreview | null)[]> {
  const task: PreviewTask = { file: databaseFile(), office: person.office, revision: revision.id, changes, by: person.name };
  const threads = pools();
  const answer = (await threads.read.run(task, { filename: threads.bundle('read'), name: 'previewChanges' })) as PreviewAnswer;
  if ('refused' in answer)
    throw new ApiError('bad-request', answer.refused, { fields: { [answer.field ?? 'section']: [answer.refused] } });
  return answer.previews;
}
