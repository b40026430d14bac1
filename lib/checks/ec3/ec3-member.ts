import type { Settings } from '@/lib/model/settings';
import type { CodeMember } from '../design-code/code-member';
import type { PlasticInteraction } from './bending-axial';
import { plasticRange, platesOf, type CoveredShape, type PlasticRange, type Plates } from './classification';
import { bucklingCurve, bucklingResistance, criticalForce, torsionalForce, type Buckling } from './flexural-buckling';
import { criticalMoment } from './critical-moment';
import { plateauLT } from './lateral-torsional';
import type { Curve } from './reduction-factor';
import { shearArea, shearBuckling, shearResistance } from './shear';

/** Flexural buckling about one axis, or torsional buckling, with what it was worked out from. */
export interface BucklingMode extends Buckling {
  readonly mode: 'y' | 'z' | 'T';
  readonly I: number;
  readonly Lcr: number;
  readonly Ncr: number;
  readonly curve: Curve;
}

/** How a member buckles sideways when bent: not at all, or by M_cr with 6.3.2.3 or 6.3.2.2; or why it is not covered. */
export type Lateral =
  | { readonly kind: 'none' }
  | {
      readonly kind: 'rolled' | 'general';
      readonly It: number;
      readonly Iw: number;
      readonly G: number;
      readonly curve: Curve | null;
    }
  | { readonly kind: 'refused'; readonly why: string };

/** A member as EN 1993-1-1 checks it, as far as it does not depend on the combination; SI. y is the section's major axis. */
export interface Ec3Member {
  readonly of: CodeMember;
  readonly shape: CoveredShape;
  readonly plates: Plates;
  readonly plasticRange: PlasticRange;
  readonly A: number;
  readonly E: number;
  readonly fy: number;
  readonly gammaM0: number;
  readonly gammaM1: number;
  readonly h: number;
  readonly b: number;
  readonly tw: number;
  readonly Iy: number;
  readonly Iz: number;
  readonly It: number | null;
  readonly WelY: number;
  readonly WplY: number;
  readonly WelZ: number;
  readonly WplZ: number;
  /** In the plane of the frame. */
  readonly Wel: number;
  readonly Wpl: number;
  readonly NplRd: number;
  readonly Av: number;
  readonly VplRd: number;
  readonly shearBuckling: { readonly slenderness: number; readonly limit: number } | null;
  readonly interaction: PlasticInteraction;
  /** a of 6.2.9.1; hw tw/A and hw tw. */
  readonly a: number;
  readonly web: number;
  readonly Aw: number;
  /** Flexural buckling about y and z, then torsional buckling of an I; why not, for a channel. */
  readonly buckling: readonly [BucklingMode, BucklingMode, ...BucklingMode[]];
  readonly noBuckling: string | null;
  readonly lateral: Lateral;
}

