/**
 * Damerau–Levenshtein distance (optimal string alignment): letters added, left out, changed, or two neighbours
 * swapped. Gives up above `most` and returns most + 1.
 */
export function distance(a: string, b: string, most: number): number {
  if (Math.abs(a.length - b.length) > most) return most + 1;
  let before: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i += 1) {
    const row = [i];
    let least = i;
    for (let j = 1; j <= b.length; j += 1) {
      const same = a[i - 1] === b[j - 1];
      let d = Math.min((last[j] ?? 0) + 1, (row[j - 1] ?? 0) + 1, (last[j - 1] ?? 0) + (same ? 0 : 1));
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) d = Math.min(d, (before[j - 2] ?? 0) + 1);
      row.push(d);
      least = Math.min(least, d);
    }
    if (least > most) return most + 1;
    before = last;
    last = row;
  }
  return last[b.length] ?? most + 1;
}

/** The nearest of `known` (each with its comparison key) within two letters of `key`; names under four letters are left alone. */
export function nearest(key: string, known: Iterable<readonly [key: string, name: string]>): string | null {
  let best: string | null = null;
  let least = 3;
  for (const [other, name] of known) {
    if (other.length < 4 || other === key) continue;
    const d = distance(key, other, 2);
    if (d < least) {
      least = d;
      best = name;
    }
  }
  return best;
}

/** The nearest of `names` for a hint, whatever its distance up to half its length. */
export function nearestAny(key: string, known: Iterable<readonly [key: string, name: string]>): string | null {
  let best: string | null = null;
  let least = Infinity;
  for (const [other, name] of known) {
    const d = distance(key, other, Math.ceil(other.length / 2));
    if (d < least && d <= Math.ceil(other.length / 2)) {
      least = d;
      best = name;
    }
  }
  return best;
}
