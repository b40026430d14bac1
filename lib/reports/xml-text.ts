/** Text for an XML element or attribute; characters that XML cannot hold are left out. */
export function xmlText(text: string): string {
  return text
    .replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]/g, '')
    .replace(/&/g, '&amp;')
    .replace(/</g, '&lt;')
    .replace(/>/g, '&gt;')
    .replace(/"/g, '&quot;');
}

/** Whether a text has characters that a cell does not hold as they are. */
const markedUp = /[&<>"_\u0000-\u0008\u000b-\u001f\ufffe\uffff]/;

/** A cell's text: what XML cannot hold, and what looks like that, is written as _x000D_ (ECMA-376 part 1, 22.9.2.19). */
export function cellText(text: string): string {
  if (!markedUp.test(text)) return text;
  const held = text
    .replace(/_(?=x[0-9A-Fa-f]{4}_)/g, '_x005F_')
    .replace(
      /[\u0000-\u0008\u000b-\u001f\ufffe\uffff]/g,
      (c) => `_x${c.charCodeAt(0).toString(16).toUpperCase().padStart(4, '0')}_`,
    );
  return xmlText(held);
}

/** Characters that a spreadsheet takes in a cell; a file with a longer one is offered for repair. */
const longest = 32_767;

/** A text as a cell takes it; of a longer one the beginning, and how much is left out. */
export function fitting(text: string): string {
  if (text.length <= longest) return text;
  // a character of two units is not cut in two
  const kept = text.slice(0, longest - 80).replace(/[\ud800-\udbff]$/, '');
  return `${kept} … and ${(text.length - kept.length).toLocaleString('en-GB')} characters more than a cell takes`;
}

/** Value of an attribute in the text of a tag, as written; null where it has none. */
export function attribute(tag: string, name: string): string | null {
  const match = new RegExp(`\\s${name}\\s*=\\s*(?:"([^"]*)"|'([^']*)')`).exec(tag);
  return match ? (match[1] ?? match[2] ?? '') : null;
}

/** The tag with the attribute set. */
export function withAttribute(tag: string, name: string, value: string): string {
  const pattern = new RegExp(`(\\s${name}\\s*=\\s*)(?:"[^"]*"|'[^']*')`);
  if (pattern.test(tag)) return tag.replace(pattern, (_, before: string) => `${before}"${value}"`);
  return tag.replace(/\s*(\/?)>$/, (_, slash: string) => ` ${name}="${value}"${slash}>`);
}

/** Puts text before the last closing tag of an element, whatever its prefix; null where the element has none. */
export function beforeEnd(xml: string, element: string, addition: string): string | null {
  const empty = new RegExp(`<((?:\\w+:)?)${element}(\\s[^>]*)?/>`).exec(xml);
  const end = [...xml.matchAll(new RegExp(`</(?:\\w+:)?${element}\\s*>`, 'g'))].at(-1);
  if (end) return xml.slice(0, end.index) + addition + xml.slice(end.index);
  if (!empty) return null;
  const open = `<${empty[1] ?? ''}${element}${empty[2] ?? ''}>${addition}</${empty[1] ?? ''}${element}>`;
  return xml.slice(0, empty.index) + open + xml.slice(empty.index + empty[0].length);
}

/** The prefix of a part's root element, with its colon: '' or 'x:'. */
export function prefixOf(xml: string, root: string): string {
  return new RegExp(`<((?:\\w+:)?)${root}[\\s>/]`).exec(xml)?.[1] ?? '';
}
