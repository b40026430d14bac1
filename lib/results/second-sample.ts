/**
 * Which frames of a batch get the second, independent analysis: all up to 100, else 5 % and at least 100, chosen by
 * content address so that the same input always chooses the same frames.
 *
 * @param hashes content addresses of the frames that can run, in any order; equal ones count once
 */
export function secondSample(hashes: readonly string[]): ReadonlySet<string> {
  const different = [...new Set(hashes)];
  if (different.length <= 100) return new Set(different);
  const chosen = Math.max(100, Math.ceil(different.length * 0.05));
  return new Set(different.sort().slice(0, chosen));
}
