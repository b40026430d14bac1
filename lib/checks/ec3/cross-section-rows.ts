import type { ClauseRow } from '../design-code/clause-row';
import type { Demand, Place } from '../design-code/demand';
import { bendingResistance } from './bending';
import { longitudinalStress, momentLeft } from './bending-axial';
import { reducedByWeb, shearReduction } from './bending-shear';
import { classify, type Classified } from './classification';
import { compressionResistance } from './compression';
import type { Ec3Member } from './ec3-member';
import { basics, checkedRow, clauses, refusedRow, type Inputs } from './ec3-rows';
import { tensionResistance } from './tension';

/** A place with what it is classed as; N and M without what a tension-only member is not pressed by. */
interface Section {
  readonly x: number;
  readonly N: number;
  readonly V: number;
  readonly M: number;
  readonly class: Classified;
}

/** The words of a class 4 section: which plate, its c/t and the limit, never looking safer than it is. */
export const slenderWords = ({ plate, slenderness, limit }: Classified): string =>
  `class 4: slender ${plate ?? 'plate'} (c/t ${slenderness.toFixed(1)} > ${(Math.floor(limit * 10) / 10).toFixed(1)})`;

/** Class at a place; a class 4 section counts as class 3 where ε eased by its own compression allows (5.5.2(9)). */
function sectionAt(of: Ec3Member, place: Place, bent: boolean): Section {
  const N = of.of.tensionOnly ? Math.max(0, place.N) : place.N;
  const M = bent ? place.M : 0;
  const strict = classify(of.plates, of.fy, N, M, of.Wel);
  if (strict.class < 4) return { x: place.x, N, V: place.V, M, class: strict };
  const pressed = -N / of.A + Math.abs(M) / of.Wel;
  const eased = classify(of.plates, of.fy, N, M, of.Wel, of.fy / of.gammaM0 / pressed);
  const found = eased.class < 4 ? { ...strict, class: 3 as const, limit: eased.limit } : strict;
  return { x: place.x, N, V: place.V, M, class: found };
}

/**
 * Rows of 6.2 for one state. Each section is classed at its own stress distribution; a slender one leaves 6.2.4, 6.2.5, 6.2.8
 * and 6.2.9 of the state unchecked.
 */
export function crossSectionRows(of: Ec3Member, demand: Demand, rows: ClauseRow[]): void {
  tensionAndShear(of, demand, rows);
  const bent = demand.moment > 0;
  const compression = of.of.tensionOnly ? 0 : demand.compression;
  if (!bent && compression === 0) return;
  const sections = demand.places.map((place) => sectionAt(of, place, bent));
  const slender = sections.find((section) => section.class.class === 4);
  if (slender) {
    rows.push(refusedRow(clauses.class, demand, slenderWords(slender.class)));
    return;
  }
  if (compression > 0) {
    const NcRd = compressionResistance(of.A, of.fy, of.gammaM0);
    const at = sections.find((section) => section.x === demand.compressionAt && section.N < 0)?.class.class ?? 3;
    rows.push(
      checkedRow(clauses.compression, demand, 'force', compression, NcRd, demand.compressionAt, null, () => ({
        ...basics(of),
        N: compression,
        class: at,
        NcRd,
      })),
    );
  }
  if (!bent) return;
  bending(of, demand, sections, rows);
  bendingAndShear(of, demand, sections, rows);
  bendingAndAxial(of, demand, sections, rows);
}

function tensionAndShear(of: Ec3Member, demand: Demand, rows: ClauseRow[]): void {
  const { A, Av, VplRd, fy, gammaM0 } = of;
  if (demand.tension > 0) {
    const N = demand.tension;
    const NtRd = tensionResistance(A, fy, gammaM0);
    rows.push(checkedRow(clauses.tension, demand, 'force', N, NtRd, demand.tensionAt, null, () => ({ ...basics(of), N, NtRd })));
  }
  if (!(demand.shear > 0)) return;
  if (of.shearBuckling) {
    const { slenderness, limit } = of.shearBuckling;
    const why = `shear buckling of the web, 6.2.6(6) (hw/t ${slenderness.toFixed(1)} > ${(Math.floor(limit * 10) / 10).toFixed(1)})`;
    rows.push(refusedRow(clauses.shear, demand, why));
    return;
  }
  const V = demand.shear;
  rows.push(
    checkedRow(clauses.shear, demand, 'force', V, VplRd, demand.shearAt, null, () => ({ ...basics(of), V, Av, eta: 1, VplRd })),
  );
}

const resistance = (of: Ec3Member, { class: found }: Section): number =>
  bendingResistance(found.class, of.Wpl, of.Wel, of.fy, of.gammaM0);

/** M_Ed/M of the section where that is largest. */
function worst(sections: readonly Section[], ratioOf: (section: Section) => number): { section: Section; ratio: number } | null {
  let best: { section: Section; ratio: number } | null = null;
  for (const section of sections) {
    const ratio = ratioOf(section);
    if (ratio > (best?.ratio ?? 0)) best = { section, ratio };
  }
  return best;
}

const faceOf = (M: number): 'top' | 'bottom' => (M > 0 ? 'top' : 'bottom');

const classInputs = (of: Ec3Member, { class: found }: Section): Inputs => ({
  class: found.class,
  plate: found.plate,
  ct: found.slenderness,
  W: found.class <= 2 ? of.Wpl : of.Wel,
  Wname: found.class <= 2 ? 'pl' : 'el',
});

