import { unzipSync, type Zippable, zipSync } from 'fflate';
import { attribute, beforeEnd } from '@/lib/reports/xml-text';

const officeRelation = 'http://schemas.openxmlformats.org/officeDocument/2006/relationships';
const plainRelations = `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>
<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships"></Relationships>`;

/** The parts of a workbook as they are packed, to be changed one by one; paths are found without regard to case. */
export class PackageParts {
  private readonly parts: Record<string, Uint8Array>;
  private readonly paths: Map<string, string>;

  constructor(bytes: Uint8Array) {
    this.parts = unzipSync(bytes);
    this.paths = new Map(Object.keys(this.parts).map((path) => [path.replace(/^\/+/, '').toLowerCase(), path]));
  }

  has(path: string): boolean {
    return this.paths.has(path.toLowerCase());
  }

  /** A part as text; null where it is missing or not in UTF-8. */
  text(path: string): string | null {
    const bytes = this.parts[this.paths.get(path.toLowerCase()) ?? ''];
    if (!bytes || (bytes[0] ?? 0) > 0xef || bytes[0] === 0) return null;
    return new TextDecoder('utf-8').decode(bytes);
  }

  put(path: string, text: string): void {
    const actual = this.paths.get(path.toLowerCase()) ?? path;
    this.paths.set(path.toLowerCase(), actual);
    this.parts[actual] = new TextEncoder().encode(text);
  }

  /** Relates a part to another, given by its path from the package's root; returns the relation's id. */
  relate(path: string, type: string, target: string): string {
    const folder = path.slice(0, path.lastIndexOf('/') + 1);
    const own = `${folder}_rels/${path.slice(folder.length)}.rels`;
    const xml = this.text(own) ?? plainRelations;
    let id = 'rIdMarked1';
    for (let n = 2; xml.includes(`"${id}"`); n += 1) id = `rIdMarked${n}`;
    const line = `<Relationship Id="${id}" Type="${officeRelation}/${type}" Target="${relative(folder, target)}"/>`;
    this.put(own, beforeEnd(xml, 'Relationships', line) ?? xml);
    return id;
  }

  /** Says what kind of part a new one is. */
  declare(path: string, contentType: string): void {
    const xml = this.text('[Content_Types].xml') ?? '';
    const extension = path.slice(path.lastIndexOf('.') + 1);
    if (extension === 'vml') {
      const known = [...xml.matchAll(/<(?:\w+:)?Default\s[^>]*>/g)].some(
        (m) => attribute(m[0], 'Extension')?.toLowerCase() === 'vml',
      );
      if (known) return;
      // defaults stand before overrides in what most programs write, and first is always right
      const at = /<(?:\w+:)?Types[^>]*>/.exec(xml);
      const end = at ? at.index + at[0].length : 0;
      this.put(
        '[Content_Types].xml',
        `${xml.slice(0, end)}<Default Extension="vml" ContentType="${contentType}"/>${xml.slice(end)}`,
      );
      return;
    }
    const line = `<Override PartName="/${path}" ContentType="${contentType}"/>`;
    this.put('[Content_Types].xml', beforeEnd(xml, 'Types', line) ?? xml);
  }

  /** A path that no part has yet: `xl/comments1.xml` … */
  free(stem: string, extension: string): string {
    let n = 1;
    while (this.has(`${stem}${n}.${extension}`)) n += 1;
    return `${stem}${n}.${extension}`;
  }

  /** Packs the parts in their order. The same parts give the same bytes: no clock. */
  packed(): Uint8Array {
    return zipSync(this.parts as Zippable, { level: 3, mtime: new Date(2000, 0, 1) });
  }
}

/** A path as seen from a folder, both from the package's root: some readers follow no absolute ones. */
function relative(folder: string, target: string): string {
  const from = folder.split('/').filter((step) => step !== '');
  const to = target.split('/');
  let same = 0;
  while (same < from.length && same < to.length - 1 && from[same]?.toLowerCase() === to[same]?.toLowerCase()) same += 1;
  return '../'.repeat(from.length - same) + to.slice(same).join('/');
}
