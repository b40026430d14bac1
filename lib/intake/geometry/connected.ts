import type { Draft } from '@/lib/intake/draft';
import type { SheetName } from '@/lib/intake/sheet-definitions';
import * as say from '@/lib/problems/wording';

/** Tells a frame without supports, and parts of it that hang on nothing. */
export function tellUnheld(draft: Draft): void {
  const { problems, reader } = draft.batch;
  const { entry } = draft;
  if (draft.nodes.length === 0) return;
  // a sheet that is missing has been told once, for all frames
  const missing = (name: SheetName): boolean => !entry.variant && (draft.batch.tables.get(name)?.parts.length ?? 0) === 0;
  if (draft.members.length === 0 && draft.memberIndex.size === 0) {
    if (missing('Members')) return;
    problems.add(entry.place, { code: 'not-connected', message: say.noMembers(entry.id) }, entry.id);
    return;
  }
  const held = new Set(draft.supports.filter((s) => [s.ux, s.uy, s.rz].some((r) => r !== 'free')).map((s) => s.node));
  if (held.size === 0) {
    // a support whose row is wrong has said so
    if (!draft.supportTrouble && !missing('Supports'))
      problems.add(entry.place, { code: 'no-supports', message: say.noSupports(entry.id) }, entry.id);
    return;
  }
  // where a row of this frame is wrong, what hangs loose is likely what it should have joined
  if (draft.shapeTrouble) return;
  const part = parts(draft);
  const heldParts = new Set([...held].map((node) => part[node]));
  const joined = new Set(draft.members.flatMap((member) => [member.start, member.end]));
  const told = new Set<number>();
  draft.nodes.forEach((node, i) => {
    const own = part[i] ?? i;
    const row = draft.nodeRows[i];
    if (!row || (joined.has(i) && heldParts.has(own)) || told.has(own)) return;
    told.add(own);
    const message = joined.has(i) ? say.looseNode(node.id) : say.nodeWithoutMember(node.id);
    reader.tell(row, 'node', { code: 'not-connected', message }, draft.reading);
  });
}

/** A number for each node, the same for nodes that members join. */
function parts(draft: Draft): number[] {
  const of = draft.nodes.map((_, i) => i);
  const root = (i: number): number => {
    let at = i;
    while (of[at] !== at) at = of[at] = of[of[at] ?? at] ?? at;
    return at;
  };
  for (const { start, end } of draft.members) of[root(end)] = root(start);
  return draft.nodes.map((_, i) => root(i));
}
