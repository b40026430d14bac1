/** Passes looked back on. */
const depth = 4;

/** What the last passes have answered, for one row of n numbers. */
export interface Passes {
  readonly n: number;
  /** Number of differences kept, the newest first by `newest`. */
  count: number;
  newest: number;
  /** Answer and step (answer less guess) of the pass before; differences from pass to pass, n each. */
  readonly answer: Float64Array;
  readonly step: Float64Array;
  readonly answers: readonly Float64Array[];
  readonly steps: readonly Float64Array[];
  started: boolean;
}

export function emptyPasses(n: number): Passes {
  const rows = (): Float64Array[] => Array.from({ length: depth }, () => new Float64Array(n));
  return {
    n, count: 0, newest: 0, answer: new Float64Array(n), step: new Float64Array(n), answers: rows(), steps: rows(),
    started: false,
  }; // prettier-ignore
}

export function forget(passes: Passes): void {
  passes.count = 0;
  passes.started = false;
}

const G = new Float64Array(depth * depth);
const b = new Float64Array(depth);

/**
 * Next guess of x = g(x) from this guess and its answer, by what the last passes did (Anderson 1965): the combination of the
 * last steps that leaves least of the newest one. Overwrites `x`; the first time it is the answer itself.
 *
 * @returns whether it differs from the answer
 */
export function nextGuess(x: Float64Array, answer: Float64Array, passes: Passes): boolean {
  const { n, answers, steps } = passes;
  if (passes.started) {
    const at = (passes.newest = (passes.newest + 1) % depth);
    if (passes.count < depth) passes.count++;
    const [da, ds] = [answers[at]!, steps[at]!];
    for (let i = 0; i < n; i++) {
      da[i] = answer[i]! - passes.answer[i]!;
      ds[i] = answer[i]! - x[i]! - passes.step[i]!;
    }
  }
  passes.started = true;
  for (let i = 0; i < n; i++) {
    passes.answer[i] = answer[i]!;
    passes.step[i] = answer[i]! - x[i]!;
    x[i] = answer[i]!;
  }
  const used = combination(passes);
  for (let j = 0; j < used; j++) {
    const da = answers[(passes.newest - j + depth) % depth]!;
    for (let i = 0; i < n; i++) x[i] = x[i]! - b[j]! * da[i]!;
  }
  return used > 0;
}

/** Least squares of the newest step by the last differences into `b`, newest first; older ones that add nothing are left out. */
function combination({ n, count, newest, step, steps }: Passes): number {
  let used = 0;
  for (; used < count; used++) {
    const row = steps[(newest - used + depth) % depth]!;
    // a row of the Cholesky factor of their products
    for (let j = 0; j <= used; j++) {
      const other = steps[(newest - j + depth) % depth]!;
      let sum = 0;
      for (let i = 0; i < n; i++) sum += row[i]! * other[i]!;
      const whole = sum;
      for (let k = 0; k < j; k++) sum -= G[used * depth + k]! * G[j * depth + k]!;
      if (j < used) G[used * depth + j] = sum / G[j * depth + j]!;
      else G[used * depth + j] = sum > 1e-10 * whole ? Math.sqrt(sum) : 0;
    }
    if (!(G[used * depth + used]! > 0)) break;
    let sum = 0;
    for (let i = 0; i < n; i++) sum += row[i]! * step[i]!;
    for (let k = 0; k < used; k++) sum -= G[used * depth + k]! * b[k]!;
    b[used] = sum / G[used * depth + used]!;
  }
  for (let j = used - 1; j >= 0; j--) {
    for (let k = j + 1; k < used; k++) b[j] = b[j]! - G[k * depth + j]! * b[k]!;
    b[j] = b[j]! / G[j * depth + j]!;
  }
  return used;
}
