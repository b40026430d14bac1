import type { Section } from '@/lib/model/frame';
import { designationKey, keysOf, plainHollowKeys } from './designation-keys';
import { editDistance } from './edit-distance';
import { librarySection, rangeNames, ranges, type RangeName } from './library';
import { metricLabels } from './ranges/metric-labels';
import type { RangeRow } from './ranges/range';

/** Other standard ranges that a person may type: never taken for a near miss of one that is held. */
const notHeld = /^(HEC|HEX|UBP|IPN|INP|UAP|M|L|LL|MT|ST|WT|RHSH|T|EA|UA|RSA)$/;

interface Entry {
  readonly row: RangeRow;
  readonly range: RangeName;
  /** What was taken as understood, for the reader. */
  readonly note: string | null;
}

const byKey = new Map<string, Entry>();
for (const range of rangeNames)
  for (const row of ranges[range].rows)
    for (const key of keysOf(row.designation, range)) byKey.set(key, { row, range, note: null });
addMetricLabels();
for (const range of ['HFSHS', 'HFRHS', 'HFCHS', 'CFSHS', 'CFRHS', 'CFCHS'] as const)
  for (const row of ranges[range].rows) addPlain(range, row);

/** ASTM shapes are found by their metric label too, and by it with a whole mass where only one shape has that. */
function addMetricLabels(): void {
  const whole = new Map<string, string | null>();
  for (const [designation, label] of metricLabels) {
    const entry = byKey.get(designationKey(designation));
    if (!entry) throw new RangeError(`Expected a shape of a range, got ${designation}`);
    const note = `${entry.row.designation}, whose metric label is ${label}`;
    for (const key of keysOf(label, entry.range)) if (!byKey.has(key)) byKey.set(key, { ...entry, note });
    const rounded = label.replace(/[\d.]+$/, (mass) => String(Math.round(Number(mass))));
    whole.set(rounded, whole.has(rounded) ? null : designation);
  }
  for (const [rounded, designation] of whole) {
    const entry = designation === null ? undefined : byKey.get(designationKey(designation));
    const note = `${designation}, whose metric label is ${metricLabels.get(designation ?? '') ?? ''}`;
    if (entry) for (const key of keysOf(rounded, entry.range)) if (!byKey.has(key)) byKey.set(key, { ...entry, note });
  }
}

/** A hollow section typed without how it is made: cold formed where that is held, whose properties are the smaller. */
function addPlain(range: RangeName, row: RangeRow): void {
  const size = designationKey(row.designation).replace(/^[A-Z]+/, '');
  const { standard, made } = ranges[range];
  const other = range.startsWith('CF') ? byKey.get(`HF${range.slice(2)}${size}`) : undefined;
  const instead = other ? `, the smaller properties; ${other.row.designation} is the hot finished one` : '';
  const note = `${row.designation}, ${made ?? ''} (${standard})${instead}`;
  // cold formed ranges come last, and so take the place of hot finished ones
  for (const key of plainHollowKeys(range.slice(2), size)) byKey.set(key, { row, range, note });
}

export interface FoundDesignation {
  readonly section: Section;
  /** What was understood where the designation leaves it open ("CFRHS 200x100x6.3, cold formed (EN 10219-2) …"); else null. */
  readonly note: string | null;
}

/**
 * Finds a library section by its designation, however typed: `IPE300`, `ipe 300`, `HEA 300`, `HE 300 A`,
 * `305 x 165 x 40 UB`, `w 12 x 26`, `RHS 200x100x6.3`, `HSS 8 x 4 x 1/4`. The section's name is the designation as the
 * standard writes it.
 *
 * Not found: the nearest designation, if one is near, as a suggestion; null if none is.
 */
export function findDesignation(text: string): FoundDesignation | { readonly suggestion: string | null } {
  const key = designationKey(text);
  const entry = byKey.get(key);
  return entry ? { section: librarySection(entry.range, entry.row), note: entry.note } : { suggestion: nearest(key) };
}

/** Letters of the series, without the X between figures. */
const lettersOf = (key: string): string => key.replace(/(?<=\d)X(?=\d)|[^A-Z]/g, '');

/** Letters and the figures they are mistaken for, brought to one: `IPE24O` and `IPE240` look alike. */
const likeness = (key: string): string =>
  key.replace(/[OQILSBZG]/g, (letter) => '00115826'['OQILSBZG'.indexOf(letter)] ?? letter);

const lookalikes = new Map([...byKey].map(([key, { row }]) => [likeness(key), row.designation]));

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
      best = row.designation;
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
