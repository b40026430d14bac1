/** A letter is tried so often, over some 12 hours; then it counts as failed until someone tries again. */
export const mostAttempts = 12;

const first_ms = 30_000;
const longest_ms = 4 * 3_600_000;

/**
 * How long to wait after the nth attempt failed: 30 s, twice as long each time, four hours at most.
 *
 * The whole stays under the 24 hours for which the service remembers a key, so that no letter is delivered twice.
 *
 * @param attempts made so far, from 1
 * @returns milliseconds; null where there were enough
 */
export function waitAfter(attempts: number): number | null {
  return attempts >= mostAttempts ? null : Math.min(first_ms * 2 ** (attempts - 1), longest_ms);
}
