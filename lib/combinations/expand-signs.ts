/** One term of a listed combination; `signed` = written with ±. */
export interface ListedTerm {
  readonly factor: number;
  readonly signed: boolean;
}

export interface SignedVariant {
  /** `C1 (+)`, `C1 (+ −)`; the combination's own name where nothing is signed. */
  readonly name: string;
  /** By term. */
  readonly factors: readonly number[];
}

/** Most ± terms in one combination: 2⁸ = 256 results. */
export const mostSigned = 8;

/**
 * The combinations that one with ± factors stands for: all patterns of signs in the order of its terms, plus first.
 * @throws {RangeError} for more than `mostSigned` signed terms
 */
export function expandSigns(name: string, terms: readonly ListedTerm[]): SignedVariant[] {
  const signed = terms.flatMap((term, i) => (term.signed ? [i] : []));
  if (signed.length > mostSigned) throw new RangeError(`Expected up to ${mostSigned} signed terms, got ${signed.length}`);
  if (signed.length === 0) return [{ name, factors: terms.map((term) => term.factor) }];
  return Array.from({ length: 2 ** signed.length }, (_, pattern) => {
    const minus = signed.map((_, k) => (pattern & (1 << (signed.length - 1 - k))) !== 0);
    const factors = terms.map((term, i) => {
      const k = signed.indexOf(i);
      return k >= 0 && minus[k] ? -term.factor : term.factor;
    });
    return { name: `${name} (${minus.map((m) => (m ? '−' : '+')).join(' ')})`, factors };
  });
}

/** A factor as typed: `±1.5`, `+/-1.5`, `+-1.5`; null where no ± stands in front. */
export function splitSign(text: string): string | null {
  return /^\s*(?:±|\+\s*\/\s*[-−–]|\+[-−–])\s*(\S.*)$/s.exec(text)?.[1] ?? null;
}

/** A combination's name with its signs as they are written: `C1 (+-)` on a keyboard is `C1 (+ −)`. */
export function signedName(name: string): string {
  return name.replace(/\s*\(([-+−–\s]+)\)$/, (_, signs: string) => {
    const each = [...signs.replace(/\s/g, '')].map((sign) => (sign === '+' ? '+' : '−'));
    return ` (${each.join(' ')})`;
  });
}
