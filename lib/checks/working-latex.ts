import type { WorkingPart } from './working-parts';

/** A line of calculation as LaTeX, for KaTeX: symbols in italics, subscripts and units upright, words as they stand. */
export function latexOf(parts: readonly WorkingPart[]): string {
  let line = '';
  for (let i = 0; i < parts.length; i++) {
    const part = parts[i]!;
    const closing = part.kind === 'text' && part.text.endsWith('^(') ? closes(parts, i + 1) : -1;
    let next = one(part);
    if (part.kind === 'text' && closing > 0) {
      // "0.658^(" … ")": what stands between is the exponent
      const rest = (parts[closing] as { readonly text: string }).text.slice(1);
      next = `${words(part.text.slice(0, -2))}^{${latexOf(parts.slice(i + 1, closing))}} ${words(rest)}`.trimEnd();
    }
    line += line === '' ? next : `${gap(parts[i - 1]!, part, parts[i + 1])}${next}`;
    if (closing > 0) i = closing;
  }
  return line;
}

/** Place of the text part that closes a bracket opened before `from`; −1 where none does. */
function closes(parts: readonly WorkingPart[], from: number): number {
  return parts.findIndex((part, i) => i >= from && part.kind === 'text' && part.text.startsWith(')'));
}

/** "N = 4 kN  M = 5 kN·m": a figure and the next given stand apart; a figure behind a letter stands a little off it. */
function gap(before: WorkingPart, part: WorkingPart, after: WorkingPart | undefined): string {
  const figure = before.kind === 'number' || before.kind === 'result';
  const given = part.kind === 'symbol' && after?.kind === 'text' && after.text.startsWith('=');
  if (figure && given) return ' \\quad ';
  return before.kind === 'symbol' && part.kind === 'number' ? ' \\, ' : ' ';
}

function one(part: WorkingPart): string {
  switch (part.kind) {
    case 'text':
      // a blank between two givens
      return part.text !== '' && part.text.trim() === '' ? '\\quad' : words(part.text);
    case 'symbol':
      return `${letter(part.symbol)}${part.sub ? `_{${upright(part.sub)}}` : ''}${part.sup ? `^{${upright(part.sup)}}` : ''}`;
    case 'number':
      return figure(part.text, part.unit);
    case 'result':
      return figure(part.text, part.unit, true);
    case 'fraction':
      return `\\dfrac{${latexOf(part.over)}}{${latexOf(part.under)}}`;
    case 'root':
      return `\\sqrt{${latexOf(part.of)}}`;
  }
}

const macron = '\u0304';

/** "λ̄" is a letter with a bar; a name of several letters is set as one. */
function letter(symbol: string): string {
  if (symbol.includes(macron)) {
    const [bare = '', ...rest] = symbol.split(macron);
    return `${[...bare].slice(0, -1).map(escaped).join('')}\\bar{${escaped([...bare].at(-1) ?? '')}}${escaped(rest.join(''))}`;
  }
  return [...symbol].length === 1 || !/^[A-Za-z]+$/.test(symbol) ? escaped(symbol) : `\\mathit{${symbol}}`;
}

/** Latin upright, Greek as it is: there is no upright small Greek to set. */
function upright(name: string): string {
  return name
    .split(/(\p{Script=Greek}\u0304?)/u)
    .map((part, i) => (i % 2 === 1 ? letter(part) : part === '' ? '' : `\\mathrm{${spaced(part)}}`))
    .join('');
}

const figure = (text: string, unit: string | undefined, bold = false): string => {
  const digits = number(text);
  return `${bold ? `\\mathbf{${digits}}` : digits}${unit ? `\\,${unitOf(unit)}` : ''}`;
};

/** A comma or a blank within a figure takes no room of its own; a dash is a minus. */
const number = (text: string): string =>
  /^[−\-+]?[\d\s\u00a0\u202f.,]+$/u.test(text)
    ? `{${text
        .replace(/−/g, '-')
        .replace(/,/g, '{,}')
        .replace(/[\s\u00a0\u202f]+/g, '\\,')}}`
    : `\\text{${escaped(text)}}`;

const powers: Readonly<Record<string, string>> = { '²': '^{2}', '³': '^{3}', '⁴': '^{4}', '⁶': '^{6}', '·': '{\\cdot}', '°': '^{\\circ}', '%': '\\%' }; // prettier-ignore

/** "kN·m", "cm⁴", "N/mm²". */
const unitOf = (unit: string): string =>
  unit
    .split(/([²³⁴⁶·°%/])/)
    .map((part, i) => (i % 2 === 1 ? (powers[part] ?? part) : part === '' ? '' : `\\mathrm{${spaced(part)}}`))
    .join('');

const signs: Readonly<Record<string, string>> = { '·': '\\cdot', '×': '\\times', '−': '-', '≤': '\\le', '≥': '\\ge', '±': '\\pm', '→': '\\rightarrow', '∞': '\\infty' }; // prettier-ignore

/** Signs of a formula are set as mathematics, words as words; "N_cr" within words has its subscript. */
function words(text: string): string {
  return text
    .split(/([=+\-<>()[\]/,;|²³⁴⁶]|[·×−≤≥±→∞])/u)
    .map((part, i) => {
      if (i % 2 === 1) return signs[part] ?? powers[part] ?? part;
      if (part.trim() === '') return '';
      const trimmed = part.trim();
      if (/^[\d.]+$/.test(trimmed)) return trimmed;
      const subscripts = trimmed.split(/(?<=\p{L})_(\p{L}[\p{L}\d]*)/u);
      return subscripts.map((piece, k) => (k % 2 === 1 ? `_{${upright(piece)}}` : piece === '' ? '' : plain(piece))).join('');
    })
    .filter((part) => part !== '')
    .join(' ');
}

/** A lone Greek letter is mathematics; words keep their blanks. */
const plain = (piece: string): string =>
  /^\p{Script=Greek}\u0304?$/u.test(piece) ? letter(piece) : `\\text{${escaped(` ${piece} `)}}`;

const spaced = (text: string): string => escaped(text).replace(/ /g, '\\ ');

const escapes: Readonly<Record<string, string>> = { '\\': '\\textbackslash ', '{': '\\{', '}': '\\}', $: '\\$', '&': '\\&', '#': '\\#', '%': '\\%', _: '\\_', '^': '\\textasciicircum ', '~': '\\textasciitilde ' }; // prettier-ignore
const escaped = (text: string): string => text.replace(/[\\{}$&#%_^~]/g, (sign) => escapes[sign] ?? sign);
