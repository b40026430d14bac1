import 'server-only';
import { db } from '@/db/client';
import { iterateRows } from '@/db/queries/lists';
import type { RevisionRecord } from '@/db/queries/revisions';
import { viewFromParams } from '@/lib/api/view-address';
import { mostMembers, type SectionChange } from '@/lib/changes/change';
import { roles } from '@/lib/model/frame';
import type { Filter } from '@/lib/tables/view';

interface MembersAsked {
  /** Null = nothing is asked for, or it cannot be. */
  readonly what: SectionChange['what'] | null;
  readonly tooMany: boolean;
  readonly none: boolean;
}

/**
 * The members that an address asks for: a view of the members table, or `frame` and `member` for one. One section, role and
 * group are handed on as such, so that a change is for all that fit; any other view for the members that it shows.
 */
export async function membersAsked(revision: RevisionRecord, params: URLSearchParams): Promise<MembersAsked> {
  // members have no filter of their own: each is named beside the one frame that they are of
  const [[frame, ...frames], named] = [params.getAll('frame'), params.getAll('member')];
  if (frame && frames.length === 0 && named.length > 0)
    return { what: { members: named.slice(0, mostMembers).map((member) => ({ frame, member })) }, tooMany: false, none: false };
  const view = viewFromParams('members', params);
  const filters = view.filters.filter((filter) => filter.op !== 'in' || filter.values.some((value) => value !== ''));
  if (filters.length === 0) return { what: null, tooMany: false, none: false };
  const criteria = asCriteria(filters);
  if (criteria) return { what: criteria, tooMany: false, none: false };
  const members = new Map<string, { frame: string; member: string }>();
  for await (const { cells } of iterateRows(db(), revision.office, revision.id, {
    ...view,
    filters,
    sort: null,
    columns: null,
  })) {
    const one = { frame: String(cells['frame'] ?? ''), member: String(cells['member'] ?? '') };
    members.set(`${one.frame}\n${one.member}`, one);
    if (members.size > mostMembers) return { what: null, tooMany: true, none: false };
  }
  return { what: members.size === 0 ? null : { members: [...members.values()] }, tooMany: false, none: members.size === 0 };
}

function asCriteria(filters: readonly Filter[]): SectionChange['what'] | null {
  const what: { section?: string; role?: (typeof roles)[number]; group?: string; frame?: string } = {};
  for (const filter of filters) {
    const [only, ...more] = filter.op === 'in' ? filter.values : [];
    if (only === undefined || more.length > 0) return null;
    const role = roles.find((one) => one === only);
    if (filter.column === 'role' && role) what.role = role;
    else if (filter.column === 'section') what.section = only;
    else if (filter.column === 'group') what.group = only;
    else if (filter.column === 'frame') what.frame = only;
    else return null;
  }
  return what;
}
