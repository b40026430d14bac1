import type { ClauseRow } from '../design-code/clause-row';
import type { Demand, Place } from '../design-code/demand';
import { bendingResistance } from './bending';
import { longitudinalStress, momentLeft } from './bending-axial';
import { reducedByWeb, shearReduction } from './bending-shear';
import { classify, surelyPlastic, type Classified } from './classification';
import { compressionResistance } from './compression';
import type { Ec3Member } from './ec3-member';
import { basics, checkedRow, clauses, refusedRow, type Inputs } from './ec3-rows';
import { tensionResistance } from './tension';
import type { SectionClass } from './width-limits';

/** Places of a state with what each is classed as; null where all are surely of class 1 or 2. */
interface Sections {
  readonly places: readonly Place[];
  readonly classes: readonly Classified[] | null;
}

/** The words of a class 4 section: which plate, its c/t and the limit, never looking safer than it is. */
export const slenderWords = ({ plate, slenderness, limit }: Classified): string =>
  `class 4: slender ${plate ?? 'plate'} (c/t ${slenderness.toFixed(1)} > ${(Math.floor(limit * 10) / 10).toFixed(1)})`;

/** N at a place; a tension-only member is not pressed. */
const axial = (of: Ec3Member, N: number): number => (of.of.tensionOnly ? Math.max(0, N) : N);

/** Class under N and M; a class 4 section counts as class 3 where ε eased by its own compression allows (5.5.2(9)). */
function classAt(of: Ec3Member, N: number, M: number): Classified {
  const strict = classify(of.plates, of.fy, N, M, of.Wel);
  if (strict.class < 4) return strict;
  const pressed = -N / of.A + Math.abs(M) / of.Wel;
  const eased = classify(of.plates, of.fy, N, M, of.Wel, of.fy / of.gammaM0 / pressed);
  return eased.class < 4 ? { ...strict, class: 3, limit: eased.limit } : strict;
}

