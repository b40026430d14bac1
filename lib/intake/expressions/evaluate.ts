import type { Node } from '@/lib/intake/expressions/parse';
import { ExpressionFault } from '@/lib/intake/expressions/tokens';
import { wordKey } from '@/lib/intake/words';

/** SI number, text (a section, a choice …), or yes/no of a comparison. */
export type Value = number | string | boolean;

/** Parameters by their name as a word (`wordKey`). */
export type Parameters = ReadonlyMap<string, number | string>;

/**
 * The value of an expression; only the chosen branch of `? :`, and of `and` and `or` only what decides, is evaluated.
 * @throws {ExpressionFault} division by zero, not a number, an unknown parameter, a text where a number is needed;
 *   `names` holds the parameters of the part that fails
 */
export function evaluate(node: Node, parameters: Parameters): Value {
  switch (node.kind) {
    case 'value':
      return node.value;
    case 'name': {
      const value = parameters.get(wordKey(node.name));
      if (value === undefined) throw new ExpressionFault(`there is no parameter “${node.name}”`);
      return value;
    }
    case 'minus':
      return -number(node.of, parameters);
    case 'not':
      return !truth(node.of, parameters);
    case 'choice':
      return evaluate(truth(node.test, parameters) ? node.yes : node.no, parameters);
    case 'call':
      return finite(
        apply(
          node.function,
          node.values.map((value) => number(value, parameters)),
        ),
        node,
        `${node.function}(…)`,
      );
    case 'two':
      return two(node, parameters);
  }
}

function two(node: Node & { kind: 'two' }, parameters: Parameters): Value {
  const { operator, left, right } = node;
  if (operator === 'and') return truth(left, parameters) && truth(right, parameters);
  if (operator === 'or') return truth(left, parameters) || truth(right, parameters);
  if (operator === '=' || operator === '!=') {
    const same = equal(evaluate(left, parameters), evaluate(right, parameters));
    return operator === '=' ? same : !same;
  }
  const a = number(left, parameters);
  const b = number(right, parameters);
  switch (operator) {
    case '+':
      return finite(a + b, node, 'the sum');
    case '-':
      return finite(a - b, node, 'the difference');
    case '*':
      return finite(a * b, node, 'the product');
    case '/':
      if (b === 0) throw new ExpressionFault('it divides by zero', namesIn(right));
      return finite(a / b, node, 'the quotient');
    case '^':
      return finite(a ** b, node, 'the power');
    case '<':
      return a < b;
    case '<=':
      return a <= b;
    case '>':
      return a > b;
    case '>=':
      return a >= b;
  }
}

/** Texts are compared as fixed words are; a number and a text are never equal. */
function equal(a: Value, b: Value): boolean {
  return typeof a === 'string' && typeof b === 'string' ? wordKey(a) === wordKey(b) : a === b;
}

function number(node: Node, parameters: Parameters): number {
  const value = evaluate(node, parameters);
  if (typeof value === 'number') return value;
  const what = typeof value === 'boolean' ? 'a comparison' : value === '' ? 'an empty text' : `“${value}”`;
  throw new ExpressionFault(`${what} stands where a number is needed`, namesIn(node));
}

function truth(node: Node, parameters: Parameters): boolean {
  const value = evaluate(node, parameters);
  if (typeof value === 'boolean') return value;
  throw new ExpressionFault('a comparison is needed here, like span > 20', namesIn(node));
}

function finite(value: number, node: Node, what: string): number {
  if (Number.isFinite(value)) return value;
  throw new ExpressionFault(`${what} is not a number`, namesIn(node));
}

function apply(name: string, values: readonly number[]): number {
  const [a = NaN, b = NaN] = values;
  switch (name) {
    case 'sin':
      return Math.sin(a);
    case 'cos':
      return Math.cos(a);
    case 'tan':
      return Math.tan(a);
    case 'atan2':
      return Math.atan2(a, b);
    case 'sqrt':
      return Math.sqrt(a);
    case 'abs':
      return Math.abs(a);
    case 'min':
      return Math.min(...values);
    case 'max':
      return Math.max(...values);
    default:
      throw new RangeError(`Expected a function of expressions, got ${name}`);
  }
}

/** Every parameter that an expression names, as typed, in order. */
export function namesIn(node: Node): string[] {
  switch (node.kind) {
    case 'value':
      return [];
    case 'name':
      return [node.name];
    case 'minus':
    case 'not':
      return namesIn(node.of);
    case 'two':
      return [...namesIn(node.left), ...namesIn(node.right)];
    case 'choice':
      return [...namesIn(node.test), ...namesIn(node.yes), ...namesIn(node.no)];
    case 'call':
      return node.values.flatMap(namesIn);
  }
}
