import { type Atom, atoms } from '@/lib/units/unit-atoms';
import { type Dimension, dimensionOf, quantities, type Quantity, sameDimension } from '@/lib/units/quantity';

export interface UnitReading {
  readonly dimension: Dimension;
  /** SI = number × factor (temperature: differences, so no zero point). */
  readonly factor: number;
}

/** A unit as somebody typed it. Only `lb` and `k` have two readings (force or mass; kip or kelvin). */
export interface Unit {
  /** As typed, trimmed. */
  readonly text: string;
  /** As printed: `kN·m`, `cm⁴`. */
  readonly symbol: string;
  readonly readings: readonly UnitReading[];
  /** Every quantity it can stand for; [] = a sound unit of no quantity in the sheets. */
  readonly quantities: readonly Quantity[];
  /** Its unit of force in N and of length in m, null where it names none: what a member load's *value* takes from its heading. */
  readonly force_N: number | null;
  readonly length_m: number | null;
  /** True for an area load's unit (kN/m², psf): it makes distributed rows area loads. */
  readonly perArea: boolean;
}

interface Term {
  readonly atoms: readonly Atom[];
  readonly power: number;
}

const superscripts: Readonly<Record<string, string>> = {
  '⁰': '0', '¹': '1', '²': '2', '³': '3', '⁴': '4', '⁵': '5', '⁶': '6', '⁷': '7', '⁸': '8', '⁹': '9', '⁻': '-', '⁺': '',
}; // prettier-ignore

/** Brings the ways people type one unit to one spelling: `^` powers, `*` products, `/` quotients, lower case, no blanks. */
function normalise(text: string): string {
  return text
    .normalize('NFC')
    .toLowerCase()
    .replace(/[⁻⁺]?[⁰¹²³⁴⁵⁶⁷⁸⁹]+/g, (run) => '^' + [...run].map((c) => superscripts[c] ?? c).join(''))
    .replace(/µ|μ/g, 'u')
    .replace(/[−–—‐‑]/g, '-')
    .replace(/º|˚/g, '°')
    .replace(/\*\*/g, '^')
    .replace(/(degrees?|deg\.?|°)\s*([cf])(?![a-z])/g, '°$2')
    .replace(/\bper\b/g, '/')
    .replace(/[\s\u00a0\u2009\u202f]+/g, ' ')
    .replace(/ ?([/*·⋅∙•×^()]) ?/g, '$1')
    .replace(/[·⋅∙•×]/g, '*')
    .replace(/\.(?=$|[\s^*/)-])/g, '') // "in."
    .replace(/^\//, '1/')
    .trim();
}

/**
 * Reads a unit: products by `·` `.` `*` `-` or a blank, quotients by `/` (everything after the last one divides:
 * `kN·m/rad`), powers by `^2`, `²`, `2`, `^-1`, powers of ten in front (`10^6mm4`). Case is ignored.
 * @returns null where a word in it is not a unit: the caller's `unknown-unit`. Of the wrong kind: ask `factorFor`.
 */