/** What EN 1993-1-1 needs of a member, or in words why it can't be applied to it. */
export function ec3Member(of: CodeMember, settings: Settings): Ec3Member | string {
  const { section, material, turned } = of;
  const { shape, dimensions: dims, properties: p, made } = section;
  const fy = material.fy_Pa;
  if (fy === null) return `needs fy of ${material.name}`;
  if (fy > 460e6) return 'steel above S460 is not covered by EN 1993-1-1';
  if (shape === null || dims === null) return `section ${section.name} has no shape with dimensions: it can't be classified`;
  if (shape === 'bar' || shape === 'round') return 'solid bars are not covered here';
  const { I_m4: Iy, Iminor_m4: Iz, Wpl_m3: WplY, WplMinor_m3: WplZ, Wminor_m3: WelZ, A_m2: A, It_m4: It, Iw_m6: Iw } = p;
  const open = shape === 'I' || shape === 'channel';
  const missing: string[] = [];
  if (Iz === null) missing.push('I minor');
  if (p.Wtop_m3 === null || p.Wbottom_m3 === null) missing.push('W top, W bottom');
  if (WelZ === null) missing.push('W minor');
  if (WplY === null || WplZ === null) missing.push('Wpl');
  if (open && It === null) missing.push('It');
  if (open && Iw === null) missing.push('Iw');
  if (open && material.G_Pa === null) missing.push('G');
  if (missing.length > 0) {
    const tapered = open && It === null && section.designation !== null ? ' (tapered flanges are not covered)' : '';
    return `needs ${missing.join(', ')}${tapered}`;
  }
  if (Iz === null || p.Wtop_m3 === null || p.Wbottom_m3 === null || WelZ === null || WplY === null || WplZ === null)
    return 'needs section properties';
  const { gammaM0, gammaM1 } = settings;
  const WelY = Math.min(p.Wtop_m3, p.Wbottom_m3);
  const h = dims.h ?? dims.d ?? 0;
  const b = dims.b ?? dims.d ?? 0;
  const [tw, tf, t] = [dims.tw ?? 0, dims.tf ?? 0, dims.t ?? 0];
  const Av = shearArea(shape, dims, made, turned, A);
  const Aw = (h - 2 * tf) * tw;
  const E = material.E_Pa;
  const s460 = /^S460/i.test(material.grade ?? material.name);
  const mode = (which: 'y' | 'z', I: number, Lcr: number): BucklingMode => {
    const curve = bucklingCurve(shape, made, which === 'y' ? 'major' : 'minor', h, b, tf, s460);
    const Ncr = criticalForce(E, I, Lcr);
    return { mode: which, I, Lcr, Ncr, curve, ...bucklingResistance(A, fy, Ncr, curve, gammaM1) };
  };
  const buckling: [BucklingMode, BucklingMode, ...BucklingMode[]] = [
    mode('y', Iy, of.major.length_m),
    mode('z', Iz, of.minor.length_m),
  ];
  if (shape === 'I' && It !== null && Iw !== null && material.G_Pa !== null) {
    // what holds one face only does not hold the twist
    const Lcr = Math.max(of.outOfPlane.length_m, of.top.length_m, of.bottom.length_m);
    const Ncr = torsionalForce(E, material.G_Pa, It, Iw, (Iy + Iz) / A, Lcr);
    const curve = bucklingCurve(shape, made, 'minor', h, b, tf, s460);
    buckling.push({ mode: 'T', I: It, Lcr, Ncr, curve, ...bucklingResistance(A, fy, Ncr, curve, gammaM1) });
  }
  const member = { of, shape, A, E, fy, gammaM0, gammaM1, h, b, tw, Iy, Iz, It, WelY, WplY, WelZ, WplZ, Av, Aw, buckling };
  const plates = platesOf(shape, dims, turned, A);
  return {
    ...member,
    plates,
    plasticRange: plasticRange(plates, fy),
    Wel: turned ? WelZ : WelY,
    Wpl: turned ? WplZ : WplY,
    NplRd: (A * fy) / gammaM0,
    VplRd: shearResistance(Av, fy, gammaM0),
    shearBuckling: shearBuckling(shape, dims, turned, fy),
    interaction: shape === 'I' ? (turned ? 'I minor' : 'I major') : shape === 'rhs' ? 'rhs' : 'linear',
    a: Math.min(0.5, Math.max(0, shape === 'rhs' ? (A - 2 * (turned ? h : b) * t) / A : (A - 2 * b * tf) / A)),
    web: Aw / A,
    noBuckling: shape === 'channel' ? 'torsional-flexural buckling of a channel (6.3.1.4), which is not computed' : null,
    lateral: lateralOf(of, shape, fy, E, Iy, Iz, It, Iw, WplY, h > b),
  };
}

/** Whether 6.3.2 applies and how. Rectangular tubes: 6.3.2.2(4) leaves it out while λ̄LT ≤ 0.4, M_cr with C1 = 1. */
function lateralOf(
  of: CodeMember,
  shape: CoveredShape,
  fy: number,
  E: number,
  Iy: number,
  Iz: number,
  It: number | null,
  Iw: number | null,
  WplY: number,
  deep: boolean,
): Lateral {
  const { G_Pa: G } = of.material;
  if (shape === 'chs') return { kind: 'none' };
  if (of.turned ? Iz <= Iy : Iy <= Iz) return { kind: 'none' };
  if (of.turned) return { kind: 'refused', why: 'M_cr of a section turned onto its stiffer axis, which is not computed' };
  if (shape === 'channel') return { kind: 'refused', why: 'M_cr of a channel, whose loads do not pass through its shear centre' };
  if (It === null || G === null) return { kind: 'refused', why: 'M_cr: needs It and G' };
  if (shape === 'I') {
    const kind = of.section.made === 'rolled' || of.section.made === 'welded' ? 'rolled' : 'general';
    return { kind, It, Iw: Iw ?? 0, G, curve: null };
  }
  if (!deep) return { kind: 'none' };
  const Mcr = criticalMoment(
    E,
    G,
    Iz,
    It,
    0,
    (of.free.start || of.free.end ? 2 : 1) * Math.max(of.top.length_m, of.bottom.length_m, of.length_m),
    1,
  );
  if (Math.sqrt((WplY * fy) / Mcr) <= plateauLT) return { kind: 'none' };
  return { kind: 'general', It, Iw: 0, G, curve: 'd' };
}
