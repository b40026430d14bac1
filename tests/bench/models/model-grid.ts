import type { Frame, FrameNode, LoadCase, Member, MemberLoad, NodeLoad, Support } from '@/lib/model/frame';
import { shuffled } from './shuffled';

const bay_m = 6;
const storey_m = 3.5;

/**
 * R, B and L: a rigid-jointed frame of so many bays and storeys on fixed bases. Case 1: self-weight and floors; others in turn:
 * floors of every other bay, wind from the left at the floors, wind as a line load on the outer columns, all of them varied.
 *
 * @param like where sections (the second for columns), material and a blank member are taken from
 * @param variant which of a set of frames of this shape: geometry and loads differ, the shape does not
 */
export function gridFrame(like: Frame, bays: number, storeys: number, cases: number, variant: number): Frame {
  const across = bays + 1;
  const at = (storey: number, line: number): number => storey * across + line;
  const bay = bay_m + 0.03 * (variant % 41);
  const storey = storey_m + 0.01 * (variant % 29);
  const nodes: FrameNode[] = [];
  for (let s = 0; s <= storeys; s += 1)
    for (let l = 0; l < across; l += 1) nodes.push({ id: `N${at(s, l)}`, x_m: l * bay, y_m: s * storey, place: null });
  const blank = like.members.find(({ role }) => role === 'rafter');
  const column = like.members.find(({ role }) => role === 'column');
  if (!blank || !column) throw new Error('Expected a portal to take members from');
  const members: Member[] = [];
  const floors: { member: number; bay: number }[] = [];
  const walls: number[] = [];
  for (let s = 0; s < storeys; s += 1) {
    for (let l = 0; l < across; l += 1) {
      if (l === 0) walls.push(members.length);
      members.push({ ...column, id: `C${s}.${l}`, start: at(s, l), end: at(s + 1, l), span: null });
    }
    for (let l = 0; l < bays; l += 1) {
      floors.push({ member: members.length, bay: l });
      members.push({ ...blank, id: `B${s}.${l}`, start: at(s + 1, l), end: at(s + 1, l + 1), span: null, role: 'beam' });
    }
  }
  const supports = Array.from({ length: across }, (_, l): Support => ({ node: l, ux: 'fixed', uy: 'fixed', rz: 'fixed', angle_rad: 0 })); // prettier-ignore
  const memberLoads: MemberLoad[] = [];
  const nodeLoads: NodeLoad[] = [];
  const lengthOf = (member: number): number => {
    const [a, b] = [nodes[members[member]?.start ?? -1], nodes[members[member]?.end ?? -1]];
    return a && b ? Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m) : NaN;
  };
  const line = (index: number, member: number, axes: 'global' | 'local', q_N_m: number): MemberLoad => ({
    case: index, member, kind: 'distributed', axes, direction: 'y', q1_N_m: q_N_m, q2_N_m: q_N_m, from_m: 0, to_m: lengthOf(member),
  }); // prettier-ignore
  for (let index = 0; index < cases; index += 1) {
    const size = 1 + 0.07 * index + 0.003 * (variant % 17);
    const kind = index === 0 ? 'floors' : (['every other', 'wind', 'walls'] as const)[(index - 1) % 3];
    for (const { member, bay: number } of floors) {
      if (kind === 'floors') memberLoads.push(line(index, member, 'global', -18e3 * size));
      if (kind === 'every other' && number % 2 === index % 2) memberLoads.push(line(index, member, 'global', -12e3 * size));
    }
    if (kind === 'walls') for (const member of walls) memberLoads.push(line(index, member, 'local', -3e3 * size));
    if (kind === 'wind')
      for (let s = 1; s <= storeys; s += 1) nodeLoads.push({ case: index, node: at(s, 0), Fx_N: 9e3 * size, Fy_N: 0, Mz_Nm: 0 });
  }
  return shuffled({
    ...like, id: `G${variant}`, nodes, members, supports, memberLoads, nodeLoads, settlements: [], combinations: [], limits: [],
    cases: Array.from({ length: cases }, (_, i): LoadCase => ({ name: `case ${i + 1}`, kind: 'other', selfWeight: i === 0 ? 1 : 0, alternative: null, reversible: false, note: null })),
  }); // prettier-ignore
}
