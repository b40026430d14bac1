import type { Draft } from '@/lib/intake/draft';
import { tellCrossings } from '@/lib/intake/geometry/crossing';
import { tellSpans } from '@/lib/intake/geometry/spans';
import * as say from '@/lib/problems/wording';

/** Nodes nearer than this are one point, m. */
export const samePoint_m = 1e-3;

/** What is wrong or odd with a frame's shape: at the cells that can mend it. */
export function checkGeometry(draft: Draft): void {
  tellCoincident(draft);
  tellEnds(draft);
  tellCrossings(draft);
  tellSpans(draft);
}

function tellCoincident(draft: Draft): void {
  const { reader } = draft.batch;
  const cells = new Map<string, number[]>();
  draft.nodes.forEach((node, i) => {
    const [cx, cy] = [Math.floor(node.x_m / samePoint_m), Math.floor(node.y_m / samePoint_m)];
    for (let dx = -1; dx <= 1; dx += 1) {
      for (let dy = -1; dy <= 1; dy += 1) {
        const near = cells.get(`${cx + dx},${cy + dy}`)?.find((j) => {
          const other = draft.nodes[j];
          return other && Math.hypot(other.x_m - node.x_m, other.y_m - node.y_m) < samePoint_m;
        });
        const row = draft.nodeRows[i];
        if (near === undefined || !row) continue;
        reader.tell(
          row,
          'node',
          { code: 'coincident-nodes', message: say.coincident(node.id, draft.nodes[near]?.id ?? '') },
          draft.reading,
        );
      }
    }
    const key = `${cx},${cy}`;
    const list = cells.get(key);
    if (list) list.push(i);
    else cells.set(key, [i]);
  });
}

function tellEnds(draft: Draft): void {
  const { reader } = draft.batch;
  const ends = new Map<string, string>();
  draft.members.forEach((member, i) => {
    const row = draft.memberRows[i];
    if (!row) return;
    if ((draft.lengths[i] ?? 0) < samePoint_m) {
      const message = say.zeroLength(member.id, member.start === member.end);
      reader.tell(row, 'end', { code: 'zero-length', message }, draft.reading);
      return;
    }
    const key = member.start < member.end ? `${member.start}-${member.end}` : `${member.end}-${member.start}`;
    const other = ends.get(key);
    if (other !== undefined)
      reader.tell(row, 'member', { code: 'same-ends', message: say.sameEnds(member.id, other) }, draft.reading);
    else ends.set(key, member.id);
  });
}
