import type { Frame } from '@/lib/model/frame';
import { measured } from './typed-loads';

/** A column of one storey, foot on a support and head under the beam. SI. */
export interface StoreyColumn {
  readonly member: number;
  readonly foot: number;
  readonly head: number;
  /** Height of its foot. */
  readonly y: number;
  readonly h: number;
  readonly EI: number;
  /** Its end at the foot, or the support there, lets it turn; its end alone does. */
  readonly footPinned: boolean;
  readonly footJointPinned: boolean;
  readonly headPinned: boolean;
}

export interface Storey {
  readonly columns: readonly StoreyColumn[];
  readonly bases: 'fixed' | 'pinned' | 'mixed';
  /** The straight level beam of a single bay between the heads of two columns, of one section; null = none. */
  readonly beam: { readonly EI: number; readonly l: number } | null;
}

/** A frame as one storey of upright columns under whatever joins their heads, or why it isn't one. */
export function rigidStorey(frame: Frame): Storey | { readonly why: string } {
  if (frame.supports.length < 2) return { why: 'fewer than two supports: there is no storey to sway' };
  const columns: StoreyColumn[] = [];
  for (const support of frame.supports) {
    const node = frame.nodes[support.node]!;
    const at = frame.members.flatMap((member, i) => (member.start === support.node || member.end === support.node ? [i] : []));
    const [i] = at;
    if (at.length !== 1 || i === undefined) return { why: `not one member alone stands on ${node.id}` };
    if (support.ux !== 'fixed' || support.uy !== 'fixed' || support.angle_rad !== 0)
      return { why: `the support at ${node.id} does not hold it in x and y` };
    if (typeof support.rz === 'number') return { why: `the base at ${node.id} turns on a spring` };
    const member = frame.members[i]!;
    const { cx, L } = measured(frame, i);
    if (Math.abs(cx) > 1e-6) return { why: `${member.id} on ${node.id} is not upright` };
    const upwards = member.start === support.node;
    const [footJoint, headJoint] = upwards ? [member.startJoint, member.endJoint] : [member.endJoint, member.startJoint];
    if (typeof footJoint === 'number' || typeof headJoint === 'number') return { why: `${member.id} has a joint on a spring` };
    const head = upwards ? member.end : member.start;
    if (frame.nodes[head]!.y_m < node.y_m) return { why: `${member.id} hangs from its support` };
    const EI = bendingStiffness(frame, i);
    if (EI === null) return { why: `the second moment of area of ${member.id} is not known` };
    const footPinned = support.rz === 'free' || footJoint === 'pin';
    const [footJointPinned, headPinned] = [footJoint === 'pin', headJoint === 'pin'];
    columns.push({ member: i, foot: support.node, head, y: node.y_m, h: L, EI, footPinned, footJointPinned, headPinned });
  }
  const why = whyNoStorey(frame, columns);
  if (why !== null) return { why };
  const pinned = columns.filter((column) => column.footPinned).length;
  const bases = pinned === 0 ? 'fixed' : pinned === columns.length ? 'pinned' : 'mixed';
  return { columns, bases, beam: beamOf(frame, columns) };
}

/** Heads joined above, nothing that hangs or stands beside the columns, no second storey. */
function whyNoStorey(frame: Frame, columns: readonly StoreyColumn[]): string | null {
  const heads = new Set(columns.map(({ head }) => head));
  const own = new Set(columns.map(({ member }) => member));
  const lowest = Math.min(...columns.map(({ y, h }) => y + h));
  for (const head of heads) {
    const others = frame.members.filter((member, i) => !own.has(i) && (member.start === head || member.end === head));
    if (others.length === 0) return `nothing joins the head of the column at ${frame.nodes[head]!.id} to the others`;
  }
  for (const [i, member] of frame.members.entries()) {
    if (own.has(i)) continue;
    if (member.tensionOnly || member.axialOnly) return `${member.id} braces it`;
    const ends = [frame.nodes[member.start]!, frame.nodes[member.end]!];
    if (ends.some((node) => node.y_m < lowest - 1e-6)) return `${member.id} reaches below the heads of the columns`;
    if (Math.abs(measured(frame, i).cx) < 1e-6) return `${member.id} stands above: it is more than one storey`;
  }
  return null;
}

function bendingStiffness(frame: Frame, member: number): number | null {
  const { section, material, turned } = frame.members[member]!;
  const { I_m4, Iminor_m4 } = frame.sections[section]!.properties;
  const I = turned ? Iminor_m4 : I_m4;
  return I === null ? null : I * frame.materials[material]!.E_Pa;
}

function beamOf(frame: Frame, columns: readonly StoreyColumn[]): Storey['beam'] {
  if (columns.length !== 2) return null;
  const own = new Set(columns.map(({ member }) => member));
  const [a, b] = columns.map(({ head }) => frame.nodes[head]!);
  let EI: number | null = null;
  let length = 0;
  for (const [i, member] of frame.members.entries()) {
    if (own.has(i)) continue;
    const { cy, L } = measured(frame, i);
    const own_EI = bendingStiffness(frame, i);
    if (Math.abs(cy) > 1e-6 || own_EI === null || member.startJoint !== 'rigid' || member.endJoint !== 'rigid') return null;
    if (EI !== null && Math.abs(own_EI - EI) > 1e-9 * EI) return null;
    EI = own_EI;
    length += L;
  }
  const l = Math.abs((a?.x_m ?? 0) - (b?.x_m ?? 0));
  // overhangs make it longer than the bay
  return EI === null || Math.abs(length - l) > 1e-6 * l ? null : { EI, l };
}
