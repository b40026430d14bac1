import type { Quantity } from '@/lib/units/quantity';

/** A piece of a line of calculation, for a page or a report to typeset. */
export type WorkingPart =
  | { readonly kind: 'text'; readonly text: string }
  | { readonly kind: 'symbol'; readonly symbol: string; readonly sub?: string; readonly sup?: string }
  | { readonly kind: 'number'; readonly text: string; readonly unit?: string }
  | { readonly kind: 'fraction'; readonly over: readonly WorkingPart[]; readonly under: readonly WorkingPart[] }
  | { readonly kind: 'root'; readonly of: readonly WorkingPart[] }
  | { readonly kind: 'result'; readonly text: string; readonly unit?: string };

/** A row: what it is, the line of calculation, and where a setting or a limit in it comes from. */
export interface WorkingLine {
  readonly what: string;
  readonly parts: readonly WorkingPart[];
  readonly source?: string | null;
}

/** How numbers are printed: an SI value as text with its unit ('' for a bare number), and a ratio that never crosses a boundary. */
export interface WorkingFormat {
  quantity(si: number, quantity: Quantity): { readonly text: string; readonly unit: string };
  ratio(ratio: number): string;
}

export const text = (words: string): WorkingPart => ({ kind: 'text', text: words });
export const symbol = (letter: string, sub?: string, sup?: string): WorkingPart => ({
  kind: 'symbol',
  symbol: letter,
  ...(sub ? { sub } : {}),
  ...(sup ? { sup } : {}),
});
export const fraction = (over: readonly WorkingPart[], under: readonly WorkingPart[]): WorkingPart => ({
  kind: 'fraction',
  over,
  under,
});
export const root = (...of: readonly WorkingPart[]): WorkingPart => ({ kind: 'root', of });

/** Parts that print numbers, in one format. */
export interface Printer {
  number(si: number, quantity: Quantity): WorkingPart;
  result(si: number, quantity: Quantity): WorkingPart;
  /** `A = 72.7 cm²`, the parts in order. */
  given(letter: WorkingPart, si: number | string | null | undefined, quantity: Quantity): readonly WorkingPart[];
  ratio(ratio: number): WorkingPart;
}

export function printer(format: WorkingFormat): Printer {
  const shown = (si: number, quantity: Quantity) => {
    const { text: figures, unit } = format.quantity(si, quantity);
    return unit ? { text: figures, unit } : { text: figures };
  };
  return {
    number: (si, quantity) => ({ kind: 'number', ...shown(si, quantity) }),
    result: (si, quantity) => ({ kind: 'result', ...shown(si, quantity) }),
    given: (letter, si, quantity) =>
      typeof si === 'number' ? [letter, text('='), { kind: 'number', ...shown(si, quantity) }] : [],
    ratio: (ratio) => ({ kind: 'result', text: format.ratio(ratio) }),
  };
}