function bending(of: Ec3Member, demand: Demand, sections: readonly Section[], rows: ClauseRow[]): void {
  const found = worst(sections, (section) => Math.abs(section.M) / resistance(of, section));
  if (!found) return;
  const { section } = found;
  const McRd = resistance(of, section);
  const M = Math.abs(section.M);
  rows.push(
    checkedRow(clauses.bending, demand, 'moment', M, McRd, section.x, faceOf(section.M), () => ({
      ...basics(of),
      ...classInputs(of, section),
      M,
      McRd,
    })),
  );
}

/** 1 − ρ; above nil, so that where shear alone is over (6.2.6) ratios stay numbers. */
const kept = (rho: number): number => Math.max(1e-6, 1 - rho);

/** M_V,Rd of a section: (6.30) for an I of class 1 or 2 bent about its major axis, else (1 − ρ) M_c,Rd. */
function besideShear(of: Ec3Member, section: Section, rho: number): number {
  const McRd = resistance(of, section);
  return of.interaction === 'I major' && section.class.class <= 2
    ? Math.max(1e-6 * McRd, reducedByWeb(of.Wpl, rho, of.Aw, of.tw, of.fy, of.gammaM0, McRd))
    : kept(rho) * McRd;
}

function bendingAndShear(of: Ec3Member, demand: Demand, sections: readonly Section[], rows: ClauseRow[]): void {
  if (of.shearBuckling) {
    if (demand.shear > 0) rows.push(refusedRow(clauses.bendingShear, demand, 'shear buckling of the web, 6.2.6(6)'));
    return;
  }
  if (demand.shear <= 0.5 * of.VplRd) return;
  const found = worst(sections, (section) => {
    const rho = shearReduction(section.V, of.VplRd);
    return rho === 0 ? 0 : Math.abs(section.M) / besideShear(of, section, rho);
  });
  if (!found) return;
  const { section } = found;
  const rho = shearReduction(section.V, of.VplRd);
  const MvRd = besideShear(of, section, rho);
  const M = Math.abs(section.M);
  rows.push(
    checkedRow(clauses.bendingShear, demand, 'moment', M, MvRd, section.x, faceOf(section.M), () => ({
      ...basics(of),
      ...classInputs(of, section),
      M,
      V: Math.abs(section.V),
      VplRd: of.VplRd,
      rho,
      Aw: of.Aw,
      tw: of.tw,
      by: of.interaction === 'I major' && section.class.class <= 2 ? '6.30' : 'whole',
      McRd: resistance(of, section),
      MvRd,
    })),
  );
}

/** The ratio of 6.2.9 at a section, the yield strength reduced by 1 − ρ for the whole section where V is high (6.2.10). */
function axialRatio(of: Ec3Member, section: Section): number {
  if (section.N === 0 || section.M === 0) return 0;
  const keep = kept(shearReduction(section.V, of.VplRd));
  if (section.class.class === 3) return longitudinalStress(section.N, section.M, of.A, of.Wel) / ((keep * of.fy) / of.gammaM0);
  const n = Math.abs(section.N) / (keep * of.NplRd);
  if (of.interaction === 'linear' || n >= 1) return n + Math.abs(section.M) / (keep * resistance(of, section));
  return Math.abs(section.M) / (keep * resistance(of, section) * momentLeft(of.interaction, n, of.a, of.web));
}

function bendingAndAxial(of: Ec3Member, demand: Demand, sections: readonly Section[], rows: ClauseRow[]): void {
  const found = worst(sections, (section) => axialRatio(of, section));
  if (!found) return;
  const { section, ratio } = found;
  const rho = shearReduction(section.V, of.VplRd);
  const keep = kept(rho);
  const n = Math.abs(section.N) / (keep * of.NplRd);
  const M = Math.abs(section.M);
  const by = section.class.class === 3 ? 'elastic' : of.interaction === 'linear' || n >= 1 ? 'linear' : of.interaction;
  const McRd = resistance(of, section);
  const left = by === 'elastic' || by === 'linear' ? null : momentLeft(by, n, of.a, of.web);
  const inputs = () => ({
    ...basics(of),
    ...classInputs(of, section),
    N: Math.abs(section.N),
    V: Math.abs(section.V),
    M,
    VplRd: of.VplRd,
    rho,
    NplRd: of.NplRd,
    n,
    a: of.a,
    web: of.web,
    by,
    McRd,
    MNRd: left === null ? null : keep * McRd * left,
    sigma: by === 'elastic' ? longitudinalStress(section.N, section.M, of.A, of.Wel) : null,
    limit: by === 'elastic' ? (keep * of.fy) / of.gammaM0 : null,
    ratio,
  });
  const face = faceOf(section.M);
  if (by === 'elastic') {
    const sigma = longitudinalStress(section.N, section.M, of.A, of.Wel);
    rows.push(checkedRow(clauses.bendingAxial, demand, 'stress', sigma, (keep * of.fy) / of.gammaM0, section.x, face, inputs));
  } else if (left === null) rows.push(checkedRow(clauses.bendingAxial, demand, 'number', ratio, 1, section.x, face, inputs));
  else rows.push(checkedRow(clauses.bendingAxial, demand, 'moment', M, keep * McRd * left, section.x, face, inputs));
}
