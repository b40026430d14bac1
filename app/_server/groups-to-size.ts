import 'server-only';
import { databaseFile, db } from '@/db/client';
import { listFacets } from '@/db/queries/lists';
import type { RevisionRecord } from '@/db/queries/revisions';
import { sizedBy, type SizedBy } from '@/lib/sizing/sizing';
import { pools } from '@/worker/boot';
import type { GroupListed, ListGroupsTask } from '@/worker/threads/list-groups';

/** Roles, groups and sections of a revision's members: as counted with its results, else read from its frames in a thread. */
export async function groupsToSize(revision: RevisionRecord): Promise<readonly GroupListed[]> {
  const { office, id, state } = revision;
  if (state === 'run') {
    const facets = await Promise.all(sizedBy.map((by) => listFacets(db(), office, id, 'members', by)));
    return sizedBy.flatMap((by: SizedBy, i) =>
      (facets[i] ?? []).filter(({ value }) => value !== '').map(({ value, count }) => ({ by, name: value, members: count })),
    );
  }
  const task: ListGroupsTask = { file: databaseFile(), revision: id };
  const threads = pools();
  return (await threads.tables.run(task, { filename: threads.bundle('write'), name: 'listGroups' })) as GroupListed[];
}
