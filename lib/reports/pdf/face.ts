/** One cut of type in a document: how wide words are, and the codes that draw them. */

/** What of the PDF library's embedded font is used. */
export interface EmbeddedFont {
  readonly id: string;
  readonly font: { hasGlyphForCodePoint(code: number): boolean };
  /** Codes in hex, and the advances of the glyphs in thousandths. */
  encode(text: string, features: readonly string[]): [string[], { xAdvance: number; advanceWidth: number }[]];
  ref(): object;
}

interface Word {
  /** In thousandths of the size. */
  readonly width: number;
  /** Inside of a TJ array. */
  readonly codes: string;
}

/** Words kept at hand; beyond it the oldest are forgotten: ids and figures of a thousand frames seldom come again. */
const mostWords = 20_000;
/** Figures of equal width, so that columns stand. */
const features = ['tnum', 'kern'] as const;
/** Stands for a letter that the fonts don't have: they draw a box. */
const unknown = '\uFFFD';

export class Face {
  private readonly words = new Map<string, Word>();
  private readonly known = new Map<string, boolean>();

  constructor(readonly font: EmbeddedFont) {}

  /** Width of a line of text. */
  width(text: string, size: number): number {
    let width = 0;
    for (const word of pieces(text)) width += this.word(word).width;
    return (width * size) / 1000;
  }

  /** What shows a line of text between BT and ET. */
  show(text: string): string {
    let codes = '';
    for (const word of pieces(text)) codes += this.word(word).codes;
    return `[${codes}] TJ`;
  }

  private word(text: string): Word {
    const kept = this.words.get(text);
    if (kept) return kept;
    const [glyphs, positions] = this.font.encode(this.drawable(text), features);
    let width = 0;
    let codes = '<';
    glyphs.forEach((glyph, i) => {
      const { xAdvance, advanceWidth } = positions[i]!;
      const kern = Math.round(advanceWidth - xAdvance);
      width += advanceWidth - kern;
      codes += kern === 0 ? glyph : `${glyph}> ${kern} <`;
    });
    const made = { width, codes: `${codes}>` };
    if (this.words.size >= mostWords) this.words.delete(this.words.keys().next().value!);
    this.words.set(text, made);
    return made;
  }

  /** Letter by letter what the font has, a box for the rest: no hostile text reaches its tables of scripts. */
  private drawable(text: string): string {
    let out = '';
    for (const letter of text) {
      let has = this.known.get(letter);
      if (has === undefined) {
        has = this.font.font.hasGlyphForCodePoint(letter.codePointAt(0)!);
        if (this.known.size < mostWords) this.known.set(letter, has);
      }
      out += has ? letter : (instead[letter] ?? unknown);
    }
    return out;
  }
}

/** Signs that the fonts lack and words that say the same. */
const instead: Readonly<Record<string, string>> = {
  '\t': ' ',
  '\n': ' ',
  '\r': '',
  '∓': '±',
  '\u0304': '',
  '‑': '-',
  '\u200B': '',
  '\u00AD': '',
};

/** Words with the space after each. */
const pieces = (text: string): readonly string[] => text.match(/[^ ]* |[^ ]+$/g) ?? [];
