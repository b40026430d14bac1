import type { Frame } from '@/lib/model/frame';
import { blockAt, type Topology } from './topology';

/** Where the numbers of members and supports go among those of a frame's equations: looked up once for all frames of one shape. */
export interface MemberPlaces {
  /** First row of the start's and the end's unknowns in a column of f, 2 a member; −1 = the node has none. */
  readonly rows: Int32Array;
  /** Where in K begin the start's and the end's own block and the one between them, 3 a member; −1 = there is none. */
  readonly blocks: Int32Array;
  /** 1 = the block between them has the end's unknowns as its rows. */
  readonly turned: Uint8Array;
  /** Rows of a column of f that are no unknowns although their node has some. */
  readonly heldRows: Int32Array;
  /** What is 0 in K for their sake, and what is 1 (their own equation: 1·d = 0). */
  readonly zeros: Int32Array;
  readonly ones: Int32Array;
}

export function memberPlaces(frame: Frame, t: Omit<Topology, 'places'>): MemberPlaces {
  const count = frame.members.length;
  const rows = new Int32Array(2 * count);
  const blocks = new Int32Array(3 * count).fill(-1);
  const turned = new Uint8Array(count);
  frame.members.forEach(({ start, end }, i) => {
    const a = t.positionOf[start]!;
    const b = t.positionOf[end]!;
    rows[2 * i] = a < 0 ? -1 : 3 * a;
    rows[2 * i + 1] = b < 0 ? -1 : 3 * b;
    if (a >= 0) blocks[3 * i] = blockAt(t, a, a);
    if (b >= 0) blocks[3 * i + 1] = blockAt(t, b, b);
    if (a >= 0 && b >= 0) blocks[3 * i + 2] = blockAt(t, Math.min(a, b), Math.max(a, b));
    turned[i] = a > b ? 1 : 0;
  });
  const heldRows: number[] = [];
  for (let p = 0; p < t.size; p++) for (let r = 0; r < 3; r++) if (!t.free[3 * t.nodeAt[p]! + r]) heldRows.push(3 * p + r);
  return { rows, blocks, turned, heldRows: Int32Array.from(heldRows), ...heldEntries(t, heldRows) };
}

/** Entries of K in held rows and columns: those on the diagonal apart. */
function heldEntries(t: Omit<Topology, 'places'>, heldRows: readonly number[]): Pick<MemberPlaces, 'zeros' | 'ones'> {
  const held = new Set(heldRows);
  const zeros: number[] = [];
  const ones: number[] = [];
  if (held.size > 0)
    for (let i = 0; i < t.size; i++)
      for (let b = t.rowStart[i]!; b < t.rowStart[i + 1]!; b++)
        for (let r = 0; r < 3; r++)
          for (let c = 0; c < 3; c++) {
            const j = t.columns[b]!;
            if (!held.has(3 * i + r) && !held.has(3 * j + c)) continue;
            (i === j && r === c ? ones : zeros).push(9 * b + 3 * r + c);
          }
  return { zeros: Int32Array.from(zeros), ones: Int32Array.from(ones) };
}
