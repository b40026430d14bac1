import type { Material, Section } from '@/lib/model/frame';
import type { MemberLine } from '@/lib/results/result';
import type { InPlane } from '@/lib/sections/in-plane';
import { turningPoints } from './peak';
import { rootsWithin, valueAt } from './polynomial';

/**
 * One plate of a section that some distribution of stress makes slender, and the test for it along a member:
 * - compressed: any compression at a face of the section;
 * - gradient: a·σ_N − b·σ_M > 0 somewhere, σ_N = −N/A, σ_M = |M|/I (per metre from the axis): the stress ratio ψ of the
 *   plate passes the ψ at which its c/t is the limit;
 * - axial, bent: any axial compression; any bending.
 */
interface SlenderPlate {
  readonly plate: 'web' | 'flange' | 'wall';
  readonly test: 'compressed' | 'gradient' | 'axial' | 'bent';
  readonly a: number;
  readonly b: number;
}

/** The plates of a section that need watching; `known` is false where its proportions are not known. */
export interface PlateProportions {
  readonly known: boolean;
  readonly watch: readonly SlenderPlate[];
  /** Why the web's shear resistance is not known: it may buckle in shear before it yields. Null = it does not. */
  readonly shear: string | null;
}

/** Stress below this part of yield counts as none: what is left of zero after rounding. */
const NOTHING = 1e-6;

/**
 * Proportions of the compressed plates of a section against class 3 of EN 1993-1-1 Table 5.2 (EN grades, or none), or against
 * the slender limits λr of AISC 360-22 Tables B4.1a and B4.1b (ASTM grades). Plates that no distribution makes slender are left out.
 */
export function plateProportions(section: Section, turned: boolean, material: Material): PlateProportions {
  const { shape, dimensions: dims } = section;
  const fy = material.fy_Pa;
  if (fy === null || shape === 'bar' || shape === 'round') return { known: true, watch: [], shear: null };
  if (shape === null || dims === null) return { known: false, watch: [], shear: null };
  const watch = material.standard === 'ASTM' ? byAisc(section, turned, material.E_Pa / fy) : byEurocode(section, turned, fy);
  return { known: true, watch, shear: shearBuckling(section, turned, material, fy) };
}

/**
 * Whether a web without stiffeners may buckle in shear: clear depth over thickness above 72 ε (EN 1993-1-1 6.2.6(6) with η = 1),
 * for ASTM grades above 1.10 √(kv E/Fy), kv = 5.34 (AISC 360-22 G2.1). What it then carries is not computed.
 */
function shearBuckling(section: Section, turned: boolean, material: Material, fy: number): string | null {
  const { h, b, tw, tf, t } = dimensionsOf(section);
  const open = section.shape === 'I' || section.shape === 'channel';
  if ((open && turned) || (!open && section.shape !== 'rhs')) return null;
  const slenderness = open ? (h - 2 * tf) / tw : ((turned ? b : h) - 2 * t) / t;
  const astm = material.standard === 'ASTM';
  const limit = astm ? 1.1 * Math.sqrt((5.34 * material.E_Pa) / fy) : 72 * Math.sqrt(235e6 / fy);
  if (slenderness <= limit) return null;
  return `shear buckling of the web (h/t ${slenderness.toFixed(1)} > ${limit.toFixed(1)}), which is not computed`;
}

function byEurocode(section: Section, turned: boolean, fy: number): readonly SlenderPlate[] {
  const { h, b, tw, tf, r, t, d } = dimensionsOf(section);
  const e = Math.sqrt(235e6 / fy);
  switch (section.shape) {
    case 'I':
      return turned
        ? [...uniform('web', (h - 2 * tf - 2 * r) / tw, 42 * e, 'axial'), ...outstand((b - tw) / 2 - r, tf, tw / 2 + r, b / 2, e)]
        : [...internal((h - 2 * tf - 2 * r) / 2, tw, e), ...uniform('flange', ((b - tw) / 2 - r) / tf, 14 * e)];
    case 'channel':
      // turned, the toes may point either way: a plate is compressed as soon as one face is
      return turned
        ? [...uniform('web', (h - 2 * tf - 2 * r) / tw, 42 * e), ...uniform('flange', (b - tw - r) / tf, 14 * e)]
        : [...internal((h - 2 * tf - 2 * r) / 2, tw, e), ...uniform('flange', (b - tw - r) / tf, 14 * e)];
    case 'rhs': {
      const [depth, width] = turned ? [b, h] : [h, b];
      return [...internal((depth - 2 * r) / 2, t, e), ...uniform('flange', (width - 2 * r) / t, 42 * e)];
    }
    case 'chs':
      return uniform('wall', d / t, 90 * e * e);
    default:
      return [];
  }
}

function dimensionsOf(section: Section) {
  const dims = section.dimensions;
  const of = (name: 'h' | 'b' | 'tw' | 'tf' | 'r' | 't' | 'd'): number => dims?.[name] ?? 0;
  // the flat of a wall is never taken narrower than outside − 3t (EN 1993-1-1 Table 5.2; AISC 360-22 B4.1b): real corners vary
  const r = section.shape === 'rhs' ? Math.min(of('r'), 1.5 * of('t')) : of('r');
  return { h: of('h'), b: of('b'), tw: of('tw'), tf: of('tf'), r, t: of('t'), d: of('d') };
}

