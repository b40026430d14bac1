import type { Frame, Joint } from '@/lib/model/frame';
import { inPlane } from '@/lib/sections/in-plane';

/** Standard acceleration of free fall, m/s² (self-weight = density × A × g). */
export const gravity = 9.80665;

/** A member as the stiffness method sees it: geometry, stiffness and joints, SI. */
export interface MemberData {
  readonly start: number;
  readonly end: number;
  readonly length: number;
  /** Direction cosines of local x. */
  readonly cos: number;
  readonly sin: number;
  readonly EA: number;
  readonly EI: number;
  /** Rotational stiffness between the node and the member's end: Infinity rigid, 0 pinned. */
  readonly startSpring: number;
  readonly endSpring: number;
  /** Self-weight, N per metre of member, at factor 1; NaN where the density is not known. */
  readonly weight: number;
  /** α per K; NaN where not known. */
  readonly expansion: number;
  /** Depth between the faces in the plane of the frame; NaN where not known. */
  readonly depth: number;
}

export function springOf(joint: Joint): number {
  return joint === 'rigid' ? Infinity : joint === 'pin' ? 0 : joint;
}

const known = new WeakMap<Frame, readonly MemberData[]>();

/** Members of a frame in its own order; computed once a frame. */
export function memberData(frame: Frame): readonly MemberData[] {
  const before = known.get(frame);
  if (before) return before;
  const data = frame.members.map((member): MemberData => {
    const a = frame.nodes[member.start]!;
    const b = frame.nodes[member.end]!;
    const dx = b.x_m - a.x_m;
    const dy = b.y_m - a.y_m;
    const length = Math.hypot(dx, dy);
    const section = frame.sections[member.section]!;
    const material = frame.materials[member.material]!;
    const plane = inPlane(section, member.turned);
    const A = plane.A_m2;
    return {
      start: member.start,
      end: member.end,
      length,
      cos: dx / length,
      sin: dy / length,
      EA: material.E_Pa * A,
      EI: material.E_Pa * (plane.I_m4 ?? NaN),
      startSpring: member.axialOnly ? 0 : springOf(member.startJoint),
      endSpring: member.axialOnly ? 0 : springOf(member.endJoint),
      weight: (material.density_kg_m3 ?? NaN) * A * gravity,
      expansion: material.expansion_perK ?? NaN,
      depth: plane.depth_m ?? NaN,
    };
  });
  known.set(frame, data);
  return data;
}
