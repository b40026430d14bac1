import type { StateMethod } from '@/lib/results/result';

/** Before the lists: shear, imperfection, load scale, iterations, change, and the lengths of the three lists. */
const heads = 8;
/** Stands for the length of a list that is not there. */
const absent = -1;
const directions = { right: 1, left: -1 } as const;

/** What sets a state apart from plain first order as one list of numbers: notional forces, stiffness factors and slack members last. */
export function packMethod(method: StateMethod): Float64Array {
  const { notional, stiffness, slack } = method;
  const [a, b] = [notional?.length ?? 0, stiffness?.length ?? 0];
  const numbers = new Float64Array(heads + a + b + slack.length);
  numbers[0] = method.shearDeformation ? 1 : 0;
  numbers[1] = method.imperfection === null ? 0 : directions[method.imperfection];
  numbers[2] = method.loadScale;
  numbers[3] = method.iterations;
  numbers[4] = method.change;
  numbers[5] = notional?.length ?? absent;
  numbers[6] = stiffness?.length ?? absent;
  numbers[7] = slack.length;
  if (notional) numbers.set(notional, heads);
  if (stiffness) numbers.set(stiffness, heads + a);
  numbers.set(slack, heads + a + b);
  return numbers;
}

/** @throws {RangeError} where the numbers are not what packMethod writes */
export function unpackMethod(numbers: Float64Array): StateMethod {
  const [shear, lean, loadScale, iterations, change, a, b, slack] = numbers as unknown as readonly (number | undefined)[];
  const lengths = [a, b, slack].map((length) => Math.max(0, length ?? NaN));
  if (!(heads + lengths.reduce((sum, length) => sum + length, 0) === numbers.length))
    throw new RangeError(`Expected a whole method of a state, got ${numbers.length} numbers`);
  let at = heads;
  const [notional, stiffness, last] = lengths.map((length) => numbers.subarray(at, (at += length)));
  return {
    shearDeformation: shear === 1,
    imperfection: lean === directions.right ? 'right' : lean === directions.left ? 'left' : null,
    notional: a === absent ? null : notional!,
    loadScale: loadScale!,
    stiffness: b === absent ? null : stiffness!,
    slack: [...last!],
    iterations: iterations!,
    change: change!,
  };
}