function uniform(
  plate: SlenderPlate['plate'],
  slenderness: number,
  limit: number,
  test: SlenderPlate['test'] = 'compressed',
): SlenderPlate[] {
  return slenderness > limit ? [{ plate, test, a: 1, b: 0 }] : [];
}

/**
 * A web between two flanges, half its clear depth from the axis to its edge (Table 5.2, internal parts, class 3):
 * c/t ≤ 42ε/(0.67 + 0.33ψ) for ψ > −1, 62ε(1 − ψ)√−ψ for ψ ≤ −1. Both fall as ψ grows, so c/t is beyond the limit
 * where ψ = (σ_N − σ_M e)/(σ_N + σ_M e) is above the ψ that the limit belongs to.
 */
function internal(half: number, t: number, epsilon: number): SlenderPlate[] {
  const slenderness = (2 * half) / t;
  if (slenderness <= 42 * epsilon) return [];
  let psi = ((42 * epsilon) / slenderness - 0.67) / 0.33;
  if (psi <= -1) {
    // 62(1 − ψ)√−ψ grows with −ψ: with x = √−ψ, x³ + x = c/(62 t ε)
    const target = slenderness / (62 * epsilon);
    let x = Math.max(1, Math.cbrt(target));
    for (let i = 0; i < 50; i++) x -= (x ** 3 + x - target) / (3 * x * x + 1);
    psi = -Math.max(1, x * x);
  }
  return [{ plate: 'web', test: 'gradient', a: 1 - psi, b: (1 + psi) * half }];
}

/**
 * A flange outstand bent in its own plane (section turned), from `root` to `tip` off the axis: c/t ≤ 21ε√kσ with
 * kσ = 0.57 − 0.21ψ + 0.07ψ² for a compressed tip (EN 1993-1-5 Table 4.2); 14ε at ψ = 1. The half whose tip is in tension
 * always has the larger kσ.
 */
function outstand(c: number, t: number, root: number, tip: number, epsilon: number): SlenderPlate[] {
  const slenderness = c / t;
  if (slenderness <= 14 * epsilon) return [];
  const k = (slenderness / (21 * epsilon)) ** 2;
  const psi = (0.21 - Math.sqrt(0.0441 - 0.28 * (0.57 - k))) / 0.14;
  if (!(psi > -3)) return [{ plate: 'flange', test: 'compressed', a: 1, b: 0 }];
  return [{ plate: 'flange', test: 'gradient', a: 1 - Math.min(1, psi), b: Math.min(1, psi) * tip - root }];
}

function byAisc(section: Section, turned: boolean, EperFy: number): readonly SlenderPlate[] {
  const { h, b, tw, tf, r, t, d } = dimensionsOf(section);
  const root = Math.sqrt(EperFy);
  const plates: SlenderPlate[] = [];
  const add = (plate: SlenderPlate['plate'], slenderness: number, axial: number, bent: number): void => {
    plates.push(...uniform(plate, slenderness, axial, 'axial'), ...uniform(plate, slenderness, bent, 'bent'));
  };
  switch (section.shape) {
    case 'I':
    case 'channel': {
      const web = (h - 2 * tf - 2 * r) / tw;
      const kc = Math.min(0.76, Math.max(0.35, 4 / Math.sqrt((h - 2 * tf) / tw)));
      // built-up, or not said: the stricter of the two
      const rolled = section.made === 'rolled';
      const axial = rolled ? 0.56 * root : Math.min(0.56 * root, 0.64 * root * Math.sqrt(kc));
      const bent = rolled || turned ? root : Math.min(root, 0.95 * root * Math.sqrt(kc / 0.7));
      add('flange', section.shape === 'I' ? b / 2 / tf : b / tf, axial, bent);
      // turned, the web of an I lies on the axis; that of a channel may be its compressed face
      add('web', web, 1.49 * root, turned ? (section.shape === 'I' ? Infinity : 1.49 * root) : 5.7 * root);
      return plates;
    }
    case 'rhs': {
      const [depth, width] = turned ? [b, h] : [h, b];
      add('flange', (width - 2 * r) / t, 1.4 * root, 1.4 * root);
      add('web', (depth - 2 * r) / t, 1.4 * root, 5.7 * root);
      return plates;
    }
    case 'chs':
      add('wall', d / t, 0.11 * EperFy, 0.31 * EperFy);
      return plates;
    default:
      return plates;
  }
}

const stress = new Float64Array(16);
const moment = new Float64Array(16);
const points = new Float64Array(32);
const crossings = new Float64Array(32);

/** The first plate that the distribution of stress along a member in one combination makes slender; null where none is. */
export function slenderPlate(
  watch: readonly SlenderPlate[],
  line: MemberLine,
  of: InPlane,
  fy: number,
): SlenderPlate['plate'] | null {
  for (const plate of watch) if (isSlender(plate, line, of, NOTHING * fy)) return plate.plate;
  return null;
}

