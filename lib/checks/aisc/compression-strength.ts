import type { CodeMember } from '../design-code/code-member';
import type { Basis } from './basis';
import { elasticBucklingStress, nominalStress } from './flexural-buckling';
import { C1, effectiveAreaRatioOfRound, effectiveWidthRatio, localBucklingStress } from './slender-elements';
import { available, USUAL } from './strength';
import { torsionalBucklingStress } from './torsional-buckling';
import { compressionLimits } from './width-limits';

/** A mode of buckling of the whole member. */
interface Mode {
  readonly Fe: number;
  readonly Fn: number;
  readonly Pn: number;
  readonly Pc: number;
}

/** Flexural buckling about the axis with the larger L_c/r, and the other axis for the reader. */
export interface FlexuralMode extends Mode {
  readonly axis: 'major' | 'minor';
  readonly Lc: number;
  readonly r: number;
  readonly slenderness: number;
  readonly other: number;
}

export interface TorsionalMode extends Mode {
  readonly Lcz: number;
}

/** A slender plate's widths: the ratio of effective to whole, and the area lost. */
export interface SlenderPart {
  readonly lambda: number;
  readonly lambdaR: number;
  readonly ratio: number;
  readonly lost: number;
  /** Of Table E7.1, and F_el (E7-5); null for round walls. */
  readonly c1: number | null;
  readonly Fel: number | null;
}

export interface SlenderElements {
  readonly flange: SlenderPart | null;
  readonly web: SlenderPart | null;
  readonly Ae: number;
  /** The stress that governs the whole member, of E3 or E4. */
  readonly Fn: number;
  readonly from: 'E3' | 'E4';
  readonly Pn: number;
  readonly Pc: number;
}

export interface CompressionStrength {
  readonly flexural: FlexuralMode;
  /** Doubly symmetric open shapes; its clause governs where its F_e is below that of E3. */
  readonly torsional: TorsionalMode | null;
  readonly slender: SlenderElements | null;
  /** A clause that can't be applied: then there is no available strength. */
  readonly refused: { readonly check: string; readonly reason: string } | null;
  /** Available strength of the member (E1: the lowest of its modes), N; NaN where refused. */
  readonly Pc: number;
}

/** Available compressive strength of a member by E3, E4 and E7 of AISC 360-22. */
export function compressionStrength(of: Basis, member: CodeMember): CompressionStrength {
  const flexural = flexuralMode(of, member);
  const open = of.plates.shape === 'I' || of.plates.shape === 'channel';
  const base = { flexural, torsional: null, slender: null, Pc: NaN };
  if (of.plates.shape === 'channel')
    return {
      ...base,
      refused: { check: TORSIONAL, reason: 'flexural-torsional buckling of a channel (E4-3), which is not covered' },
    };
  if (open && of.G === null) return { ...base, refused: { check: TORSIONAL, reason: 'needs G' } };
  const torsional = open ? torsionalMode(of, member, of.G ?? NaN) : null;
  const twists = torsional !== null && torsional.Fe < flexural.Fe;
  const slender = slenderElements(of, twists ? torsional.Fn : flexural.Fn, twists ? 'E4' : 'E3');
  if (slender === 'not covered')
    return { ...base, torsional, refused: { check: SLENDER, reason: 'slender wall: D/t is not below 0.45 E/Fy' } };
  const Pc = slender ? slender.Pc : twists ? torsional.Pc : flexural.Pc;
  return { flexural, torsional, slender, refused: null, Pc };
}

const TORSIONAL = 'E4 torsional buckling';
export const SLENDER = 'B4.1 slender elements';

function mode(of: Basis, Fe: number): Mode {
  const Fn = nominalStress(of.Fy, Fe);
  const Pn = Fn * of.Ag;
  return { Fe, Fn, Pn, Pc: available(of.method, Pn, USUAL) };
}

function flexuralMode(of: Basis, member: CodeMember): FlexuralMode {
  const major = member.major.length_m / of.rx;
  const minor = member.minor.length_m / of.ry;
  const axis = major > minor ? 'major' : 'minor';
  const slenderness = Math.max(major, minor);
  return {
    ...mode(of, elasticBucklingStress(of.E, slenderness)),
    axis,
    Lc: axis === 'major' ? member.major.length_m : member.minor.length_m,
    r: axis === 'major' ? of.rx : of.ry,
    slenderness,
    other: Math.min(major, minor),
  };
}

/** Twisting is taken to be held where the member is held out of the plane and at both faces: L_cz is the longest of the three. */
function torsionalMode(of: Basis, member: CodeMember, G: number): TorsionalMode {
  const Lcz = Math.max(member.outOfPlane.length_m, member.top.length_m, member.bottom.length_m);
  return { ...mode(of, torsionalBucklingStress({ ...of, G }, Lcz)), Lcz };
}

/** Members with slender elements (E7), null where none is; the stress is that of the whole member. */
function slenderElements(of: Basis, Fn: number, from: 'E3' | 'E4'): SlenderElements | null | 'not covered' {
  const { plates, dimensions: d } = of;
  const limits = compressionLimits(plates, of.EperFy);
  const flangeSlender = plates.flange > limits.flange;
  const webSlender = plates.web > limits.web;
  if (!flangeSlender && !webSlender) return null;
  const withArea = (flange: SlenderPart | null, web: SlenderPart | null): SlenderElements => {
    const Ae = of.Ag - (flange?.lost ?? 0) - (web?.lost ?? 0);
    const Pn = Fn * Ae;
    return { flange, web, Ae, Fn, from, Pn, Pc: available(of.method, Pn, USUAL) };
  };
  if (plates.shape === 'chs') {
    const ratio = effectiveAreaRatioOfRound(of.EperFy, plates.flange);
    if (ratio === null) return 'not covered';
    return withArea(
      { lambda: plates.flange, lambdaR: limits.flange, ratio, lost: of.Ag * (1 - ratio), c1: null, Fel: null },
      null,
    );
  }
  const part = (c1: number, lambda: number, lambdaR: number, thickness: number, count: number): SlenderPart => {
    const ratio = effectiveWidthRatio(c1, lambda, lambdaR, of.Fy, Fn);
    const Fel = localBucklingStress(c1, lambda, lambdaR, of.Fy);
    return { lambda, lambdaR, ratio, lost: count * (1 - ratio) * lambda * thickness * thickness, c1, Fel };
  };
  const box = plates.shape === 'rhs';
  const [flangeThickness, webThickness] = box ? [d.t ?? NaN, d.t ?? NaN] : [d.tf ?? NaN, d.tw ?? NaN];
  return withArea(
    flangeSlender ? part(box ? C1.wall : C1.flange, plates.flange, limits.flange, flangeThickness, box ? 2 : 4) : null,
    webSlender ? part(box ? C1.wall : C1.web, plates.web, limits.web, webThickness, box ? 2 : 1) : null,
  );
}
