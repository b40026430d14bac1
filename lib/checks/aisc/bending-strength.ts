import type { Basis } from './basis';
import { boxEffectiveModulus, boxFlangeMoment, boxLateralTorsionalMoment, boxLimitingLengths, boxWebMoment } from './box';
import { SLENDER } from './compression-strength';
import { flangeLocalBucklingMoment } from './flange-local-buckling';
import {
  channelFactor,
  criticalStress,
  effectiveRadius,
  lateralTorsionalMoment,
  limitingLengths,
  plasticMoment,
  type OpenSection,
} from './lateral-torsional';
import { minorAxisMoment, minorAxisPlasticMoment } from './minor-axis';
import { roundMoment } from './round';
import { flexureLimits, plateClass, type Limits, type PlateClass } from './width-limits';

/** Lateral-torsional buckling of a member; its moment depends on the segment. */
interface Lateral {
  readonly Lp: number;
  readonly Lr: number;
  moment(Lb: number, Cb: number): number;
  /** F_cr of F2; null for boxes, which have none. */
  criticalStress(Lb: number, Cb: number): number | null;
}

/** A plate in flexure: its ratio, its limits and its class. */
export interface Plate {
  readonly lambda: number;
  readonly limits: Limits;
  readonly class: PlateClass;
}

/** Bending strength of a member about the in-plane axis, as far as it does not depend on the segment. N·m. */
export interface BendingStrength {
  readonly check: string;
  readonly reference: string;
  readonly clause: 'F2' | 'F3' | 'F6' | 'F7' | 'F8';
  readonly Mp: number;
  readonly Z: number;
  readonly S: number;
  readonly flange: Plate;
  readonly web: Plate | null;
  /** Nominal moment of the flange's and of the web's local buckling (M_p where compact). */
  readonly flangeMoment: number;
  readonly webMoment: number;
  /** The smallest of M_p and local buckling. */
  readonly local: number;
  readonly lateral: Lateral | null;
  /** F2: r_y r_ts h_o J c; F7: r_y J; b_e, S_e where the flange of a box is slender. */
  readonly details: Readonly<Record<string, number>>;
}

export interface Refused {
  readonly check: string;
  readonly reason: string;
}

/** Which clause of chapter F holds for a member bent in the plane of the frame, and what it gives; or why it is not covered. */
export function bendingStrength(of: Basis): BendingStrength | Refused {
  switch (of.plates.shape) {
    case 'I':
    case 'channel':
      return of.turned ? aboutMinor(of) : aboutMajor(of);
    case 'rhs':
      return box(of);
    case 'chs':
      return round(of);
  }
}

const ratio = (lambda: number, limit: number): string => `${lambda.toFixed(1)} > ${limit.toFixed(1)}`;

function plate(lambda: number, limits: Limits): Plate {
  return { lambda, limits, class: plateClass(lambda, limits) };
}

function aboutMajor(of: Basis): BendingStrength | Refused {
  const limits = flexureLimits(of.plates, of.EperFy, false);
  const flange = plate(of.plates.flange, limits.flange);
  const web = plate(of.plates.web, limits.web ?? { p: NaN, r: NaN });
  const channel = of.plates.shape === 'channel';
  if (web.class === 'slender')
    return { check: SLENDER, reason: `slender web (h/tw ${ratio(web.lambda, web.limits.r)}): F5 is not covered` };
  if (web.class === 'noncompact')
    return { check: 'F2 bending', reason: `noncompact web (h/tw ${ratio(web.lambda, web.limits.p)}): F4 is not covered` };
  if (channel && flange.class !== 'compact')
    return {
      check: 'F2 bending',
      reason: `${flange.class} flange of a channel (b/t ${ratio(flange.lambda, flange.limits.p)}): F2 is for compact ones`,
    };
  const ho = (of.dimensions.h ?? NaN) - (of.dimensions.tf ?? NaN);
  const c = channel ? channelFactor(ho, of.Iy, of.Cw) : 1;
  const open: OpenSection = {
    E: of.E,
    Fy: of.Fy,
    Zx: of.Zx,
    Sx: of.Sx,
    ry: of.ry,
    rts: effectiveRadius(of.Iy, of.Cw, of.Sx),
    ho,
    J: of.J,
    c,
  };
  const Mp = plasticMoment(of.Fy, of.Zx);
  const { Lp, Lr } = limitingLengths(open);
  const flangeMoment = flangeLocalBucklingMoment({ ...of, Mp, kc: of.plates.kc }, flange.lambda, flange.limits);
  const compact = flange.class === 'compact';
  return {
    check: compact ? 'F2 bending' : 'F3 bending',
    reference: compact ? 'AISC 360-22 F2, (F1-1), (F2-1) to (F2-8)' : 'AISC 360-22 F3, (F1-1), (F2-2) to (F2-8), (F3-1), (F3-2)',
    clause: compact ? 'F2' : 'F3',
    Mp,
    Z: of.Zx,
    S: of.Sx,
    flange,
    web,
    flangeMoment,
    webMoment: Mp,
    local: Math.min(Mp, flangeMoment),
    lateral: {
      Lp,
      Lr,
      moment: (Lb, Cb) => lateralTorsionalMoment(open, Lp, Lr, Lb, Cb),
      criticalStress: (Lb, Cb) => criticalStress(open, Lb, Cb),
    },
    details: {
      ry: of.ry,
      rts: open.rts,
      ho,
      J: of.J,
      c,
      X: (open.J * c) / (open.Sx * ho),
      Cw: of.Cw,
      Iy: of.Iy,
      kc: of.plates.kc,
    },
  };
}