/**
 * The plate that makes a member's elastic stress in one combination unsafe to state, or null.
 *
 * The cross-section that governs is judged by the limits as they stand. Elsewhere on the member the distribution may be
 * less favourable (where M passes through zero, compression is uniform) but the stress is lower: there the limits are those of
 * the member's largest compressive stress in place of yield, ε √(f·fy/σ_com) (EN 1993-1-1 5.5.2(9)). At full stress both are
 * the same. ASTM grades have no such easing: any place on the member counts.
 * @param peak where the normal stress is largest, with the forces there   @param f stress factor
 */
export function slenderInCombination(
  section: Section,
  turned: boolean,
  material: Material,
  watch: readonly SlenderPlate[],
  line: MemberLine,
  of: InPlane,
  peak: { readonly N: number; readonly M: number },
  f: number,
): SlenderPlate['plate'] | null {
  const fy = material.fy_Pa;
  if (fy === null || watch.length === 0) return null;
  if (material.standard === 'ASTM') return slenderPlate(watch, line, of, fy);
  const there: MemberLine = { length: 0, segments: [{ from: 0, to: 0, N: [peak.N], V: [0], M: [peak.M], u: [0], v: [0] }] };
  const governing = slenderPlate(watch, there, of, fy);
  if (governing) return governing;
  const pressed = largestCompression(line, of) / f;
  if (!(pressed > NOTHING * fy)) return null;
  const eased = pressed < fy ? plateProportions(section, turned, { ...material, fy_Pa: pressed }).watch : watch;
  return slenderPlate(eased, line, of, fy);
}

/** Largest compressive stress at either face along a member, Pa; 0 where there is none. */
function largestCompression(line: MemberLine, of: InPlane): number {
  const perA = 1 / of.A_m2;
  let most = 0;
  for (const perW of [of.Wtop_m3 ? 1 / of.Wtop_m3 : 0, of.Wbottom_m3 ? -1 / of.Wbottom_m3 : 0])
    for (const { N, M, from, to } of line.segments) {
      const degree = combine(N, M, -perA, perW, stress);
      const count = turningPoints(stress, degree, to - from, points);
      for (let j = 0; j < count; j++) most = Math.max(most, valueAt(stress, degree, points[j]!));
    }
  return most;
}

function isSlender({ test, a, b }: SlenderPlate, line: MemberLine, of: InPlane, nothing: number): boolean {
  const perA = 1 / of.A_m2;
  const I = of.I_m4 ?? Infinity;
  const perTop = of.Wtop_m3 ? 1 / of.Wtop_m3 : 0;
  const perBottom = of.Wbottom_m3 ? 1 / of.Wbottom_m3 : 0;
  switch (test) {
    case 'axial':
      return largest(line, -perA, 0, nothing);
    case 'bent':
      return largest(line, 0, perTop, nothing) || largest(line, 0, -perTop, nothing);
    case 'compressed':
      return largest(line, -perA, perTop, nothing) || largest(line, -perA, -perBottom, nothing);
    case 'gradient':
      // b < 0: either sign of M may pass; b > 0: both must, at the same x
      if (b <= 0) return largest(line, -a * perA, -b / I, nothing) || largest(line, -a * perA, b / I, nothing);
      return bothPass(line, -a * perA, b / I, nothing);
  }
}

/** Whether N·perN + M·perM passes `above` anywhere on the member. */
function largest(line: MemberLine, perN: number, perM: number, above: number): boolean {
  for (const { N, M, from, to } of line.segments) {
    const degree = combine(N, M, perN, perM, stress);
    const count = turningPoints(stress, degree, to - from, points);
    for (let j = 0; j < count; j++) if (valueAt(stress, degree, points[j]!) > above) return true;
  }
  return false;
}

/** Whether N·perN − |M|·perM passes `above` anywhere: it is largest at an end, where either line turns, or where M is nil. */
function bothPass(line: MemberLine, perN: number, perM: number, above: number): boolean {
  for (const { N, M, from, to } of line.segments) {
    const axialDegree = combine(N, M, perN, 0, stress);
    const momentDegree = combine(N, M, 0, perM, moment);
    const passes = (s: number): boolean => valueAt(stress, axialDegree, s) - Math.abs(valueAt(moment, momentDegree, s)) > above;
    const nil = rootsWithin(moment, momentDegree, to - from, crossings);
    for (let j = 0; j < nil; j++) if (passes(crossings[j]!)) return true;
    for (const sign of [1, -1]) {
      const degree = combine(N, M, perN, sign * perM, crossings);
      const count = turningPoints(crossings, degree, to - from, points);
      for (let j = 0; j < count; j++) if (passes(points[j]!)) return true;
    }
  }
  return false;
}

function combine(N: readonly number[], M: readonly number[], perN: number, perM: number, out: Float64Array): number {
  const terms = Math.max(N.length, M.length, 1);
  for (let k = 0; k < terms; k++) out[k] = (N[k] ?? 0) * perN + (M[k] ?? 0) * perM;
  return terms - 1;
}
