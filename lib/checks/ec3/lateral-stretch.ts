import type { Settings } from '@/lib/model/settings';
import type { Stretch } from '../design-code/demand';
import { modulusOf } from './bending';
import { criticalMoment, endRatio, isStraight, loadBetween, loadHeightFactor, momentFactor } from './critical-moment';
import type { Ec3Member, Lateral } from './ec3-member';
import {
  correctionFactor,
  generalCase,
  generalCurve,
  rolledCase,
  rolledCurve,
  type LateralResistance,
} from './lateral-torsional';
import type { Curve } from './reduction-factor';
import type { SectionClass } from './width-limits';

export type LateralCovered = Exclude<Lateral, { kind: 'none' | 'refused' }>;

/** 6.3.2 between two restraints of the pressed face. */
export interface LateralStretch extends LateralResistance {
  readonly stretch: Stretch;
  readonly face: 'top' | 'bottom';
  readonly M: number;
  /** Length of M_cr: between the restraints; twice that to a free end. */
  readonly L: number;
  readonly C1: number;
  readonly C2: number;
  readonly zg: number;
  readonly Mcr: number;
  readonly W: number;
  readonly curve: Curve;
  readonly by: 'rolled' | 'general';
  readonly ratio: number;
}

/**
 * M_Ed/M_b,Rd of a stretch (EN 1993-1-1 6.3.2), or why M_cr is not computed.
 *
 * C1 and kc by the diagram where its largest moment presses the face; where the other face is pressed harder, C1 = kc = 1 with the
 * moment that presses this one. To a free end: twice the length, C1 = 1, loads at the shear centre only.
 */
export function lateralStretch(
  of: Ec3Member,
  lateral: LateralCovered,
  stretch: Stretch,
  face: 'top' | 'bottom',
  sectionClass: SectionClass,
  loadHeight: Settings['loadHeight'],
): LateralStretch | string {
  const { h, b, E, fy, gammaM1, Iz } = of;
  const { made } = of.of.section;
  if (!stretch.heldAtStart && !stretch.heldAtEnd)
    return 'M_cr of a length without a restraint at either end, which is not computed';
  const held = stretch.heldAtStart && stretch.heldAtEnd;
  const M = stretch.compressing;
  const ownFace = Math.abs(stretch.largest) <= M * (1 + 1e-9);
  const byDiagram = held && ownFace;
  const C1 = byDiagram ? momentFactor(stretch) : 1;
  const height = heightOf(of, stretch, loadHeight, C1);
  if (height === null || (!held && loadHeight !== 'shear centre'))
    return `M_cr with loads at the ${loadHeight} for this diagram of moments${held ? '' : ' to a free end'}, which is not computed`;
  const L = (held ? 1 : 2) * stretch.length_m;
  const { C2, zg } = height;
  const Mcr = criticalMoment(E, lateral.G, Iz, lateral.It, lateral.Iw, L, C1, C2, zg);
  const W = modulusOf(sectionClass, of.WplY, of.WelY);
  const curve = lateral.curve ?? (lateral.kind === 'rolled' ? rolledCurve(made, h, b) : generalCurve(made, h, b));
  const kc = byDiagram ? correctionFactor(isStraight(stretch), endRatio(stretch), C1, loadBetween(stretch)) : 1;
  const found = lateral.kind === 'rolled' ? rolledCase(W, fy, Mcr, curve, kc, gammaM1) : generalCase(W, fy, Mcr, curve, gammaM1);
  const { lambda, phi, chi, f, chiMod, MbRd } = found;
  const by = lateral.kind;
  // written out: a spread of so many fields costs more than the sums themselves
  return { lambda, phi, chi, kc: found.kc, f, chiMod, MbRd, stretch, face, M, L, C1, C2, zg, Mcr, W, curve, by, ratio: M / MbRd };
}

/** C2 and z_g of loads on a flange; none where they act at the shear centre, away from it, or only at the ends. Null = not known. */
function heightOf(
  of: Ec3Member,
  stretch: Stretch,
  loadHeight: Settings['loadHeight'],
  C1: number,
): { readonly C2: number; readonly zg: number } | null {
  if (loadHeight === 'shear centre' || !stretch.loaded) return { C2: 0, zg: 0 };
  const C2 = loadHeightFactor(stretch, C1);
  if (C2 === null) return null;
  // loads towards local −y bend the stretch to positive M; they tip it from the top flange and steady it from the bottom one
  const down = stretch.middle > (stretch.start + stretch.end) / 2;
  return down === (loadHeight === 'top flange') ? { C2, zg: of.h / 2 } : { C2: 0, zg: 0 };
}