function aboutMinor(of: Basis): BendingStrength | Refused {
  if (of.Iy > of.Ix)
    return { check: 'F6 bending', reason: 'turned onto its stiffer axis: lateral-torsional buckling is not in F6' };
  const flange = plate(of.plates.flange, flexureLimits(of.plates, of.EperFy, true).flange);
  const Mp = minorAxisPlasticMoment(of.Fy, of.Zy, of.Sy);
  const flangeMoment = minorAxisMoment(of, flange.lambda, flange.limits);
  return {
    check: 'F6 bending',
    reference: 'AISC 360-22 F6, (F6-1) to (F6-4)',
    clause: 'F6',
    Mp,
    Z: of.Zy,
    S: of.Sy,
    flange,
    web: null,
    flangeMoment,
    webMoment: Mp,
    local: Math.min(Mp, flangeMoment),
    lateral: null,
    details: {},
  };
}

function box(of: Basis): BendingStrength | Refused {
  const { plates, turned, dimensions: d } = of;
  const limits = flexureLimits(plates, of.EperFy, turned);
  const flange = plate(turned ? plates.web : plates.flange, limits.flange);
  const web = plate(turned ? plates.flange : plates.web, limits.web ?? { p: NaN, r: NaN });
  const [Z, S, I] = turned ? [of.Zy, of.Sy, of.Iy] : [of.Zx, of.Sx, of.Ix];
  const bent = { E: of.E, Fy: of.Fy, Z, S, I, depth: (turned ? d.b : d.h) ?? NaN, t: d.t ?? NaN };
  const Mp = plasticMoment(of.Fy, Z);
  const webMoment = boxWebMoment(bent, web.lambda, web.limits);
  if (webMoment === null)
    return { check: SLENDER, reason: `slender web (h/t ${ratio(web.lambda, web.limits.r)}): F7.3(c) is not covered` };
  const flangeMoment = boxFlangeMoment(bent, flange.lambda, flange.limits);
  // a square section, and one bent about its weaker axis, does not buckle laterally (F7.4, user note)
  const sideways = turned ? of.Ix : of.Iy;
  const lateral = I > sideways * 1.0001 ? boxLateral(of, turned, Z, S) : null;
  return {
    check: 'F7 bending',
    reference: 'AISC 360-22 F7, (F1-1), (F7-1) to (F7-4), (F7-6), (F7-10) to (F7-13)',
    clause: 'F7',
    Mp,
    Z,
    S,
    flange,
    web,
    flangeMoment,
    webMoment,
    local: Math.min(Mp, flangeMoment, webMoment),
    lateral,
    details: {
      ...(flange.class === 'slender' ? boxEffectiveModulus(bent, flange.lambda) : {}),
      ...(lateral ? { ry: turned ? of.rx : of.ry, J: of.J, Ag: of.Ag } : {}),
    },
  };
}

function boxLateral(of: Basis, turned: boolean, Z: number, S: number): Lateral {
  const torsion = { E: of.E, Fy: of.Fy, Z, S, ry: turned ? of.rx : of.ry, J: of.J, Ag: of.Ag };
  const { Lp, Lr } = boxLimitingLengths(torsion);
  return { Lp, Lr, moment: (Lb, Cb) => boxLateralTorsionalMoment(torsion, Lp, Lr, Lb, Cb), criticalStress: () => null };
}

function round(of: Basis): BendingStrength | Refused {
  const flange = plate(of.plates.flange, flexureLimits(of.plates, of.EperFy, false).flange);
  const Mp = plasticMoment(of.Fy, of.Zx);
  const moment = roundMoment({ E: of.E, Fy: of.Fy, Z: of.Zx, S: of.Sx }, flange.lambda, flange.limits);
  if (moment === null) return { check: SLENDER, reason: 'slender wall: D/t is not below 0.45 E/Fy' };
  return {
    check: 'F8 bending',
    reference: 'AISC 360-22 F8, (F8-1) to (F8-4)',
    clause: 'F8',
    Mp,
    Z: of.Zx,
    S: of.Sx,
    flange,
    web: null,
    flangeMoment: moment,
    webMoment: Mp,
    local: Math.min(Mp, moment),
    lateral: null,
    details: {},
  };
}
