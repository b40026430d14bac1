/** How names and fixed words are matched: without regard to case, blanks, `_` and `-` (sheets §2). */

const gaps = /[\s\u00a0\u2007\u2009\u202f_\-‐‑–—]+/g;
const cache = new Map<string, string>();

/** The form in which headings, settings and fixed words are compared. */
export function wordKey(text: string): string {
  const known = cache.get(text);
  if (known !== undefined) return known;
  const key = text.normalize('NFC').toLowerCase().replace(gaps, '');
  if (cache.size > 5000) cache.clear();
  cache.set(text, key);
  return key;
}

/** A sheet's name: as a word, and without a plural s. */
export function sheetKey(text: string): string {
  const key = wordKey(text);
  if (key === 'families') return 'family';
  return key.length > 3 && key.endsWith('s') ? key.slice(0, -1) : key;
}

const yes = new Set(['yes', 'y', 'true', '1', 'x']);
const no = new Set(['no', 'n', 'false', '0', '']);

/** yes, no, or null where it is neither. */
export function readYesNo(text: string): boolean | null {
  const key = wordKey(text);
  if (yes.has(key)) return true;
  return no.has(key) ? false : null;
}

/** True for a word that asks for nothing: a setting or a reserved column may say so, and is never refused for it. */
export function meansOff(text: string): boolean {
  const key = wordKey(text);
  return no.has(key) || key === 'none' || key === 'off';
}

/** `L/250`, `h/150`, `1/300`, `250` as typed for the n of a ratio: the text of n. */
export function ratioText(text: string): string {
  return /^\s*[lh1]\s*\/\s*(\d+(?:[.,]\d+)?)\s*$/i.exec(text)?.[1] ?? text;
}

/** The one of `words` that the text means, or null. */
export function readWord<T extends string>(text: string, words: readonly T[]): T | null {
  const key = wordKey(text);
  return words.find((word) => wordKey(word) === key) ?? null;
}
