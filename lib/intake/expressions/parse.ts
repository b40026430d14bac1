import { ExpressionFault, type Token, tokens } from '@/lib/intake/expressions/tokens';

export type Operator = '+' | '-' | '*' | '/' | '^' | '=' | '!=' | '<' | '<=' | '>' | '>=' | 'and' | 'or';

/** What an expression is made of. */
export type Node =
  | { readonly kind: 'value'; readonly value: number | string }
  | { readonly kind: 'name'; readonly name: string }
  | { readonly kind: 'minus' | 'not'; readonly of: Node }
  | { readonly kind: 'two'; readonly operator: Operator; readonly left: Node; readonly right: Node }
  | { readonly kind: 'choice'; readonly test: Node; readonly yes: Node; readonly no: Node }
  | { readonly kind: 'call'; readonly function: string; readonly values: readonly Node[] };

/** The functions there are, with the fewest and the most values each takes. */
const functions: Readonly<Record<string, readonly [fewest: number, most: number]>> = {
  sin: [1, 1],
  cos: [1, 1],
  tan: [1, 1],
  atan2: [2, 2],
  sqrt: [1, 1],
  abs: [1, 1],
  min: [1, 20],
  max: [1, 20],
};

const deepest = 60;

/**
 * Reads an expression (sheets §3, Families). From loosest to tightest: `? :` · or · and · not · one comparison ·
 * + − · * / · unary − · ^ (right-associative).
 * @throws {ExpressionFault} saying what was expected
 */
export function parse(text: string): Node {
  const list = tokens(text);
  let at = 0;
  let depth = 0;

  const sign = (...signs: string[]): string | null => {
    const token = list[at];
    if (token?.kind !== 'sign' || !signs.includes(token.value)) return null;
    at += 1;
    return token.value;
  };
  const word = (value: string): boolean => {
    const token = list[at];
    if (token?.kind !== 'name' || token.value.toLowerCase() !== value) return false;
    at += 1;
    return true;
  };
  const expect = (value: string): void => {
    if (!sign(value)) throw new ExpressionFault(`expected “${value}” ${before(list[at])}`);
  };
  const deeper = <T>(read: () => T): T => {
    depth += 1;
    if (depth > deepest) throw new ExpressionFault('it is nested too deeply');
    const result = read();
    depth -= 1;
    return result;
  };

  const choice = (): Node =>
    deeper(() => {
      const test = or();
      if (!sign('?')) return test;
      const yes = choice();
      expect(':');
      return { kind: 'choice', test, yes, no: choice() };
    });
  const or = (): Node => {
    let left = and();
    while (word('or')) left = { kind: 'two', operator: 'or', left, right: and() };
    return left;
  };
  const and = (): Node => {
    let left = not();
    while (word('and')) left = { kind: 'two', operator: 'and', left, right: not() };
    return left;
  };
  const not = (): Node => (word('not') ? deeper(() => ({ kind: 'not', of: not() })) : comparison());
  const comparisons = ['=', '!=', '<', '<=', '>', '>='];
  const comparison = (): Node => {
    const left = sum();
    const operator = sign(...comparisons);
    if (!operator) return left;
    const right = sum();
    if (sign(...comparisons)) throw new ExpressionFault('it compares three things at once: join two comparisons with “and”');
    return { kind: 'two', operator: operator as Operator, left, right };
  };
  const sum = (): Node => {
    let left = product();
    for (let s = sign('+', '-'); s; s = sign('+', '-')) left = { kind: 'two', operator: s as Operator, left, right: product() };
    return left;
  };
  const product = (): Node => {
    let left = unary();
    for (let s = sign('*', '/'); s; s = sign('*', '/')) left = { kind: 'two', operator: s as Operator, left, right: unary() };
    return left;
  };
  const unary = (): Node => {
    if (sign('-')) return deeper(() => ({ kind: 'minus', of: unary() }));
    if (sign('+')) return deeper(unary);
    const base = primary();
    return sign('^') ? deeper(() => ({ kind: 'two', operator: '^', left: base, right: unary() })) : base;
  };
  const primary = (): Node => {
    const token = list[at];
    at += 1;
    if (token?.kind === 'number' || token?.kind === 'text') return { kind: 'value', value: token.value };
    if (token?.kind === 'name' && !['and', 'or', 'not'].includes(token.value.toLowerCase())) {
      return sign('(') ? call(token.value) : { kind: 'name', name: token.value };
    }
    if (token?.kind === 'sign' && token.value === '(') {
      const inner = choice();
      expect(')');
      return inner;
    }
    throw new ExpressionFault(`expected a number, a parameter or “(” ${before(token)}`);
  };
  const call = (name: string): Node => {
    const key = name.toLowerCase();
    const count = Object.hasOwn(functions, key) ? functions[key] : undefined;
    if (!count) throw new ExpressionFault(`there is no function “${name}”; there are ${Object.keys(functions).join(', ')}`);
    const values: Node[] = [choice()];
    while (sign(',')) values.push(choice());
    expect(')');
    if (values.length < count[0] || values.length > count[1]) {
      throw new ExpressionFault(`${key} takes ${count[0]}${count[1] > count[0] ? ' or more' : ''} values, not ${values.length}`);
    }
    return { kind: 'call', function: key, values };
  };

  if (list.length === 0) throw new ExpressionFault('nothing stands between the braces');
  const whole = choice();
  if (at < list.length) throw new ExpressionFault(`“${shown(list[at])}” does not belong after what stands before it`);
  return whole;
}

const shown = (token: Token | undefined): string => (token ? String(token.value) : 'the end');
const before = (token: Token | undefined): string => (token ? `before “${shown(token)}”` : 'at the end');
