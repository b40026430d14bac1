import 'server-only';
import { createHash } from 'node:crypto';
import { db } from '@/db/client';
import { insertActivity } from '@/db/queries/activity';
import { insertRevision } from '@/db/queries/revisions';
import { insertUpload } from '@/db/queries/uploads';
import type { Person } from '@/lib/access/may';
import { notFound } from '@/lib/api/error';
import type { SentFile } from '@/lib/api/multipart';
import { askForReading } from '@/worker/ask';
import { queue, serverDatabase } from '@/worker/boot';

/**
 * Keeps the files of an upload as a batch's next revision and has them read.
 *
 * @returns the revision's letter; it is in state "reading" until the worker has read it
 */
export async function bringIn(
  person: Person,
  batch: { id: number; project: number },
  files: readonly SentFile[],
): Promise<string> {
  const revision = await insertRevision(db(), person.office, { batch: batch.id, person: person.id });
  if (revision === undefined) throw notFound('batch');
  for (const { name, bytes } of files) {
    const sha256 = createHash('sha256').update(bytes).digest('hex');
    const upload = { revision: revision.id, name, size: bytes.length, sha256, bytes, person: person.id };
    await insertUpload(db(), person.office, upload);
  }
  const done = { what: 'brought sheets in', project: batch.project, batch: batch.id, revision: revision.id, person: person.id };
  await insertActivity(db(), person.office, done);
  await askForReading(queue(), serverDatabase(), { office: person.office, revision: revision.id, person: person.id });
  return revision.letter;
}
