import type { Frame, Joint, Member } from '@/lib/model/frame';

/** Length, direction and stiffness of a member, and what its loads need, taken from the model anew. SI. */
export interface MemberFacts {
  readonly start: number;
  readonly end: number;
  readonly L: number;
  /** Direction of local x. */
  readonly ex: number;
  readonly ey: number;
  readonly EA: number;
  readonly EI: number;
  /** 1/GAv, per N; 0 where members do not shear. */
  readonly slip: number;
  /** Rotation of the joint under a unit moment, rad/(N·m): 0 rigid, Infinity pinned. */
  readonly startGive: number;
  readonly endGive: number;
  /** N/m of member at factor 1. */
  readonly weight: number;
  readonly alpha: number;
  readonly depth: number;
  /** A·fy, N; NaN where fy is not known. */
  readonly squash: number;
  readonly tensionOnly: boolean;
}

/** g as the sheets fix it, m/s². */
const fall = 9.80665;

/** Members as the second analysis sees them. @param shear whether they shear as well as bend */
export function memberFacts(frame: Frame, shear: boolean): MemberFacts[] {
  return frame.members.map((member): MemberFacts => {
    const from = frame.nodes[member.start]!;
    const to = frame.nodes[member.end]!;
    const L = Math.sqrt((to.x_m - from.x_m) ** 2 + (to.y_m - from.y_m) ** 2);
    const material = frame.materials[member.material]!;
    const section = frame.sections[member.section]!;
    const { A_m2: A } = section.properties;
    // read anew: which second moment, depth and shear area lie in the plane of a turned section
    const p = section.properties;
    const [I, depth, Av] = member.turned
      ? [p.Iminor_m4, p.width_m, p.AvTyped_m2 ?? p.AvShearTurned_m2]
      : [p.I_m4, p.depth_m, p.AvTyped_m2 ?? p.AvShear_m2];
    const shears = shear && !(member.tensionOnly && Av === null);
    return {
      start: member.start,
      end: member.end,
      L,
      ex: (to.x_m - from.x_m) / L,
      ey: (to.y_m - from.y_m) / L,
      EA: material.E_Pa * A,
      EI: material.E_Pa * (I ?? NaN),
      slip: shears ? 1 / ((material.G_Pa ?? NaN) * (Av ?? NaN)) : 0,
      startGive: giveOf(member, member.startJoint),
      endGive: giveOf(member, member.endJoint),
      weight: fall * (material.density_kg_m3 ?? NaN) * A,
      alpha: material.expansion_perK ?? NaN,
      depth: depth ?? NaN,
      squash: A * (material.fy_Pa ?? NaN),
      tensionOnly: member.tensionOnly,
    };
  });
}

function giveOf(member: Member, joint: Joint): number {
  if (member.axialOnly || joint === 'pin') return Infinity;
  return joint === 'rigid' ? 0 : 1 / joint;
}
