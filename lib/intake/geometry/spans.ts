import type { Draft } from '@/lib/intake/draft';
import { idKey } from '@/lib/intake/ids';
import * as say from '@/lib/problems/wording';

const straight = Math.cos((0.5 * Math.PI) / 180);
const lengths = [
  ['lengthMajor_m', 'length major'],
  ['lengthMinor_m', 'length minor'],
  ['lengthLtbTop_m', 'length LTB top'],
  ['lengthLtbBottom_m', 'length LTB bottom'],
] as const;

/** Pieces of one physical member must be collinear within 0.5°, end to end, and say the same lengths (sheets §3). */
export function tellSpans(draft: Draft): void {
  const spans = new Map<string, number[]>();
  draft.members.forEach((member, i) => {
    if (member.span === null) return;
    const key = idKey(member.span);
    const list = spans.get(key);
    if (list) list.push(i);
    else spans.set(key, [i]);
  });
  for (const pieces of spans.values()) if (pieces.length > 1) tellSpan(draft, pieces);
}

function tellSpan(draft: Draft, pieces: readonly number[]): void {
  const { reader } = draft.batch;
  const [first = 0, ...rest] = pieces;
  const lead = draft.members[first];
  const along = direction(draft, first);
  if (!lead || !along) return;
  for (const i of rest) {
    const [member, row, own] = [draft.members[i], draft.memberRows[i], direction(draft, i)];
    if (!member || !row || !own) continue;
    if (Math.abs(own[0] * along[0] + own[1] * along[1]) < straight * (1 - 1e-12)) {
      reader.tell(
        row,
        'span',
        { code: 'conflicting-row', message: say.spanBent(member.span ?? '', member.id, lead.id) },
        draft.reading,
      );
    }
    if (member.tensionOnly !== lead.tensionOnly)
      reader.tell(row, 'span', { code: 'conflicting-row', message: say.tensionOnlyInSpan(member.span ?? '') }, draft.reading);
    for (const [key, column] of lengths) {
      if (member[key] === lead[key]) continue;
      const at = row.part.byName.has(column) || !column.startsWith('length LTB') ? column : 'length LTB';
      reader.tell(
        row,
        at,
        { code: 'conflicting-row', message: say.spanLengths(member.span ?? '', column, lead.id) },
        draft.reading,
      );
    }
  }
  tellGaps(draft, pieces);
}

/** End to end: each node inside the span joins two of its pieces, and exactly two nodes end it. */
function tellGaps(draft: Draft, pieces: readonly number[]): void {
  const ends = new Map<number, number>();
  for (const i of pieces) {
    const member = draft.members[i];
    if (!member) continue;
    for (const node of [member.start, member.end]) ends.set(node, (ends.get(node) ?? 0) + 1);
  }
  const reached = new Set<number>([pieces[0] ?? 0]);
  for (let grown = true; grown;) {
    grown = false;
    for (const i of pieces) {
      if (reached.has(i)) continue;
      const member = draft.members[i];
      const joined = [...reached].some((j) => {
        const other = draft.members[j];
        return other && member && [member.start, member.end].some((node) => node === other.start || node === other.end);
      });
      if (!joined) continue;
      reached.add(i);
      grown = true;
    }
  }
  const crowded = [...ends].find(([, count]) => count > 2)?.[0];
  for (const i of pieces) {
    const [member, row] = [draft.members[i], draft.memberRows[i]];
    if (!member || !row) continue;
    const loose = !reached.has(i);
    if (!loose && (crowded === undefined || (member.start !== crowded && member.end !== crowded))) continue;
    draft.batch.reader.tell(
      row,
      'span',
      { code: 'conflicting-row', message: say.spanApart(member.span ?? '', member.id) },
      draft.reading,
    );
    if (!loose) return;
  }
}

function direction(draft: Draft, i: number): readonly [number, number] | null {
  const member = draft.members[i];
  const [a, b, L = 0] = [draft.nodes[member?.start ?? -1], draft.nodes[member?.end ?? -1], draft.lengths[i]];
  return a && b && L > 0 ? [(b.x_m - a.x_m) / L, (b.y_m - a.y_m) / L] : null;
}
