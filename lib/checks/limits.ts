import type { Frame, Limit, Measure } from '@/lib/model/frame';
import { sameId, type Span } from './spans';

const rank: Readonly<Record<Limit['target'], number>> = { member: 0, span: 0, node: 0, place: 1, group: 1, role: 2, all: 3 };

/** Most specific first: what it names, then a named combination, then a named frame; then as given. */
function bySpecificity(a: Limit, b: Limit): number {
  return (
    rank[a.target] - rank[b.target] ||
    (a.combination === null ? 1 : 0) - (b.combination === null ? 1 : 0) ||
    (a.namedFrame ? 0 : 1) - (b.namedFrame ? 0 : 1)
  );
}

/** The limits of one measure in a frame, most specific first. */
export function limitsOf(frame: Frame, measure: Measure): readonly Limit[] {
  return frame.limits.filter((limit) => limit.measure === measure).sort(bySpecificity);
}

/** Whether a limit's "applies to" names a span: itself, one of its members, their group, its role, or everything. */
export function namesSpan(limit: Limit, span: Span, frame: Frame): boolean {
  switch (limit.target) {
    case 'all':
      return true;
    case 'role':
      return span.role !== null && sameId(limit.name, span.role);
    case 'span':
      return span.kind === 'span' && sameId(limit.name, span.name);
    case 'member':
      return span.pieces.some((p) => sameId(limit.name, frame.members[p.member]!.id));
    case 'group':
      return span.pieces.some((p) => {
        const group = frame.members[p.member]!.group;
        return group !== null && sameId(limit.name, group);
      });
    default:
      return false;
  }
}

/** The nodes that a limit on a node's movement names, by index. */
export function nodesNamed(limit: Limit, frame: Frame): readonly number[] {
  const nodes = frame.nodes.map((_, i) => i);
  switch (limit.target) {
    case 'all':
      return nodes;
    case 'node':
      return nodes.filter((i) => sameId(limit.name, frame.nodes[i]!.id));
    case 'place':
      return nodes.filter((i) => {
        const place = frame.nodes[i]!.place;
        return place !== null && sameId(limit.name, place);
      });
    default: {
      const named = frame.members.filter((m) => {
        const word =
          limit.target === 'member' ? m.id : limit.target === 'span' ? m.span : limit.target === 'group' ? m.group : m.role;
        return word !== null && sameId(limit.name, word);
      });
      return nodes.filter((i) => named.some((m) => m.start === i || m.end === i));
    }
  }
}

/** The limit that applies in a service combination: the most specific of those given, or null. */
export function limitIn(limits: readonly Limit[], combination: string): Limit | null {
  return limits.find((limit) => limit.combination === null || sameId(limit.combination, combination)) ?? null;
}

/** What a limit allows, m: L/n or the absolute figure, the smaller where both are given; null where it gives neither. */
export function allowance(limit: Limit, length_m: number): number | null {
  const byRatio = limit.ratio === null ? null : length_m / limit.ratio;
  if (byRatio === null || limit.absolute_m === null) return byRatio ?? limit.absolute_m;
  return Math.min(byRatio, limit.absolute_m);
}
