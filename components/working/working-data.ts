/**
 * A piece of a line of calculation. Text stands upright, a symbol in italics with its subscript, a fraction as a
 * column with a rule, a result in bold.
 */
export type WorkingPart =
  | { readonly kind: 'text'; readonly text: string }
  | { readonly kind: 'symbol'; readonly symbol: string; readonly sub?: string; readonly sup?: string }
  | { readonly kind: 'number'; readonly text: string; readonly unit?: string }
  | { readonly kind: 'fraction'; readonly over: readonly WorkingPart[]; readonly under: readonly WorkingPart[] }
  | { readonly kind: 'root'; readonly of: readonly WorkingPart[] }
  | { readonly kind: 'result'; readonly text: string; readonly unit?: string };

/** A row: what (left), and the line of calculation (right); `source` closes the line ("Setup B6"). */
export interface WorkingLine {
  readonly what: string;
  readonly parts: readonly WorkingPart[];
  readonly source?: string | null;
}
