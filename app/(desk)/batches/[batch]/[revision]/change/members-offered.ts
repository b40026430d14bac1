import 'server-only';
import { db } from '@/db/client';
import { listFacets, type Facet } from '@/db/queries/lists';
import { listRevisionParts } from '@/db/queries/own-parts';
import type { RevisionRecord } from '@/db/queries/revisions';
import { roles } from '@/lib/model/frame';

export interface MembersOffered {
  readonly section: readonly Facet[];
  /** Counts are of members; null = not counted before a run. */
  readonly role: readonly (Omit<Facet, 'count'> & { readonly count: number | null })[];
  /** Null = not known before a run: it is typed. */
  readonly group: readonly Facet[] | null;
}

/** By what members may be chosen: of a revision with results what its members table holds, before a run what was read. */
export async function membersOffered({ office, id, state }: RevisionRecord): Promise<MembersOffered> {
  if (state === 'read') {
    const parts = await listRevisionParts(db(), office, id);
    const sections = parts.filter(({ kind }) => kind === 'section').map(({ name, frames }) => ({ value: name, count: frames }));
    return { section: sections, role: roles.map((value) => ({ value, count: null })), group: null };
  }
  const [section, role, group] = await Promise.all(
    (['section', 'role', 'group'] as const).map((column) => listFacets(db(), office, id, 'members', column)),
  );
  return { section: section ?? [], role: role ?? [], group: group ?? [] };
}
