import 'server-only';
import { db } from '@/db/client';
import { listOwnThings, listRevisionParts } from '@/db/queries/own-parts';
import type { RevisionRecord } from '@/db/queries/revisions';
import type { Person } from '@/lib/access/may';
import { ApiError } from '@/lib/api/error';
import type { Change } from '@/lib/changes/change';
import type { ChangeWords } from '@/lib/changes/change-words';
import { idKey } from '@/lib/intake/ids';

/**
 * In words, what of the office's own is taken anew by changes.
 *
 * @throws {ApiError} bad-request where the revision is not made of it, or has the latest version already
 */
export async function ownVersions(
  person: Person,
  revision: RevisionRecord,
  changes: readonly Change[],
): Promise<ReadonlyMap<Change, ChangeWords>> {
  const words = new Map<Change, ChangeWords>();
  if (!changes.some(({ kind }) => kind === 'own version')) return words;
  const [parts, things] = await Promise.all([
    listRevisionParts(db(), person.office, revision.id),
    listOwnThings(db(), person.office),
  ]);
  for (const change of changes) {
    if (change.kind !== 'own version') continue;
    const key = idKey(change.name);
    const part = parts.find(({ kind, own }) => kind === change.part && own !== null && idKey(own) === key);
    const latest = things.find(({ kind, name, retired }) => kind === change.part && !retired && idKey(name) === key);
    const sentence = !part
      ? `No frame of revision ${revision.letter} is made of the office’s ${change.name}.`
      : !latest || latest.version === part.version
        ? `There is no later version of ${change.name} than the one of revision ${revision.letter}.`
        : null;
    if (sentence !== null || !part || !latest)
      throw new ApiError('bad-request', sentence ?? '', { fields: { name: [sentence ?? ''] } });
    const what = `${change.part === 'section' ? 'section' : 'steel grade'} ${latest.name}`;
    words.set(change, { what, from: `office v${part.version ?? '?'}`, to: `office v${latest.version}` });
  }
  return words;
}
