import type { Section } from '@/lib/model/frame';
import { editDistance } from './edit-distance';
import { heA } from './ranges/he-a';
import { heB } from './ranges/he-b';
import { ipe } from './ranges/ipe';
import type { Range, RangeRow } from './ranges/range';
import { ub } from './ranges/ub';
import { w } from './ranges/w';
import { sectionFromShape, sourcesOf } from './section-from-shape';

/** The standard ranges held, in the order a list shows them. */
export const ranges = { IPE: ipe, 'HE A': heA, 'HE B': heB, UB: ub, W: w } as const satisfies Record<string, Range>;
export type RangeName = keyof typeof ranges;

/** Other standard ranges that a person may type: never taken for a near miss of one that is held. */
const notHeld = /^(HEM|HEAA|HEC|HEX|UC|UKC|UBP|IPN|INP|UPN|UPE|UNP|PFC|SHS|RHS|CHS|HSS|PIPE|HP|S|M|C|MC|L|WT|RHSH)$/;

interface Entry {
  readonly row: RangeRow;
  readonly range: RangeName;
}

const byKey = new Map<string, Entry>();
for (const range of Object.keys(ranges) as RangeName[])
  for (const row of ranges[range].rows) for (const key of keysOf(row[0])) byKey.set(key, { row, range });
const made = new Map<string, Section>();

/**
 * Finds a library section by its designation, however typed: `IPE300`, `ipe 300`, `HEA 300`, `HE 300 A`,
 * `305 x 165 x 40 UB`, `w 12 x 26`. The section's name is the designation as the standard writes it.
 *
 * Not found: the nearest designation, if one is near, as a suggestion; null if none is.
 */
export function findDesignation(text: string): { readonly section: Section } | { readonly suggestion: string | null } {
  const key = keyOf(text);
  const entry = byKey.get(key);
  return entry ? { section: sectionOf(entry) } : { suggestion: nearest(key) };
}

/** Every designation of a range, in the order of its table. */
export function designationsOf(range: RangeName): readonly string[] {
  return ranges[range].rows.map((row) => row[0]);
}

/** Capitals without blanks, dashes and signs between the figures: `305 × 165 x 40` → `305X165X40`. */
function keyOf(text: string): string {
  return text
    .normalize('NFKC')
    .toUpperCase()
    .replace(/[×*]/g, 'X')
    .replace(/(\d),(\d)/g, '$1.$2')
    .replace(/[\s_\-–—/]/g, '');
}

/** How a designation may be typed: letters of its series before or after the size. */
function keysOf(designation: string): string[] {
  const key = keyOf(designation);
  const [, letters = '', size = '', after = ''] = /^([A-Z]+?)(\d[\dX.]*?)([A-Z]*)$/.exec(key) ?? [];
  if (letters === 'UB' || letters === 'W') return [key, `${size}${letters}`];
  if (letters === 'HE') return [key, `HE${after}${size}`];
  const variant = letters.slice('IPE'.length);
  return variant === '' ? [key] : [key, `IPE${size}${variant}`, `${variant}IPE${size}`];
}

function sectionOf({ row, range }: Entry): Section {
  const [designation, h, b, tw, tf, r] = row;
  const known = made.get(designation);
  if (known) return known;
  const unit = ranges[range].unit === 'mm' ? 0.001 : 0.0254;
  const result = sectionFromShape('I', { h: h * unit, b: b * unit, tw: tw * unit, tf: tf * unit, r: r * unit }, 'rolled');
  if ('trouble' in result) throw new RangeError(`the dimensions held for ${designation} make no section`);
  const sources = sourcesOf(result.section.properties, 'library');
  const section: Section = { ...result.section, name: designation, designation, sources };
  made.set(designation, section);
  return section;
}

/** Letters of the series, without the X between figures. */
const lettersOf = (key: string): string => key.replace(/(?<=\d)X(?=\d)|[^A-Z]/g, '');

/** Letters and the figures they are mistaken for, brought to one: `IPE24O` and `IPE240` look alike. */
const likeness = (key: string): string =>
  key.replace(/[OQILSBZG]/g, (letter) => '00115826'['OQILSBZG'.indexOf(letter)] ?? letter);

const lookalikes = new Map([...byKey].map(([key, { row }]) => [likeness(key), row[0]]));

/**
 * The designation that looks the same, a letter typed for a figure; else the one whose text is nearest: up to two
 * letters or figures apart, letters of the series counting double, since a size is mistyped more often than a series;
 * among those, the one whose figures are nearest. A size typed without its series is compared as such.
 */
function nearest(key: string): string | null {
  const letters = lettersOf(key);
  if (!/\d/.test(key)) return null;
  const lookalike = lookalikes.get(likeness(key));
  if (lookalike !== undefined) return lookalike;
  if (notHeld.test(letters) || /^[\d.]+$/.test(key)) return null;
  let best: string | null = null;
  let least = Infinity;
  for (const [candidate, { row }] of byKey) {
    const series = letters === '' ? '' : lettersOf(candidate);
    const compared = letters === '' ? candidate.replace(/^[A-Z]+|[A-Z]+$/g, '') : candidate;
    if (Math.abs(compared.length - key.length) > 2) continue;
    const apart = editDistance(compared, key) + editDistance(series, letters);
    const distance = apart + Math.min(0.99, sizeApart(candidate, key));
    if (apart <= 2 && distance < least) {
      least = distance;
      best = row[0];
    }
  }
  return best;
}

/** How far apart the figures are, each relative to the larger, added up. */
function sizeApart(a: string, b: string): number {
  const first = a.match(/[\d.]+/g) ?? [];
  const second = b.match(/[\d.]+/g) ?? [];
  let apart = 0;
  for (let i = 0; i < Math.max(first.length, second.length); i++) {
    const [x, y] = [Number(first[i] ?? 0), Number(second[i] ?? 0)];
    apart += Math.abs(x - y) / Math.max(x, y, 1e-9);
  }
  return apart;
}
