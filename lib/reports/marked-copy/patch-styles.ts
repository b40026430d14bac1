import { fillColour, type Mark } from '@/lib/reports/marked-copy/marks';
import { attribute, prefixOf, withAttribute } from '@/lib/reports/xml-text';

const main = 'http://schemas.openxmlformats.org/spreadsheetml/2006/main';

/** The smallest style part, for a workbook that has none. */
export const plainStyles = `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>
<styleSheet xmlns="${main}"><fonts count="1"><font><sz val="11"/><name val="Calibri"/></font></fonts><fills count="2"><fill><patternFill patternType="none"/></fill><fill><patternFill patternType="gray125"/></fill></fills><borders count="1"><border><left/><right/><top/><bottom/><diagonal/></border></borders><cellStyleXfs count="1"><xf numFmtId="0" fontId="0" fillId="0" borderId="0"/></cellStyleXfs><cellXfs count="1"><xf numFmtId="0" fontId="0" fillId="0" borderId="0" xfId="0"/></cellXfs></styleSheet>`;

/**
 * Adds filled twins to a workbook's cell styles: the same font, border and number format, another fill.
 * Styles are found and appended as text, so that nothing else of the part changes.
 */
export class FilledStyles {
  private readonly formats: string[];
  private readonly twins = new Map<string, number>();
  private readonly added: string[] = [];
  private readonly fills: number;
  private readonly prefix: string;

  /** @throws RangeError where the part has no cell styles to add to */
  constructor(private readonly xml: string) {
    this.prefix = prefixOf(xml, 'styleSheet');
    const formats = this.element('cellXfs');
    const fills = this.element('fills');
    if (formats === null || fills === null) throw new RangeError('Expected a style part with cell styles and fills');
    this.formats = [...formats.matchAll(/<(?:\w+:)?xf\b[^>]*?(?:\/>|>[\s\S]*?<\/(?:\w+:)?xf\s*>)/g)].map((m) => m[0]);
    this.fills = [...fills.matchAll(/<(?:\w+:)?fill\s*>|<(?:\w+:)?fill\s*\/>/g)].length;
  }

  /** Index of the style that looks like `style` but for the fill of this severity. */
  filled(style: number, severity: Mark['severity']): number {
    const key = `${style} ${severity}`;
    const known = this.twins.get(key);
    if (known !== undefined) return known;
    const format = this.formats[style] ?? this.formats[0] ?? `<${this.prefix}xf numFmtId="0" fontId="0" borderId="0" xfId="0"/>`;
    const tag = /^<[^>]*>/.exec(format)?.[0] ?? format;
    const fill = this.fills + (severity === 'error' ? 0 : 1);
    const twin = withAttribute(withAttribute(tag, 'fillId', String(fill)), 'applyFill', '1') + format.slice(tag.length);
    const index = this.formats.length + this.added.length;
    this.added.push(twin);
    this.twins.set(key, index);
    return index;
  }

  /** The part with the fills and styles added. */
  patched(): string {
    const p = this.prefix;
    const fill = (colour: string): string =>
      `<${p}fill><${p}patternFill patternType="solid"><${p}fgColor rgb="${colour}"/><${p}bgColor indexed="64"/></${p}patternFill></${p}fill>`;
    const withFills = this.append(this.xml, 'fills', fill(fillColour.error) + fill(fillColour.warning), this.fills + 2);
    return this.append(withFills, 'cellXfs', this.added.join(''), this.formats.length + this.added.length);
  }

  private element(name: string): string | null {
    return new RegExp(`<${this.prefix}${name}[\\s>][\\s\\S]*?</${this.prefix}${name}\\s*>`).exec(this.xml)?.[0] ?? null;
  }

  private append(xml: string, name: string, addition: string, count: number): string {
    return xml.replace(
      new RegExp(`(<${this.prefix}${name}(?:\\s[^>]*)?>)([\\s\\S]*?)(</${this.prefix}${name}\\s*>)`),
      (_, open: string, inner: string, close: string) =>
        (attribute(open, 'count') === null ? open : withAttribute(open, 'count', String(count))) + inner + addition + close,
    );
  }
}
