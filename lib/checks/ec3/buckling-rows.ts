import type { Settings } from '@/lib/model/settings';
import type { ClauseRow } from '../design-code/clause-row';
import type { Demand } from '../design-code/demand';
import { endRatio, isStraight } from './critical-moment';
import { modulusOf } from './bending';
import { classify, type Classified } from './classification';
import { slenderWords } from './cross-section-rows';
import type { BucklingMode, Ec3Member } from './ec3-member';
import { basics, checkedRow, clauses, refusedRow, type Inputs } from './ec3-rows';
import { interactionRow } from './interaction-row';
import { lateralStretch, type LateralStretch } from './lateral-stretch';

/** Class for 6.3: at the place of the largest |N|/N_pl + |M|/M_el, without the easing of ε (5.5.2(10)). */
function governingClass(of: Ec3Member, demand: Demand): Classified {
  let [most, N, M] = [-1, 0, 0];
  for (const place of demand.places) {
    const axial = of.of.tensionOnly ? Math.max(0, place.N) : place.N;
    const moment = demand.moment > 0 ? place.M : 0;
    const used = Math.max(0, -axial) / of.A + Math.abs(moment) / of.Wel;
    if (used > most) [most, N, M] = [used, axial, moment];
  }
  return classify(of.plates, of.fy, N, M, of.Wel);
}

/** Rows of 6.3 for one state. */
export function bucklingRows(of: Ec3Member, demand: Demand, settings: Settings, rows: ClauseRow[]): void {
  const N = of.of.tensionOnly ? 0 : demand.compression;
  const bent = demand.moment > 0;
  const lateral = bent && of.lateral.kind !== 'none';
  if (N === 0 && !lateral) return;
  const found = governingClass(of, demand);
  if (found.class === 4) {
    // 6.2 may have passed it with ε eased, or said the same already
    if (!rows.some((row) => row.check === clauses.class.check && row.combination === demand.combination))
      rows.push(refusedRow(clauses.class, demand, slenderWords(found)));
    return;
  }
  if (N > 0) flexuralRow(of, demand, N, found, rows);
  const stretches = lateral ? lateralRows(of, demand, found, settings, rows) : [];
  if (N === 0 || !bent) return;
  rows.push(interactionRow(of, demand, N, found, stretches, settings));
}

function flexuralRow(of: Ec3Member, demand: Demand, N: number, found: Classified, rows: ClauseRow[]): void {
  if (of.noBuckling) {
    rows.push(refusedRow(clauses.flexural, demand, of.noBuckling));
    return;
  }
  const inPlane = of.of.turned ? 'z' : 'y';
  const { inPlane: rule } = demand;
  let mode: BucklingMode | null = null;
  for (const one of of.buckling) if ((rule.allowed || one.mode !== inPlane) && (!mode || one.NbRd < mode.NbRd)) mode = one;
  if (mode === null || (!rule.allowed && N <= mode.NbRd)) {
    rows.push(refusedRow(clauses.flexural, demand, rule.allowed ? 'no critical force' : rule.why));
    return;
  }
  const least = mode;
  rows.push(
    checkedRow(clauses.flexural, demand, 'force', N, least.NbRd, demand.compressionAt, null, () => ({
      ...basics(of),
      class: found.class,
      N,
      ...modeInputs(of, least),
    })),
  );
}

/** What leads to N_b,Rd of a mode, each name with the mode's letter: Ncr, λ̄, α's curve, Φ, χ. */
function modeInputs(of: Ec3Member, mode: BucklingMode): Inputs {
  const { mode: letter, I, Lcr, Ncr, curve, lambda, phi, chi, NbRd } = mode;
  const section = of.of.section.properties;
  const torsion: Inputs = letter === 'T' ? { G: of.of.material.G_Pa, Iw: section.Iw_m6, i0squared: (of.Iy + of.Iz) / of.A } : {};
  return { axis: letter, I, Lcr, Ncr, curve, lambda, phi, chi, NbRd, ...torsion };
}

