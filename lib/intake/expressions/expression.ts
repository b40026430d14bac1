import { namesIn } from '@/lib/intake/expressions/evaluate';
import { type Node, parse } from '@/lib/intake/expressions/parse';
import { ExpressionFault } from '@/lib/intake/expressions/tokens';

export interface Expression {
  readonly text: string;
  /** Null where it cannot be read: `fault` says why. */
  readonly node: Node | null;
  readonly fault: string | null;
  readonly names: readonly string[];
}

/** True where a cell's text is, or was to be, an expression in braces. */
export function isExpression(text: string): boolean {
  return text.charCodeAt(0) === 123 || text.trimStart().charCodeAt(0) === 123;
}

/** Reads expressions, each text once: a template of a family is read for every variant. */
export class Expressions {
  private readonly known = new Map<string, Expression>();

  read(text: string): Expression {
    const before = this.known.get(text);
    if (before) return before;
    const expression = compile(text);
    this.known.set(text, expression);
    return expression;
  }
}

function compile(text: string): Expression {
  const whole = text.trim();
  try {
    if (!whole.endsWith('}')) throw new ExpressionFault('its closing brace must end the cell');
    const node = parse(whole.slice(1, -1));
    return { text, node, fault: null, names: [...new Set(namesIn(node))] };
  } catch (fault) {
    if (!(fault instanceof ExpressionFault)) throw fault;
    return { text, node: null, fault: fault.message, names: [] };
  }
}
