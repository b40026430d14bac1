/** For tests: physical members and demands made by hand. */
import type { Material, Section, ShapeDimensions } from '@/lib/model/frame';
import { defaultSettings, type Settings } from '@/lib/model/settings';
import { sectionFromShape, type ShapeWord } from '@/lib/sections/section-from-shape';
import type { ClauseRow } from '../design-code/clause-row';
import type { CodeMember, EffectiveLength } from '../design-code/code-member';
import type { Demand, Stretch } from '../design-code/demand';
import { ec3 } from './ec3';

const steel = (fy: number | null = 355e6): Material => ({
  name: 'S355',
  grade: 'S355',
  standard: 'EN',
  E_Pa: 210e9,
  G_Pa: 81e9,
  fy_Pa: fy,
  fu_Pa: 490e6,
  density_kg_m3: 7850,
  expansion_perK: 12e-6,
  sources: {},
});

/** A section from dimensions in mm. */
export function shaped(shape: ShapeWord, mm: Partial<ShapeDimensions>, made: Section['made'] = 'rolled'): Section {
  const dims = Object.fromEntries(Object.entries(mm).map(([name, value]) => [name, value === null ? null : value / 1000]));
  const found = sectionFromShape(shape, dims, made);
  if ('trouble' in found) throw new RangeError(`Expected a section, got ${JSON.stringify(found.trouble)}`);
  return { ...found.section, name: shape, designation: null };
}

export const ipe300 = shaped('I', { h: 300, b: 150, tw: 7.1, tf: 10.7, r: 15 });
export const heb300 = shaped('I', { h: 300, b: 300, tw: 11, tf: 19, r: 27 });

interface MemberOptions {
  readonly L?: number;
  readonly turned?: boolean;
  readonly fy?: number | null;
  readonly tensionOnly?: boolean;
  readonly major?: number;
  readonly minor?: number;
  readonly free?: { readonly start: boolean; readonly end: boolean };
}

export function memberOf(section: Section, options: MemberOptions = {}): CodeMember {
  const { L = 6, turned = false, fy = 355e6, tensionOnly = false, free = { start: false, end: false } } = options;
  const typed = (length_m: number | undefined): EffectiveLength =>
    length_m === undefined ? { length_m: L, from: 'span' } : { length_m, from: 'typed' };
  const [major, minor] = [typed(options.major), typed(options.minor)];
  const whole = typed(undefined);
  return {
    span: { name: 'AB', kind: 'member', pieces: [], length_m: L, startNode: 0, endNode: 1, role: null, whole: true },
    member: 0,
    section,
    material: steel(fy),
    turned,
    role: null,
    length_m: L,
    axialOnly: false,
    tensionOnly,
    major,
    minor,
    inPlane: turned ? minor : major,
    outOfPlane: turned ? major : minor,
    top: whole,
    bottom: whole,
    restraints: { top: [0, L], bottom: [0, L] },
    free,
  };
}

interface DemandOptions {
  readonly L?: number;
  /** Tension positive, the same all along, N. */
  readonly N?: number;
  /** Moment at x/L, N·m. */
  readonly M?: (part: number) => number;
  readonly V?: (part: number) => number;
  readonly loaded?: boolean;
  readonly allowed?: boolean;
  readonly held?: { readonly start: boolean; readonly end: boolean };
}

/** A demand with places at every eighth, one stretch from end to end for either face. */
export function demandOf(options: DemandOptions = {}): Demand {
  const { L = 6, N = 0, M = () => 0, V = () => 0, loaded = false, allowed = true } = options;
  const { held = { start: true, end: true } } = options;
  const places = Array.from({ length: 9 }, (_, i) => ({ x: (i * L) / 8, N, V: V(i / 8), M: M(i / 8) }));
  const most = (of: (place: (typeof places)[number]) => number) => {
    const found = places.reduce((best, place) => (of(place) > of(best) ? place : best));
    return { value: Math.max(0, of(found)), at: found.x };
  };
  const [shear, moment] = [most((p) => Math.abs(p.V)), most((p) => Math.abs(p.M))];
  const [sagging, hogging] = [most((p) => p.M), most((p) => -p.M)];
  const stretch = (face: Stretch['face']): Stretch => {
    const pressing = face === 'top' ? sagging : face === 'bottom' ? hogging : moment;
    return {
      from_m: 0,
      to_m: L,
      length_m: L,
      face,
      heldAtStart: held.start,
      heldAtEnd: held.end,
      start: M(0),
      quarter: M(0.25),
      middle: M(0.5),
      threeQuarter: M(0.75),
      end: M(1),
      largest: sagging.value >= hogging.value ? sagging.value : -hogging.value,
      largestAt: moment.at,
      compressing: pressing.value,
      compressingAt: pressing.at,
      loaded,
      compression: Math.max(0, -N),
    };
  };
  return {
    combination: 'C1',
    criticalLoadFactor: null,
    order: 1,
    line: { length: L, segments: [] },
    places,
    tension: Math.max(0, N),
    tensionAt: 0,
    compression: Math.max(0, -N),
    compressionAt: 0,
    shear: shear.value,
    shearAt: shear.at,
    moment: moment.value,
    momentAt: moment.at,
    sagging: sagging.value,
    saggingAt: sagging.at,
    hogging: hogging.value,
    hoggingAt: hogging.at,
    stretches: (face) => [stretch(face)],
    whole: () => stretch(null),
    inPlane: allowed ? { allowed: true, how: 'as given' } : { allowed: false, why: 'needs the length in the plane' },
  };
}

/** Rows of one demand. */
export const rowsOf = (member: CodeMember, demand: Demand, change: Partial<Settings> = {}): readonly ClauseRow[] =>
  ec3.rows(member, [demand], { ...defaultSettings, strengthCheck: 'EN 1993-1-1', ...change }, () => undefined);

/** The row of a clause; throws where there is none. */
export function rowOf(rows: readonly ClauseRow[], clause: string): ClauseRow {
  const row = rows.find((one) => one.check.startsWith(clause));
  if (!row) throw new Error(`no ${clause}: ${rows.map((one) => one.check).join(', ')}`);
  return row;
}
