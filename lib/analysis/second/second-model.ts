import type { Frame, MemberLoad } from '@/lib/model/frame';
import { inPlane } from '@/lib/sections/in-plane';

/** A stretch of a member without load points inside, between two points of the expanded frame. */
export interface Stretch {
  readonly member: number;
  readonly from: number;
  readonly to: number;
  /** Numbers of the unknowns of its ends: X, Y, rotation each. */
  readonly unknowns: readonly number[];
}
/** The frame cut at every load point: three unknowns a point, one more for each end that is not joined rigidly. */
export interface SecondModel {
  readonly frame: Frame;
  readonly size: number;
  readonly stretches: readonly Stretch[];
  /** Rotational springs between two unknowns: [node's rotation, member end's rotation, stiffness]. */
  readonly springs: readonly (readonly [number, number, number])[];
}

/** Length, direction, stiffness and free strains of a member, taken from the model anew. */
export function memberFacts(
  frame: Frame,
  member: number,
): {
  L: number;
  ex: number;
  ey: number;
  EA: number;
  EI: number;
  weight: number;
  alpha: number;
  depth: number;
} {
  const m = frame.members[member]!;
  const from = frame.nodes[m.start]!;
  const to = frame.nodes[m.end]!;
  const L = Math.sqrt((to.x_m - from.x_m) ** 2 + (to.y_m - from.y_m) ** 2);
  const material = frame.materials[m.material]!;
  const plane = inPlane(frame.sections[m.section]!, m.turned);
  return {
    L,
    ex: (to.x_m - from.x_m) / L,
    ey: (to.y_m - from.y_m) / L,
    EA: material.E_Pa * plane.A_m2,
    EI: material.E_Pa * plane.I_m4!,
    weight: 9.80665 * (material.density_kg_m3 ?? NaN) * plane.A_m2,
    alpha: material.expansion_perK ?? NaN,
    depth: plane.depth_m ?? NaN,
  };
}

/** Where a load begins, ends or acts along its member. */
function places(load: MemberLoad): number[] {
  if (load.kind === 'distributed') return [load.from_m, load.to_m];
  return load.kind === 'temperature' ? [] : [load.at_m];
}

export function secondModel(frame: Frame): SecondModel {
  let size = 3 * frame.nodes.length;
  const stretches: Stretch[] = [];
  const springs: [number, number, number][] = [];
  frame.members.forEach((member, i) => {
    const { L } = memberFacts(frame, i);
    const cuts = [0, L];
    for (const load of frame.memberLoads) if (load.member === i) cuts.push(...places(load));
    cuts.sort((a, b) => a - b);
    const inner = cuts.filter((x, k) => x > 1e-9 * L && x < L * (1 - 1e-9) && x - (cuts[k - 1] ?? -1) > 1e-9 * L);
    const points = [0, ...inner, L];
    const endRotation = (node: number, joint: number | 'rigid' | 'pin'): number => {
      if (!member.axialOnly && joint === 'rigid') return 3 * node + 2;
      const own = size++;
      if (!member.axialOnly && typeof joint === 'number') springs.push([3 * node + 2, own, joint]);
      return own;
    };
    const first = [3 * member.start, 3 * member.start + 1, endRotation(member.start, member.startJoint)];
    const last = [3 * member.end, 3 * member.end + 1, endRotation(member.end, member.endJoint)];
    let before = first;
    for (let k = 1; k < points.length; k++) {
      const next = k === points.length - 1 ? last : [size++, size++, size++];
      stretches.push({ member: i, from: points[k - 1]!, to: points[k]!, unknowns: [...before, ...next] });
      before = next;
    }
  });
  return { frame, size, stretches, springs };
}
