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
  /** Shear stiffness G Av, N; Infinity = the member does not shear. */
  readonly GAv: number;
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

/** What changes members from plain Euler–Bernoulli ones; a `StateMethod` says as much. */
export interface MemberMethod {
  /** Members shear as well as bend: G Av, a typed Av as given, else by shape (lib/sections/in-plane.ts). */
  readonly shearDeformation: boolean;
  /** Factors on EA (and G Av and the member's sprung joints) and EI by member, 2 each (AISC 360-22 C2.3); null = all 1. */
  readonly stiffness: Float64Array | null;
}

const known = new WeakMap<Frame, readonly MemberData[]>();
// asked for line after line of one frame
let latest: Frame | null = null;
let ofLatest: readonly MemberData[] = [];
const shearing = new WeakMap<Frame, readonly MemberData[]>();
const reduced = new WeakMap<readonly MemberData[], WeakMap<Float64Array, readonly MemberData[]>>();

/** Members of a frame in its own order; computed once a frame. */
export function memberData(frame: Frame): readonly MemberData[] {
  if (frame === latest) return ofLatest;
  const data = known.get(frame) ?? membersOf(frame);
  latest = frame;
  return (ofLatest = data);
}

function membersOf(frame: Frame): readonly MemberData[] {
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
      GAv: Infinity,
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

/** Members as one state is analysed; plain ones are `memberData(frame)` itself. NaN as G Av where G or Av is not known. */
export function memberDataFor(frame: Frame, as: MemberMethod | null): readonly MemberData[] {
  const data = as?.shearDeformation ? shearData(frame) : memberData(frame);
  const factors = as?.stiffness;
  if (!factors) return data;
  let kept = reduced.get(data);
  if (!kept) reduced.set(data, (kept = new WeakMap()));
  const before = kept.get(factors);
  if (before) return before;
  const less = data.map((m, i) => ({
    ...m,
    EA: m.EA * factors[2 * i]!,
    EI: m.EI * factors[2 * i + 1]!,
    GAv: m.GAv * factors[2 * i]!,
    startSpring: m.startSpring * factors[2 * i]!,
    endSpring: m.endSpring * factors[2 * i]!,
  }));
  kept.set(factors, less);
  return less;
}

function shearData(frame: Frame): readonly MemberData[] {
  const before = shearing.get(frame);
  if (before) return before;
  const data = memberData(frame).map((m, i) => {
    const member = frame.members[i]!;
    const Av = inPlane(frame.sections[member.section]!, member.turned).AvShear_m2;
    const GAv = (frame.materials[member.material]!.G_Pa ?? NaN) * (Av ?? NaN);
    // a tie by its use is not asked for a shear area
    return { ...m, GAv: member.tensionOnly && !(GAv > 0) ? Infinity : GAv };
  });
  shearing.set(frame, data);
  return data;
}