/** The row of 6.3.2, its worst stretch first; every stretch for 6.3.3. A reason in words where one is not covered. */
function lateralRows(
  of: Ec3Member,
  demand: Demand,
  found: Classified,
  settings: Settings,
  rows: ClauseRow[],
): readonly LateralStretch[] | string {
  const { lateral } = of;
  if (lateral.kind === 'none') return [];
  if (lateral.kind === 'refused') {
    rows.push(refusedRow(clauses.lateral, demand, lateral.why));
    return lateral.why;
  }
  const all: LateralStretch[] = [];
  let worst: LateralStretch | null = null;
  let refused: string | null = null;
  for (const face of ['top', 'bottom'] as const) {
    if (!((face === 'top' ? demand.sagging : demand.hogging) > 0)) continue;
    for (const stretch of demand.stretches(face)) {
      if (!(stretch.compressing > 0)) continue;
      const one = lateralStretch(of, lateral, stretch, face, found.class, settings.loadHeight);
      if (typeof one === 'string') refused = one;
      else {
        all.push(one);
        if (worst === null || one.ratio > worst.ratio) worst = one;
      }
    }
  }
  // what is over stays shown; else one stretch that is not covered leaves the clause unchecked
  if (refused !== null && !(worst !== null && worst.ratio > 1)) {
    rows.push(refusedRow(clauses.lateral, demand, refused));
    return refused;
  }
  if (worst !== null) rows.push(lateralRow(of, demand, found, worst));
  return refused ?? all;
}

function lateralRow(of: Ec3Member, demand: Demand, found: Classified, worst: LateralStretch): ClauseRow {
  const { M, MbRd, face, stretch } = worst;
  return checkedRow(clauses.lateral, demand, 'moment', M, MbRd, stretch.compressingAt, face, () => ({
    ...basics(of),
    class: found.class,
    plate: found.plate,
    ct: found.slenderness,
    ...lateralInputs(of, worst),
  }));
}

/** What leads to M_b,Rd of a stretch. */
function lateralInputs(of: Ec3Member, one: LateralStretch): Inputs {
  const { M, L, C1, C2, zg, Mcr, W, curve, by, lambda, phi, chi, kc, f, chiMod, MbRd, face, stretch } = one;
  const { lateral } = of;
  const torsion: Inputs =
    lateral.kind === 'rolled' || lateral.kind === 'general' ? { It: lateral.It, Iw: lateral.Iw, G: lateral.G } : {};
  const where = { from: stretch.from_m, to: stretch.to_m, face };
  const Wname = W === modulusOf(1, of.WplY, of.WelY) ? 'pl' : 'el';
  const factors = {
    M,
    L,
    C1,
    C2,
    zg,
    Mcr,
    W,
    Wname,
    curve,
    by,
    lambdaLT: lambda,
    phiLT: phi,
    chiLT: chi,
    kc,
    f,
    chiLTmod: chiMod,
    MbRd,
  };
  return { ...where, Iz: of.Iz, Pz: (Math.PI ** 2 * of.E * of.Iz) / (L * L), ...torsion, ...factors, ...gradientInputs(one) };
}

/** The diagram of a stretch, and what C1 was taken by. */
function gradientInputs({ C1, M, stretch }: LateralStretch): Inputs {
  const { quarter, middle, threeQuarter, largest, heldAtStart, heldAtEnd } = stretch;
  const psi = endRatio(stretch);
  const own = heldAtStart && heldAtEnd && Math.abs(largest) <= M * (1 + 1e-9);
  const straight = isStraight(stretch) && C1 >= 1.77 - 1.04 * psi + 0.27 * psi * psi - 1e-9;
  const C1by = !own || C1 === 1 ? 'uniform' : straight ? 'straight' : 'diagram';
  return { C1by, psi, Mmax: Math.abs(largest), Mquarter: quarter, Mmiddle: middle, MthreeQuarter: threeQuarter };
}
