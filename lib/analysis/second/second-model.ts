import type { Frame } from '@/lib/model/frame';

/** Length, direction, stiffness and what self-weight and temperature need of a member, taken from the model anew. */
export interface MemberFacts {
  readonly L: number;
  readonly ex: number;
  readonly ey: number;
  readonly EA: number;
  readonly EI: number;
  readonly weight: number;
  readonly alpha: number;
  readonly depth: number;
  /** Numbers of the unknowns of its ends: X, Y, rotation each; an end that is not rigid has a rotation of its own. */
  readonly unknowns: readonly number[];
}

/** The frame as the second analysis sees it: three unknowns a node, one more for each end that is not joined rigidly. */
export interface SecondModel {
  readonly frame: Frame;
  readonly size: number;
  readonly members: readonly MemberFacts[];
  /** Rotational springs between two unknowns: [node's rotation, member end's rotation, stiffness]. */
  readonly springs: readonly (readonly [number, number, number])[];
}

export function secondModel(frame: Frame): SecondModel {
  let size = 3 * frame.nodes.length;
  const springs: [number, number, number][] = [];
  const members = frame.members.map((member): MemberFacts => {
    const from = frame.nodes[member.start]!;
    const to = frame.nodes[member.end]!;
    const L = Math.sqrt((to.x_m - from.x_m) ** 2 + (to.y_m - from.y_m) ** 2);
    const material = frame.materials[member.material]!;
    const section = frame.sections[member.section]!.properties;
    // read anew: which second moment and which depth lie in the plane of a turned section
    const [I, depth] = member.turned ? [section.Iminor_m4, section.width_m] : [section.I_m4, section.depth_m];
    const endRotation = (node: number, joint: number | 'rigid' | 'pin'): number => {
      if (!member.axialOnly && joint === 'rigid') return 3 * node + 2;
      const own = size++;
      if (!member.axialOnly && typeof joint === 'number') springs.push([3 * node + 2, own, joint]);
      return own;
    };
    return {
      L,
      ex: (to.x_m - from.x_m) / L,
      ey: (to.y_m - from.y_m) / L,
      EA: material.E_Pa * section.A_m2,
      EI: material.E_Pa * I!,
      weight: 9.80665 * (material.density_kg_m3 ?? NaN) * section.A_m2,
      alpha: material.expansion_perK ?? NaN,
      depth: depth ?? NaN,
      unknowns: [
        3 * member.start, 3 * member.start + 1, endRotation(member.start, member.startJoint),
        3 * member.end, 3 * member.end + 1, endRotation(member.end, member.endJoint),
      ],
    }; // prettier-ignore
  });
  return { frame, size, members, springs };
}
