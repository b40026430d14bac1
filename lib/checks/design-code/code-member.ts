import type { Material, Role, Section } from '@/lib/model/frame';
import type { Span } from '../spans';

/** An effective length and where it comes from: the sheet, the length of the span, or twice that (a free end, out of the plane). */
export interface EffectiveLength {
  readonly length_m: number;
  readonly from: 'typed' | 'span' | 'twice span';
}

/** A physical member as both design codes see it, as far as it does not depend on the combination. SI. */
export interface CodeMember {
  /** Carries the subject's name and kind, its pieces and its length; positions run from the span's start. */
  readonly span: Span;
  /** Index of the first piece in the frame. */
  readonly member: number;
  readonly section: Section;
  readonly material: Material;
  /** Section turned 90°: in-plane bending (the M of every demand) is about its minor axis. */
  readonly turned: boolean;
  readonly role: Role | null;
  readonly length_m: number;
  /** Pinned at both ends, so that it carries no moment from the frame. */
  readonly axialOnly: boolean;
  /** Slack where it would be pressed. */
  readonly tensionOnly: boolean;
  /** Effective lengths for flexural buckling about the section's own axes. */
  readonly major: EffectiveLength;
  readonly minor: EffectiveLength;
  /** The same two, by plane: `inPlane` is `major` unless turned. */
  readonly inPlane: EffectiveLength;
  readonly outOfPlane: EffectiveLength;
  /** Spacing of the restraints of each face along the span, from its start; the span's length where there are none between. */
  readonly top: EffectiveLength;
  readonly bottom: EffectiveLength;
  /** Where restraints of each face stand, m from the span's start, both ends of the span included; a free end is not restrained. */
  readonly restraints: { readonly top: readonly number[]; readonly bottom: readonly number[] };
  /** Ends without another member or a support. */
  readonly free: { readonly start: boolean; readonly end: boolean };
}
