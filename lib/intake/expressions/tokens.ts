/** A fault in an expression, told to whoever typed it. */
export class ExpressionFault extends Error {
  /** Names of parameters that the faulty part uses. */
  readonly names: readonly string[];
  constructor(message: string, names: readonly string[] = []) {
    super(message);
    this.names = names;
  }
}

export type Token =
  | { readonly kind: 'number'; readonly value: number }
  | { readonly kind: 'text'; readonly value: string }
  | { readonly kind: 'name'; readonly value: string }
  | { readonly kind: 'sign'; readonly value: string };

const longest = 2000;
const pattern =
  /\s*(?:((?:\d+(?:\.\d*)?|\.\d+)(?:e[+-]?\d+)?)(?![\p{L}_\d.])|(["“”])([^"“”]*)["“”]|([\p{L}][\p{L}\d_]*)|(!=|<=|>=|[-+*/^=<>?:(),−≤≥≠·×]))/giuy;
const sameSign: Readonly<Record<string, string>> = { '−': '-', '≤': '<=', '≥': '>=', '≠': '!=', '·': '*', '×': '*' };

/** Splits what stands between the braces. @throws {ExpressionFault} */
export function tokens(text: string): Token[] {
  if (text.length > longest) throw new ExpressionFault(`it is longer than ${longest} characters`);
  const found: Token[] = [];
  pattern.lastIndex = 0;
  while (pattern.lastIndex < text.length) {
    const at = pattern.lastIndex;
    if (text.slice(at).trim() === '') break;
    const match = pattern.exec(text);
    if (!match) throw new ExpressionFault(`“${text.slice(at).trim().slice(0, 12)}” is nothing that an expression knows`);
    const [, number, quote, quoted, name, sign] = match;
    if (number !== undefined) found.push({ kind: 'number', value: Number(number) });
    else if (quote !== undefined) found.push({ kind: 'text', value: quoted ?? '' });
    else if (name !== undefined) found.push({ kind: 'name', value: name });
    else if (sign !== undefined) found.push({ kind: 'sign', value: sameSign[sign] ?? sign });
  }
  return found;
}
