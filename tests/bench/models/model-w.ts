import type { Combination, Frame, FrameNode, LoadCase, Member, MemberLoad } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import { modelP } from './model-p';
import { shuffled } from './shuffled';

/** Members of P in order along the frame, and into how many each is cut: 20 in all. */
const pieces = [3, 2, 2, 3, 3, 2, 2, 3] as const;

type Pattern = readonly (readonly [axes: 'global' | 'projected' | 'local', column: number, left: number, right: number])[];
/** Loads along local or global y, N/m: on columns, the left and the right rafter. */
const patterns: readonly (readonly [LoadCase['kind'], Pattern])[] = [
  ['dead', [['global', 0, -1500, -1500]]],
  ['dead', [['global', -300, -400, -400]]],
  ['roof live', [['projected', 0, -3600, -3600]]],
  ['snow', [['projected', 0, -3600, -3600]]],
  ['snow', [['projected', 0, -3600, -1800]]],
  ['snow', [['projected', 0, -1800, -3600]]],
  ['wind', [['local', -2100, 1400, 700]]],
  ['wind', [['local', 2100, 700, 1400]]],
  ['wind', [['local', -1300, 1900, 1900]]],
  ['wind', [['local', 1300, 300, 300]]],
  ['wind', [['local', -900, -400, 600]]],
  ['crane', [['global', -900, -600, -200]]],
];

/** 72 strength and 8 service combinations: dead loads with a roof load and a wind, one of them the leading one. */
function combinations(): Combination[] {
  const made: Combination[] = [];
  const add = (purpose: Combination['purpose'], terms: readonly (readonly [number, number])[]): void => {
    const name = `${purpose === 'strength' ? 'C' : 'S'}${made.length + 1}`;
    made.push({ name, purpose, terms: terms.map(([index, factor]) => ({ case: index, factor })) });
  };
  for (const roof of [2, 3, 4, 5])
    for (const wind of [6, 7, 8, 9, 10, 11]) {
      add('strength', [[0, 1.2], [1, 1.2], [roof, 1.5], [wind, 0.6]]); // prettier-ignore
      add('strength', [[0, 1.2], [1, 1.2], [roof, 0.7], [wind, 1.2]]); // prettier-ignore
      add('strength', [[0, 0.9], [1, 0.9], [roof, 0.3], [wind, 1]]); // prettier-ignore
    }
  for (const roof of [2, 3, 4, 5]) for (const wind of [6, 7]) add('service', [[0, 1], [1, 1], [roof, 0.8], [wind, 0.5]]); // prettier-ignore
  return made;
}

/** A portal of P cut into 20 members. */
function cut(frame: Frame): Frame {
  const nodes: FrameNode[] = [...frame.nodes];
  const members: Member[] = [];
  frame.members.forEach((member, index) => {
    const [a, b] = [frame.nodes[member.start], frame.nodes[member.end]];
    const count = pieces[index] ?? 1;
    if (!a || !b) return;
    let start = member.start;
    for (let k = 1; k <= count; k += 1) {
      const share = k / count;
      const end = k === count ? member.end : nodes.length;
      if (k < count)
        nodes.push({ id: `${member.id}${k}`, x_m: a.x_m + share * (b.x_m - a.x_m), y_m: a.y_m + share * (b.y_m - a.y_m), place: null }); // prettier-ignore
      members.push({ ...member, id: `${member.id}.${k}`, start, end, span: member.span ?? member.id });
      start = end;
    }
  });
  const memberLoads = patterns.flatMap(([, pattern], index) =>
    pattern.flatMap(([axes, column, left, right]) =>
      members.flatMap((member, on): MemberLoad[] => {
        const q = member.role === 'column' ? column : member.span === 'left' ? left : right;
        const [a, b] = [nodes[member.start], nodes[member.end]];
        if (q === 0 || !a || !b) return [];
        const length = Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m);
        return [{ case: index, member: on, kind: 'distributed', axes, direction: 'y', q1_N_m: q, q2_N_m: q, from_m: 0, to_m: length }]; // prettier-ignore
      }),
    ),
  );
  const cases = patterns.map(([kind], index): LoadCase => ({ name: `case ${index + 1}`, kind, selfWeight: index === 0 ? 1 : 0, alternative: null, reversible: false, note: null })); // prettier-ignore
  return shuffled({ ...frame, nodes, members, cases, memberLoads, nodeLoads: [], settlements: [], combinations: combinations() });
}

/** W, the everyday load: second order with imperfections both ways, α_cr and checks of 80 combinations of 12 cases. */
export async function modelW(count: number): Promise<{ frames: Frame[]; settings: Settings }> {
  const { frames, settings } = await modelP(count);
  return { frames: frames.map(cut), settings: { ...settings, analysis: 'second order', imperfections: 'EN 1993-1-1' } };
}
