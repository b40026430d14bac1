import type { Frame, Member } from '@/lib/model/frame';
import { freeEnds, type Span } from '../spans';
import type { CodeMember, EffectiveLength } from './code-member';

type LengthField = 'lengthMajor_m' | 'lengthMinor_m' | 'lengthLtbTop_m' | 'lengthLtbBottom_m';

/** Why a span can't be checked as one physical member, or null. */
export function notOneMember(frame: Frame, span: Span): string | null {
  if (!span.whole) return 'pieces of the span do not form one line';
  const first = frame.members[span.pieces[0]!.member]!;
  const unlike = span.pieces.some((p) => {
    const m = frame.members[p.member]!;
    return m.section !== first.section || m.material !== first.material || m.turned !== first.turned;
  });
  return unlike ? 'pieces of the span have different sections' : null;
}

/** A length given on any piece of the span holds for the span; null = blank. */
function typedLength(frame: Frame, span: Span, field: LengthField): number | null {
  for (const piece of span.pieces) {
    const value = (frame.members[piece.member] as Member)[field];
    if (value !== null) return value;
  }
  return null;
}

/**
 * A span as both design codes see it. A length given on any piece holds for the span; a blank one is the span's, out of the
 * plane twice that where an end of it is free; pieces drawn both ways with unlike lengths of top and bottom have the longer for
 * both. Restraints of a face stand at every `length LTB` from the span's start and at its ends.
 */
export function codeMemberOf(frame: Frame, span: Span): CodeMember {
  const piece = span.pieces[0]!;
  const m = frame.members[piece.member]!;
  const free = freeEnds(frame, span);
  const L = span.length_m;
  const length = (field: LengthField, twice: boolean): EffectiveLength => {
    const typed = typedLength(frame, span, field);
    if (typed !== null) return { length_m: typed, from: 'typed' };
    return twice ? { length_m: 2 * L, from: 'twice span' } : { length_m: L, from: 'span' };
  };
  const open = free.start || free.end;
  const major = length('lengthMajor_m', open && m.turned);
  const minor = length('lengthMinor_m', open && !m.turned);
  let [top, bottom] = [length('lengthLtbTop_m', false), length('lengthLtbBottom_m', false)];
  // a piece drawn against the others has its top at their bottom
  if (top.length_m !== bottom.length_m && span.pieces.some((p) => p.reversed))
    top = bottom = top.length_m > bottom.length_m ? top : bottom;
  return {
    span,
    member: piece.member,
    section: frame.sections[m.section]!,
    material: frame.materials[m.material]!,
    turned: m.turned,
    role: span.role,
    length_m: L,
    axialOnly: span.pieces.length === 1 && m.startJoint === 'pin' && m.endJoint === 'pin',
    tensionOnly: span.pieces.some((p) => frame.members[p.member]!.tensionOnly),
    major,
    minor,
    inPlane: m.turned ? minor : major,
    outOfPlane: m.turned ? major : minor,
    top,
    bottom,
    restraints: { top: restraintsAlong(L, top.length_m), bottom: restraintsAlong(L, bottom.length_m) },
    free,
  };
}

/** The ends and every `spacing` from the start; one within a part in a million of the end is the end. */
function restraintsAlong(L: number, spacing: number): readonly number[] {
  const at = [0];
  for (let i = 1; i * spacing < L * (1 - 1e-6); i++) at.push(i * spacing);
  at.push(L);
  return at;
}

/** What is assumed of the member's lengths, in words; none where every length is given. */
export function lengthAssumptions(member: CodeMember): readonly string[] {
  const { span, top, bottom, inPlane, outOfPlane } = member;
  const said: string[] = [];
  const blank = [
    ...(inPlane.from === 'span' ? [member.turned ? 'minor' : 'major'] : []),
    ...(outOfPlane.from === 'span' ? [member.turned ? 'major' : 'minor'] : []),
    ...(top.from === 'span' ? ['LTB top'] : []),
    ...(bottom.from === 'span' ? ['LTB bottom'] : []),
  ];
  if (blank.length > 0) said.push(`${span.name}: length ${blank.join(', ')} taken as the length of the span`);
  if (outOfPlane.from === 'twice span')
    said.push(`${span.name}: out of the plane twice the length of the span, since an end of it is free`);
  if (member.restraints.top.length > 2 || member.restraints.bottom.length > 2)
    said.push('Restraints of a face stand at every length LTB from the start of the span, and at its ends');
  return said;
}
