import { nearest } from '@/lib/intake/distance';
import type { SheetDefinition } from '@/lib/intake/sheet-definitions';
import { wordKey } from '@/lib/intake/words';
import type { System } from '@/lib/units/quantity';

/** A heading as typed, apart from the unit that stands behind its name. */
export interface HeadingText {
  readonly text: string;
  readonly name: string;
  readonly unit: string | null;
}

const longest = 200;

/** `x [m]`, `x (mm)`: the name, and the unit in the last brackets. */
export function splitHeading(text: string): HeadingText {
  // no heading with a unit is as long as that, and the search would take long on a text made to be slow
  if (text.length > longest) return { text, name: text.trim(), unit: null };
  const match = /^(.*?\S)\s*(?:\[([^\]]*)\]|\(([^)]*(?:\([^)]*\)[^)]*)?)\))\s*$/s.exec(text.trim());
  if (!match) return { text, name: text.trim(), unit: null };
  return { text, name: match[1] ?? '', unit: (match[2] ?? match[3] ?? '').trim() };
}

/** What a heading means on its sheet. */
export type HeadingMeaning =
  | { readonly kind: 'column'; readonly known: string }
  /** Axis letters of the other system: "say major or minor". */
  | { readonly kind: 'axis' }
  /** A radius of gyration (`iy`, `iz`): not needed. */
  | { readonly kind: 'radius' }
  | { readonly kind: 'unknown'; readonly near: string | null };

const keys = new WeakMap<SheetDefinition, ReadonlyMap<string, string>>();

function keysOf(definition: SheetDefinition): ReadonlyMap<string, string> {
  let known = keys.get(definition);
  if (!known) {
    known = new Map([...definition.columns.keys()].map((name) => [wordKey(name), name]));
    keys.set(definition, known);
  }
  return known;
}

/** Axis letters: metric files follow EN 1993 (y major, z minor), US files AISC (x major, y minor). */
const sectionLetters: Readonly<Record<System, Readonly<Record<string, string>>>> = {
  metric: { iy: 'I', iz: 'I minor', wy: 'W', wz: 'W minor', wply: 'Wpl', wplz: 'Wpl minor', j: 'It', cw: 'Iw' },
  us: { ix: 'I', iy: 'I minor', sx: 'W', sy: 'W minor', zx: 'Wpl', zy: 'Wpl minor', j: 'It', cw: 'Iw' },
};
const anyLetters = /^(i[xyz]|w[xyz]|wpl[xyz]|[sz][xy])$/;

/** Reads a heading's name by its sheet's columns. */
export function meaningOf(definition: SheetDefinition, name: string, system: System): HeadingMeaning {
  const key = wordKey(name);
  if (definition.name === 'Sections') {
    if (/^i([xyztw]|_?[xyz])?$/.test(name.trim())) return { kind: 'radius' };
    const known = sectionLetters[system][key];
    if (known) return { kind: 'column', known };
    if (anyLetters.test(key)) return { kind: 'axis' };
  }
  if (definition.name === 'Members' && /^length[xyz]$/.test(key)) {
    if (system === 'metric' && key !== 'lengthx')
      return { kind: 'column', known: key === 'lengthy' ? 'length major' : 'length minor' };
    return { kind: 'axis' };
  }
  const known = keysOf(definition).get(key);
  if (known !== undefined) return { kind: 'column', known };
  const letters: (readonly [string, string])[] =
    definition.name === 'Members' && system === 'metric'
      ? [
          ['lengthy', 'length y'],
          ['lengthz', 'length z'],
        ]
      : [];
  return { kind: 'unknown', near: nearest(key, [...keysOf(definition), ...letters]) };
}
