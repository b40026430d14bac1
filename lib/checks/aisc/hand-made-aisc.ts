import type { Material, Section } from '@/lib/model/frame';
import { defaultSettings, type Settings } from '@/lib/model/settings';
import { findDesignation } from '@/lib/sections/find-designation';
import type { Check } from '@/lib/results/result';
import type { ClauseRow } from '../design-code/clause-row';
import type { CodeMember } from '../design-code/code-member';
import type { Demand, Stretch } from '../design-code/demand';
import { steel } from '../hand-made';
import { aiscAsd, aiscLrfd } from './aisc';

/** For tests: members, demands and rows made by hand, in kip and feet where said. */
export const KIP = 4448.2216152605;
export const FT = 0.3048;
export const KIPFT = KIP * FT;
const KSI = 6894757.293168361;

/** Of Fy in ksi, E = 29 000 ksi, G = 11 200 ksi. */
export const ofFy = (ksi: number): Material =>
  steel({ standard: 'ASTM', E_Pa: 29000 * KSI, G_Pa: 11200 * KSI, fy_Pa: ksi * KSI });

export function sectionOfLibrary(designation: string): Section {
  const found = findDesignation(designation);
  if (!('section' in found)) throw new Error(`${designation} is not in the library`);
  return found.section;
}

/** A member of a section, `length` feet long, its restraints at its ends. */
export function memberOf(section: Section | string, length: number, change: Partial<CodeMember> = {}): CodeMember {
  const L = length * FT;
  const span = { length_m: L, from: 'span' } as const;
  const ends = [0, L];
  const pieces = [{ member: 0, from_m: 0, length_m: L, reversed: false }];
  return {
    span: { name: 'A', kind: 'member', pieces, length_m: L, startNode: 0, endNode: 1, role: 'beam', whole: true },
    member: 0,
    section: typeof section === 'string' ? sectionOfLibrary(section) : section,
    material: ofFy(50),
    turned: false,
    role: 'beam',
    length_m: L,
    axialOnly: false,
    tensionOnly: false,
    major: span,
    minor: span,
    inPlane: span,
    outOfPlane: span,
    top: span,
    bottom: span,
    restraints: { top: ends, bottom: ends },
    free: { start: false, end: false },
    ...change,
  };
}

/** A segment of `length` feet under a uniform moment (kip·ft, positive compresses the top), both ends held. */
export function stretchOf(moment: number, length: number, face: 'top' | 'bottom', change: Partial<Stretch> = {}): Stretch {
  const M = moment * KIPFT;
  const size = face === 'top' ? M : -M;
  return {
    from_m: 0,
    to_m: length * FT,
    length_m: length * FT,
    face,
    heldAtStart: true,
    heldAtEnd: true,
    start: M,
    quarter: M,
    middle: M,
    threeQuarter: M,
    end: M,
    largest: M,
    largestAt: 0,
    compressing: Math.max(0, size),
    compressingAt: 0,
    loaded: false,
    compression: 0,
    ...change,
  };
}

export interface Asked {
  /** Kip: tension, compression, shear; kip·ft: a uniform moment. */
  readonly tension?: number;
  readonly compression?: number;
  readonly shear?: number;
  readonly moment?: number;
  /** Segment, ft; 20 unless said. */
  readonly Lb?: number;
  readonly stretch?: Partial<Stretch>;
  readonly change?: Partial<Demand>;
}

function demandOf({ tension = 0, compression = 0, shear = 0, moment = 0, Lb = 20, stretch, change }: Asked): Demand {
  const M = moment * KIPFT;
  return {
    combination: 'C1',
    criticalLoadFactor: null,
    order: 2,
    line: { length: Lb * FT, segments: [] },
    places: [],
    tension: tension * KIP,
    tensionAt: 0,
    compression: compression * KIP,
    compressionAt: 0,
    shear: shear * KIP,
    shearAt: 0,
    moment: Math.abs(M),
    momentAt: 0,
    sagging: Math.max(0, M),
    saggingAt: 0,
    hogging: Math.max(0, -M),
    hoggingAt: 0,
    stretches: (face) => [stretchOf(moment, Lb, face, stretch)],
    whole: () => stretchOf(moment, Lb, 'top', stretch),
    inPlane: { allowed: true, how: 'direct analysis method (C2), K = 1' },
    ...change,
  };
}

const settingsOf = (strengthCheck: Settings['strengthCheck'], change: Partial<Settings> = {}): Settings => ({
  ...defaultSettings,
  strengthCheck,
  ...change,
});

export interface Found {
  readonly rows: readonly ClauseRow[];
  readonly notes: readonly string[];
}

/** The rows of a member under one or more demands, LRFD unless said otherwise. */
export function rowsOf(
  member: CodeMember,
  asked: readonly Asked[],
  method: 'LRFD' | 'ASD' = 'LRFD',
  change: Partial<Settings> = {},
): Found {
  const notes: string[] = [];
  const code = method === 'LRFD' ? aiscLrfd : aiscAsd;
  const rows = code.rows(member, asked.map(demandOf), settingsOf(code.name, change), (said) => notes.push(said));
  return { rows, notes };
}

export function rowNamed(found: Found, check: string): ClauseRow {
  const row = found.rows.find((one) => one.check === check);
  if (!row) throw new Error(`no row ${check} among ${found.rows.map((one) => one.check).join(', ')}`);
  return row;
}

/** A row as the framework hands it on. */
export function checkFrom(row: ClauseRow): Check {
  const { inputs, ...rest } = row;
  const verdict = row.ratio === null ? 'not checked' : row.ratio > 1 ? 'over' : 'within';
  return { ...rest, subjectKind: 'member', subject: 'A', verdict, member: 0, inputs: inputs() };
}