export function parseUnit(text: string): Unit | null {
  const typed = text.trim();
  if (/^[-–—−]$|^1$/.test(typed)) return plainUnit(typed);
  const source = normalise(typed).replace(/^[*x](?=10\^)/, '');
  if (source === '' || source.length > 60) return null;
  const terms: Term[] = [];
  let scale = 1;
  let sign = 1;
  let at = 0;
  let open = 0;
  while (at < source.length) {
    const rest = source.slice(at);
    const ten = /^(?:10\^\(?(-?\d{1,2})\)?|1e(-?\d{1,2})|(10{0,6}))(?![\d.])/.exec(rest);
    if (ten) {
      const power = ten[1] ?? ten[2] ?? String((ten[3] ?? '1').length - 1);
      scale *= 10 ** (Number(power) * sign);
      at += ten[0].length;
    } else {
      const word = /^([a-z]+|°[cf]?|%|["″'′])(?:\^\((-?\d)\)|\^?(-?\d)(?!\d))?/.exec(rest);
      if (!word) return null;
      const words = wordsOf(word[1] ?? '');
      if (!words) return null;
      words.forEach((meanings, i) => {
        const last = i === words.length - 1;
        terms.push({ atoms: meanings, power: sign * (last ? Number(word[2] ?? word[3] ?? 1) : 1) });
      });
      at += word[0].length;
    }
    while (source[at] === ')') {
      if (--open < 0) return null;
      at += 1;
    }
    if (at === source.length) break;
    const joint = /^[*./ -]/.exec(source.slice(at))?.[0];
    if (joint === '/') sign = -1;
    else if (!joint && !ten) return null;
    at += joint ? 1 : 0;
    if (source[at] === '(') {
      open += 1;
      at += 1;
    }
    if (at === source.length) return null;
  }
  return open === 0 ? assemble(typed, terms, scale) : null;
}

/** The factor to SI if the unit can stand for this quantity, null if it is of another kind. */
export function factorFor(unit: Unit, quantity: Quantity): number | null {
  return unit.readings.find((reading) => sameDimension(reading.dimension, dimensionOf[quantity]))?.factor ?? null;
}

/** The meanings of a word, or of the two that people run together in a moment: `kNm`, `Nmm`, `kipft`. */
function wordsOf(word: string): readonly (readonly Atom[])[] | null {
  const whole = atoms.get(word);
  if (whole) return [whole];
  const [, force, length] = /^(n|dan|kn|mn|kips?|k|lbf?|kgf|tf)(mm|cm|m|in|ft)$/.exec(word) ?? [];
  const both = [atoms.get(force ?? ''), atoms.get(length ?? '')].filter((a) => a !== undefined);
  return both.length === 2 ? both : null;
}

function plainUnit(text: string): Unit {
  const dimension = dimensionOf.number;
  return {
    text,
    symbol: '',
    readings: [{ dimension, factor: 1 }],
    quantities: ['number'],
    force_N: null,
    length_m: null,
    perArea: false,
  };
}

function assemble(text: string, terms: readonly Term[], scale: number): Unit | null {
  const ways = terms.reduce<readonly (readonly Atom[])[]>(
    (before, term) => before.flatMap((way) => term.atoms.map((atom) => [...way, atom])),
    [[]],
  );
  if (ways.length > 8) return null;
  const readings = ways.map((way) => readingOf(way, terms, scale));
  const fits = quantities.filter((q) => readings.some((r) => sameDimension(r.dimension, dimensionOf[q])));
  const forces = terms.flatMap((t) => t.atoms.slice(0, 1).map((a) => a.force)).filter((f) => f !== null);
  const lengths = terms.flatMap((t) => t.atoms.slice(0, 1).map((a) => a.length)).filter((l) => l !== null);
  return {
    text,
    symbol: symbolOf(terms, scale),
    readings,
    quantities: fits,
    force_N: forces.length === 1 ? (forces[0] ?? null) : null,
    length_m: lengths.length === 1 ? (lengths[0] ?? null) : null,
    perArea: fits.includes('areaLoad'),
  };
}

function readingOf(way: readonly Atom[], terms: readonly Term[], scale: number): UnitReading {
  const total = { force: 0, mass: 0, length: 0, temperature: 0, angle: 0 };
  // numerator and denominator apart, so that N/mm² is 1/0.001² once and not a chain of rounded reciprocals
  let above = scale >= 1 ? scale : 1;
  let below = scale >= 1 ? 1 : Math.round(1 / scale);
  way.forEach((atom, i) => {
    const power = terms[i]?.power ?? 1;
    for (const key of ['force', 'mass', 'length', 'temperature', 'angle'] as const) {
      total[key] += atom.dimension[key] * power;
    }
    const inverse = Math.round(1 / atom.factor);
    const exact = atom.factor < 1 && Math.abs(inverse * atom.factor - 1) < 1e-15 && /^10*$/.test(String(inverse));
    if (exact === power > 0) below *= (exact ? inverse : atom.factor) ** Math.abs(power);
    else above *= (exact ? inverse : atom.factor) ** Math.abs(power);
  });
  return { dimension: total, factor: above / below };
}

const raised = (power: number): string =>
  power === 1 ? '' : [...String(power)].map((c) => (c === '-' ? '⁻' : ('⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(c)] ?? c))).join('');

function symbolOf(terms: readonly Term[], scale: number): string {
  const print = (some: readonly Term[], sign: number): string =>
    some.map((t) => (t.atoms[0]?.symbol ?? '') + raised(sign * t.power)).join('·');
  const above = terms.filter((t) => t.power > 0);
  const below = terms.filter((t) => t.power < 0);
  const ten = scale === 1 ? '' : `10${raised(Math.round(Math.log10(scale)))} `;
  if (below.length === 0) return ten + print(above, 1);
  if (above.length === 0) return `${ten === '' ? '1' : ten.trim()}/${print(below, -1)}`;
  return `${ten}${print(above, 1)}/${below.length > 1 ? `(${print(below, -1)})` : print(below, -1)}`;
}
