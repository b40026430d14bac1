import 'server-only';
import { db, raw } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { insertDownload, issueFilePieces, listIssueFiles } from '@/db/queries/issue-files';
import type { IssueRecord } from '@/db/queries/issues';
import type { Person } from '@/lib/access/may';
import { notFound } from '@/lib/api/error';
import { issueFileInput } from '@/lib/api/issue-inputs';
import { downloadName } from '@/lib/issuing/issue-file';
import { attachment } from './download';

/**
 * A file of an issue, as it was made: its download is recorded before its first byte is sent, its SHA-256 goes with it, and
 * its name says where it is superseded or withdrawn.
 *
 * @throws {ApiError} not-found
 */
export async function issueDownload(person: Person, issue: IssueRecord, kind: string): Promise<Response> {
  const asked = issueFileInput.safeParse(kind);
  const file = asked.success
    ? (await listIssueFiles(db(), issue.office, issue.id)).find((one) => one.kind === asked.data)
    : undefined;
  if (!file || issue.state === 'making' || issue.state === 'failed') throw notFound('file');
  await insertDownload(db(), issue.office, { issue: issue.id, file: file.id, person: person.id });
  await insertActivity(db(), issue.office, {
    what: 'downloaded a file of an issue',
    project: issue.project.id,
    batch: issue.batch.id,
    revision: issue.revision.id,
    person: person.id,
    detail: { issue: issue.id, number: issue.number, file: file.kind, state: issue.state },
  });
  const pieces = issueFilePieces(raw(), issue.id, file.kind);
  const content = new ReadableStream<Uint8Array>(
    {
      pull(controller) {
        const { value, done } = pieces.next();
        if (done) controller.close();
        else controller.enqueue(new Uint8Array(value));
      },
    },
    { highWaterMark: 1 },
  );
  const response = attachment(downloadName(file.name, issue.state), content);
  if (file.kind === 'report') response.headers.set('content-type', 'application/pdf');
  response.headers.set('content-length', String(file.size));
  response.headers.set('x-sha256', file.sha256);
  return response;
}
