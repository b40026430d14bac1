import type { Frame, Member } from '@/lib/model/frame';
import { criticalMoment, eulerLoad, lateralTorsional, type LateralTorsional } from './lateral-torsional';
import { freeEnds, type Span } from './spans';

/** Buckling of a span as far as it does not depend on the combination, SI. */
export interface SpanBuckling {
  readonly A: number;
  readonly E: number;
  readonly Imajor: number;
  readonly Iminor: number | null;
  readonly Lmajor: number;
  readonly Lminor: number;
  /** Between restraints of the top and bottom face. */
  readonly Ltop: number;
  readonly Lbottom: number;
  readonly NcrMajor: number;
  /** Null where I minor is not known. */
  readonly NcrMinor: number | null;
  readonly ltb: LateralTorsional;
  /** Infinity where the section does not buckle laterally; not to be used where `ltb` needs something. */
  readonly McrTop: number;
  readonly McrBottom: number;
  /** The length in the plane of the frame was left blank: "major", or "minor" where the section is turned; null = given. */
  readonly blankInPlane: 'major' | 'minor' | null;
  /** Every length that was left blank and is taken as the span's. */
  readonly blank: readonly string[];
  /** Pieces drawn both ways with unlike lengths of top and bottom: which face a length means is open, so the longer holds for both. */
  readonly longerForBoth: boolean;
  /** A blank length out of the plane of a span with a free end is twice the span's (Euler's strut, fixed and free). */
  readonly twiceForFreeEnd: boolean;
  /** An open section of one axis of symmetry buckles by twisting too; that load is not computed. */
  readonly twists: boolean;
  /** Slack where it would be pressed: no compression of its to be screened. */
  readonly tensionOnly: boolean;
}

type LengthField = 'lengthMajor_m' | 'lengthMinor_m' | 'lengthLtbTop_m' | 'lengthLtbBottom_m';
const words: Readonly<Record<LengthField, string>> = {
  lengthMajor_m: 'major',
  lengthMinor_m: 'minor',
  lengthLtbTop_m: 'LTB top',
  lengthLtbBottom_m: 'LTB bottom',
};

/** A length given on any piece of the span holds for the span; null = blank. */
function typedLength(frame: Frame, span: Span, field: LengthField): number | null {
  for (const piece of span.pieces) {
    const value = (frame.members[piece.member] as Member)[field];
    if (value !== null) return value;
  }
  return null;
}

/**
 * Critical loads and moments of a span, all of one section. Blank lengths are the length of the span, never of a piece; where
 * an end of it is free, out of the plane twice that.
 */
export function spanBuckling(frame: Frame, span: Span): SpanBuckling {
  const member = frame.members[span.pieces[0]!.member]!;
  const section = frame.sections[member.section]!;
  const material = frame.materials[member.material]!;
  const p = section.properties;
  const E = material.E_Pa;
  const blank = (Object.keys(words) as LengthField[]).filter((field) => typedLength(frame, span, field) === null);
  const length = (field: LengthField): number => typedLength(frame, span, field) ?? span.length_m;
  const inPlane: LengthField = member.turned ? 'lengthMinor_m' : 'lengthMajor_m';
  const outOfPlane: LengthField = member.turned ? 'lengthMajor_m' : 'lengthMinor_m';
  const ends = freeEnds(frame, span);
  const twiceForFreeEnd = blank.includes(outOfPlane) && (ends.start || ends.end);
  const buckling = (field: LengthField): number => (twiceForFreeEnd && field === outOfPlane ? 2 : 1) * length(field);
  const [Lmajor, Lminor] = [buckling('lengthMajor_m'), buckling('lengthMinor_m')];
  const ofFaces = [length('lengthLtbTop_m'), length('lengthLtbBottom_m')] as const;
  // a piece drawn against the others has its top at their bottom
  const longerForBoth = ofFaces[0] !== ofFaces[1] && span.pieces.some((piece) => piece.reversed);
  const [Ltop, Lbottom] = longerForBoth ? [Math.max(...ofFaces), Math.max(...ofFaces)] : ofFaces;
  const ltb = lateralTorsional(section, member.turned, material);
  const Mcr = (L: number): number => (ltb.kind === 'formula' ? criticalMoment(E, ltb.G, ltb.Iz, ltb.It, ltb.Iw, L) : Infinity);
  return {
    A: p.A_m2,
    E,
    Imajor: p.I_m4,
    Iminor: p.Iminor_m4,
    Lmajor,
    Lminor,
    Ltop,
    Lbottom,
    NcrMajor: eulerLoad(E, p.I_m4, Lmajor),
    NcrMinor: p.Iminor_m4 === null ? null : eulerLoad(E, p.Iminor_m4, Lminor),
    ltb,
    McrTop: Mcr(Ltop),
    McrBottom: Mcr(Lbottom),
    blankInPlane: blank.includes(inPlane) ? (member.turned ? 'minor' : 'major') : null,
    blank: blank.map((field) => words[field]),
    longerForBoth,
    twiceForFreeEnd,
    twists: section.shape === 'channel',
    tensionOnly: member.tensionOnly,
  };
}