function sectionsOf(of: Ec3Member, places: readonly Place[], bent: boolean): Sections {
  const plastic = places.every(({ N, M }) => surelyPlastic(of.plasticRange, of.plates, axial(of, N), bent ? M : 0, of.Wel));
  return { places, classes: plastic ? null : places.map(({ N, M }) => classAt(of, axial(of, N), bent ? M : 0)) };
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
  const sections = sectionsOf(of, demand.places, bent);
  const slender = sections.classes?.find((found) => found.class === 4);
  if (slender) {
    rows.push(refusedRow(clauses.class, demand, slenderWords(slender)));
    return;
  }
  if (compression > 0) {
    const NcRd = compressionResistance(of.A, of.fy, of.gammaM0);
    rows.push(
      checkedRow(clauses.compression, demand, 'force', compression, NcRd, demand.compressionAt, null, () => ({
        ...basics(of),
        N: compression,
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

const classOf = ({ classes }: Sections, i: number): SectionClass => classes?.[i]?.class ?? 2;

const resistance = (of: Ec3Member, found: SectionClass): number => bendingResistance(found, of.Wpl, of.Wel, of.fy, of.gammaM0);

/** The place where a ratio is largest; -1 where it is nowhere above nil. */
function worst(sections: Sections, ratioOf: (place: Place, found: SectionClass) => number): number {
  let [best, most] = [-1, 0];
  for (let i = 0; i < sections.places.length; i++) {
    const ratio = ratioOf(sections.places[i]!, classOf(sections, i));
    if (ratio > most) [best, most] = [i, ratio];
  }
  return best;
}

const faceOf = (M: number): 'top' | 'bottom' => (M > 0 ? 'top' : 'bottom');

function classInputs(of: Ec3Member, N: number, M: number): Inputs {
  const found = classAt(of, N, M);
  const plastic = found.class <= 2;
  const W = plastic ? { W: of.Wpl, Wname: 'pl' } : { W: of.Wel, Wname: 'el' };
  return { class: found.class, plate: found.plate, ct: found.slenderness, ...W };
}

function bending(of: Ec3Member, demand: Demand, sections: Sections, rows: ClauseRow[]): void {
  const i = worst(sections, ({ M }, found) => Math.abs(M) / resistance(of, found));
  if (i < 0) return;
  const { x, N, M } = sections.places[i]!;
  const McRd = resistance(of, classOf(sections, i));
  rows.push(
    checkedRow(clauses.bending, demand, 'moment', Math.abs(M), McRd, x, faceOf(M), () => ({
      ...basics(of),
      ...classInputs(of, axial(of, N), M),
      M: Math.abs(M),
      McRd,
    })),
  );
}

/** 1 − ρ; above nil, so that where shear alone is over (6.2.6) ratios stay numbers. */
const kept = (rho: number): number => Math.max(1e-6, 1 - rho);

/** (6.30) is for an I of class 1 or 2 bent about its major axis. */
const byWeb = (of: Ec3Member, found: SectionClass): boolean => of.interaction === 'I major' && found <= 2;

/** M_V,Rd of a section: by (6.30), else (1 − ρ) M_c,Rd. */
function besideShear(of: Ec3Member, found: SectionClass, rho: number): number {
  const McRd = resistance(of, found);
  if (!byWeb(of, found)) return kept(rho) * McRd;
  return Math.max(1e-6 * McRd, reducedByWeb(of.Wpl, rho, of.Aw, of.tw, of.fy, of.gammaM0, McRd));
}

function bendingAndShear(of: Ec3Member, demand: Demand, sections: Sections, rows: ClauseRow[]): void {
  if (of.shearBuckling) {
    if (demand.shear > 0) rows.push(refusedRow(clauses.bendingShear, demand, 'shear buckling of the web, 6.2.6(6)'));
    return;
  }
  if (demand.shear <= 0.5 * of.VplRd) return;
  const i = worst(sections, ({ V, M }, found) => {
    const rho = shearReduction(V, of.VplRd);
    return rho === 0 ? 0 : Math.abs(M) / besideShear(of, found, rho);
  });
  if (i < 0) return;
  const { x, N, V, M } = sections.places[i]!;
  const found = classOf(sections, i);
  const rho = shearReduction(V, of.VplRd);
  const MvRd = besideShear(of, found, rho);
  rows.push(
    checkedRow(clauses.bendingShear, demand, 'moment', Math.abs(M), MvRd, x, faceOf(M), () => ({
      ...basics(of),
      ...classInputs(of, axial(of, N), M),
      M: Math.abs(M),
      V: Math.abs(V),
      VplRd: of.VplRd,
      rho,
      Aw: of.Aw,
      tw: of.tw,
      by: byWeb(of, found) ? '6.30' : 'whole',
      McRd: resistance(of, found),
      MvRd,
    })),
  );
}

/** The ratio of 6.2.9 at a section, the yield strength reduced by 1 − ρ for the whole section where V is high (6.2.10). */
function axialRatio(of: Ec3Member, { N: along, V, M }: Place, found: SectionClass): number {
  const N = axial(of, along);
  if (N === 0 || M === 0) return 0;
  const keep = kept(shearReduction(V, of.VplRd));
  if (found === 3) return longitudinalStress(N, M, of.A, of.Wel) / ((keep * of.fy) / of.gammaM0);
  const n = Math.abs(N) / (keep * of.NplRd);
  const m = Math.abs(M) / (keep * resistance(of, found));
  return of.interaction === 'linear' || n >= 1 ? n + m : m / momentLeft(of.interaction, n, of.a, of.web);
}

function bendingAndAxial(of: Ec3Member, demand: Demand, sections: Sections, rows: ClauseRow[]): void {
  const i = worst(sections, (place, found) => axialRatio(of, place, found));
  if (i < 0) return;
  const place = sections.places[i]!;
  const found = classOf(sections, i);
  const ratio = axialRatio(of, place, found);
  const { x, V, M } = place;
  const N = axial(of, place.N);
  const rho = shearReduction(V, of.VplRd);
  const keep = kept(rho);
  const n = Math.abs(N) / (keep * of.NplRd);
  const McRd = resistance(of, found);
  const by = found === 3 ? 'elastic' : of.interaction === 'linear' || n >= 1 ? 'linear' : of.interaction;
  const sigma = by === 'elastic' ? longitudinalStress(N, M, of.A, of.Wel) : null;
  const limit = by === 'elastic' ? (keep * of.fy) / of.gammaM0 : null;
  const MNRd = by === 'elastic' || by === 'linear' ? null : keep * McRd * momentLeft(by, n, of.a, of.web);
  const inputs = (): Inputs => ({
    ...basics(of),
    ...classInputs(of, N, M),
    N: Math.abs(N),
    V: Math.abs(V),
    M: Math.abs(M),
    VplRd: of.VplRd,
    rho,
    NplRd: of.NplRd,
    n,
    a: of.a,
    by,
    McRd,
    MNRd,
    sigma,
    limit,
    ratio,
  });
  const clause = clauses.bendingAxial;
  if (sigma !== null && limit !== null) rows.push(checkedRow(clause, demand, 'stress', sigma, limit, x, faceOf(M), inputs));
  else if (MNRd !== null) rows.push(checkedRow(clause, demand, 'moment', Math.abs(M), MNRd, x, faceOf(M), inputs));
  else rows.push(checkedRow(clause, demand, 'number', ratio, 1, x, faceOf(M), inputs));
}
