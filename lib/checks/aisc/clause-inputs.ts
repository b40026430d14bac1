import type { Check } from '@/lib/results/result';
import type { Basis } from './basis';
import type { BendingStrength } from './bending-strength';
import type { SlenderPart, TorsionalMode } from './compression-strength';
import type { MemberStrength } from './member-strength';
import type { GoverningSegment } from './segment-moment';
import { c2 } from './slender-elements';
import { USUAL, type Factors } from './strength';

/** What the working of each clause prints, SI, by the standard's symbols. */
type Inputs = Check['inputs'];

/** The method, its factor and the material: in every clause. */
function common(of: Basis, factors: Factors): Inputs {
  return { method: of.method, factor: of.method === 'LRFD' ? factors.phi : factors.omega, E: of.E, Fy: of.Fy };
}

export function tensionInputs({ basis, tension }: MemberStrength, Pr: number): Inputs {
  return { ...common(basis, USUAL), clause: 'D2', Ag: basis.Ag, Pn: tension.Pn, Pc: tension.Pc, Pr };
}

export function flexuralInputs({ basis, compression }: MemberStrength, Pr: number): Inputs {
  const { flexural: f, torsional } = compression;
  return {
    ...common(basis, USUAL),
    clause: 'E3',
    Ag: basis.Ag,
    axis: f.axis,
    Lc: f.Lc,
    r: f.r,
    slenderness: f.slenderness,
    otherSlenderness: f.other,
    Fe: f.Fe,
    Fn: f.Fn,
    Pn: f.Pn,
    Pc: f.Pc,
    Pr,
    FeTorsional: torsional?.Fe ?? null,
  };
}

export function torsionalInputs({ basis }: MemberStrength, mode: TorsionalMode, Pr: number): Inputs {
  return {
    ...common(basis, USUAL),
    clause: 'E4',
    Ag: basis.Ag,
    G: basis.G,
    J: basis.J,
    Cw: basis.Cw,
    Ix: basis.Ix,
    Iy: basis.Iy,
    Lcz: mode.Lcz,
    Fe: mode.Fe,
    Fn: mode.Fn,
    Pn: mode.Pn,
    Pc: mode.Pc,
    Pr,
  };
}

export function slenderInputs({ basis, compression }: MemberStrength, Pr: number): Inputs {
  const { slender, flexural, torsional } = compression;
  if (!slender) return {};
  return {
    ...common(basis, USUAL),
    clause: 'E7',
    shape: basis.plates.shape,
    Ag: basis.Ag,
    from: slender.from,
    Fe: slender.from === 'E4' ? (torsional?.Fe ?? null) : flexural.Fe,
    slenderness: slender.from === 'E3' ? flexural.slenderness : null,
    Fn: slender.Fn,
    ...partInputs('flange', slender.flange),
    ...partInputs('web', slender.web),
    Ae: slender.Ae,
    Pn: slender.Pn,
    Pc: slender.Pc,
    Pr,
  };
}

function partInputs(plate: 'flange' | 'web', part: SlenderPart | null): Inputs {
  if (part === null) return {};
  const { lambda, lambdaR, ratio, lost, c1, Fel } = part;
  return {
    [`${plate}Lambda`]: lambda,
    [`${plate}LambdaR`]: lambdaR,
    [`${plate}Ratio`]: ratio,
    [`${plate}Lost`]: lost,
    [`${plate}C1`]: c1,
    [`${plate}C2`]: c1 === null ? null : c2(c1),
    [`${plate}Fel`]: Fel,
  };
}

export function bendingInputs(basis: Basis, bending: BendingStrength, of: GoverningSegment, Mc: number): Inputs {
  const { lateral, flange, web } = bending;
  const { segment } = of;
  return {
    ...common(basis, USUAL),
    ...bending.details,
    clause: bending.clause,
    shape: basis.plates.shape,
    Z: bending.Z,
    S: bending.S,
    Mp: bending.Mp,
    flangeLambda: flange.lambda,
    flangeLambdaP: flange.limits.p,
    flangeLambdaR: flange.limits.r,
    flangeClass: flange.class,
    flangeMoment: bending.flangeMoment,
    webLambda: web?.lambda ?? null,
    webLambdaP: web?.limits.p ?? null,
    webLambdaR: web?.limits.r ?? null,
    webClass: web?.class ?? null,
    webMoment: web ? bending.webMoment : null,
    Lb: lateral ? of.Lb : null,
    Lp: lateral?.Lp ?? null,
    Lr: lateral?.Lr ?? null,
    from: segment.from_m,
    to: segment.to_m,
    Mmax: Math.abs(segment.largest),
    MA: Math.abs(segment.quarter),
    MB: Math.abs(segment.middle),
    MC: Math.abs(segment.threeQuarter),
    Cb: lateral ? of.Cb : null,
    CbWhy: of.CbWhy,
    Fcr: lateral && of.Lb > lateral.Lr ? lateral.criticalStress(of.Lb, of.Cb) : null,
    lateralMoment: lateral ? lateral.moment(of.Lb, of.Cb) : null,
    Mn: of.Mn,
    Mc,
    Mr: of.Mr,
  };
}

export function shearInputs({ basis, shear }: MemberStrength, Vr: number): Inputs {
  const { details, clause, Vn, Vc, factors } = shear;
  return { ...common(basis, factors), ...details, clause, rolled: basis.rolledI ? 'yes' : null, Vn, Vc, Vr };
}

/** Both parts of H1 with what they came from. */
export function combinedInputs(
  basis: Basis,
  of: { readonly Pr: number; readonly Pc: number; readonly Mr: number; readonly Mc: number; readonly value: number },
  clauses: { readonly axial: string; readonly bending: string },
  clause: 'H1.1' | 'H1.2',
): Inputs {
  return {
    method: basis.method,
    clause,
    Pr: of.Pr,
    Pc: of.Pc,
    Mr: of.Mr,
    Mc: of.Mc,
    axial: of.Pr / of.Pc,
    bending: of.Mr / of.Mc,
    sum: of.value,
    axialClause: clauses.axial,
    bendingClause: clauses.bending,
  };
}
