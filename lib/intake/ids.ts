/** Ids (frames, nodes, members, sections …) match without regard to case and outer blanks only (sheets §2). */

const plainNumber = /^[+-]?\d+(\.\d*)?(e[+-]?\d+)?$/i;

/** An id as it is shown: as typed, without outer blanks. */
export function idShown(text: string): string {
  return text.trim();
}

/** A number used as an id is its shortest decimal text. */
export function numberAsId(value: number): string {
  return String(Object.is(value, -0) ? 0 : value);
}

/**
 * An id as compared but for its case: outer blanks off, and text that reads as a number is that number (`1.0` is `1`) unless it
 * starts with a zero that the number would not have (`01` is another id).
 */
export function idText(text: string): string {
  const trimmed = text.trim();
  if (!plainNumber.test(trimmed) || /^[+-]?0\d/.test(trimmed) || trimmed.length > 15) return trimmed;
  const value = Number(trimmed);
  // 1e400 is more than a number holds, and stays what was typed
  return Number.isFinite(value) ? numberAsId(value) : trimmed;
}

const cache = new Map<string, string>();

/** The form in which ids are compared. */
export function idKey(id: string): string {
  const known = cache.get(id);
  if (known !== undefined) return known;
  const key = idText(id).normalize('NFC').toLowerCase();
  if (cache.size > 50_000) cache.clear();
  cache.set(id, key);
  return key;
}
