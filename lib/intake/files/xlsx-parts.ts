import { detached } from '@/lib/intake/files/detached';
import { dateCode } from '@/lib/intake/files/date-format';
import type { Meter } from '@/lib/intake/files/meter';
import { unreadable } from '@/lib/intake/files/refusal';
import { parseXml } from '@/lib/intake/files/xml-stream';
import type { ZipEntry } from '@/lib/intake/files/zip-file';

/** The parts of a workbook by path in lower case without a leading `/`. */
export type Parts = ReadonlyMap<string, ZipEntry>;

export interface SheetPart {
  readonly name: string;
  readonly path: string;
}

export interface WorkbookParts {
  readonly path: string;
  /** In the workbook's order, hidden ones too; charts and macro sheets left out. */
  readonly sheets: readonly SheetPart[];
  readonly date1904: boolean;
  readonly sharedStrings: string | null;
  readonly styles: string | null;
}

export function partsOf(entries: readonly ZipEntry[]): Parts {
  return new Map(entries.map((entry) => [entry.name.replace(/^\/+/, '').toLowerCase(), entry]));
}

interface Relation {
  readonly type: string;
  readonly target: string;
}

/** Follows the package's relations from its root to the workbook and from there to its sheets. */
export async function readWorkbook(parts: Parts, meter: Meter): Promise<WorkbookParts> {
  const root = await relationsOf(parts, '', meter);
  const path = [...root.values()].find((r) => r.type === 'officedocument')?.target ?? 'xl/workbook.xml';
  const workbook = parts.get(path);
  if (!workbook) throw unreadable('There is no workbook in the file. Save it again as .xlsx.');
  const relations = await relationsOf(parts, path, meter);
  const listed: { name: string; id: string }[] = [];
  let date1904 = false;
  await parseXml(workbook.chunks(meter), {
    open(name, attributes) {
      if (name === 'sheet') {
        const id = Object.entries(attributes).find(([key]) => /^\w+:id$/i.test(key))?.[1];
        listed.push({ name: attributes['name'] ?? '', id: id ?? '' });
        meter.keep(200);
      } else if (name === 'workbookPr') {
        date1904 = /^(1|true)$/.test(attributes['date1904'] ?? '');
      }
    },
    close() {},
  });
  const sheets = listed.flatMap(({ name, id }) => {
    const relation = relations.get(id);
    if (!relation) throw unreadable(`Sheet ${name} is listed in the workbook but not in the file. Save it again as .xlsx.`);
    return relation.type === 'worksheet' ? [{ name, path: relation.target }] : [];
  });
  const missing = sheets.find((s) => !parts.has(s.path));
  if (missing) throw unreadable(`Sheet ${missing.name} is listed in the workbook but not in the file. Save it again as .xlsx.`);
  if (sheets.length === 0) throw unreadable('There is no sheet with cells in the workbook.');
  const ofType = (type: string): string | null => {
    const target = [...relations.values()].find((r) => r.type === type)?.target;
    if (target !== undefined && !parts.has(target))
      throw unreadable('A part of the workbook is missing. Save it again as .xlsx.');
    return target ?? null;
  };
  return { path, sheets, date1904, sharedStrings: ofType('sharedstrings'), styles: ofType('styles') };
}

/** Relations of a part ('' = the package): by id, type as the last word of its address in lower case. */
export async function relationsOf(parts: Parts, path: string, meter: Meter): Promise<ReadonlyMap<string, Relation>> {
  const folder = path.slice(0, path.lastIndexOf('/') + 1);
  const entry = parts.get(`${folder}_rels/${path.slice(folder.length)}.rels`);
  const relations = new Map<string, Relation>();
  if (!entry) return relations;
  await parseXml(entry.chunks(meter), {
    open(name, attributes) {
      if (name !== 'Relationship' || attributes['TargetMode'] === 'External') return;
      const type = (attributes['Type'] ?? '').split('/').at(-1)?.toLowerCase() ?? '';
      relations.set(attributes['Id'] ?? '', { type, target: resolve(folder, attributes['Target'] ?? '') });
      meter.keep(300);
    },
    close() {},
  });
  return relations;
}

function resolve(folder: string, target: string): string {
  const steps = (target.startsWith('/') ? target : `${folder}${target}`).toLowerCase().split('/');
  const path: string[] = [];
  for (const step of steps) {
    if (step === '..') path.pop();
    else if (step !== '' && step !== '.') path.push(step);
  }
  return path.join('/');
}

/** For each cell style its date code, null where it shows a plain number. */
export async function readDateStyles(entry: ZipEntry | undefined, meter: Meter): Promise<readonly (string | null)[]> {
  const codes = new Map<number, string>();
  const styles: (string | null)[] = [];
  if (!entry) return styles;
  let within = false;
  await parseXml(entry.chunks(meter), {
    open(name, attributes) {
      if (name === 'numFmt') {
        codes.set(Number(attributes['numFmtId']), attributes['formatCode'] ?? '');
        meter.keep(200);
      } else if (name === 'cellXfs') {
        within = true;
      } else if (name === 'xf' && within) {
        const id = Number(attributes['numFmtId'] ?? 0);
        styles.push(dateCode(id, codes.get(id)));
        meter.keep(8);
      }
    },
    close(name) {
      if (name === 'cellXfs') within = false;
    },
  });
  return styles;
}

/** The workbook's shared strings in order, runs of rich text joined, phonetic hints left out. */
export async function readSharedStrings(entry: ZipEntry | undefined, meter: Meter): Promise<readonly string[]> {
  const strings: string[] = [];
  if (!entry) return strings;
  let text = '';
  let inText = false;
  let hint = false;
  await parseXml(entry.chunks(meter), {
    open(name) {
      if (name === 'si') text = '';
      else if (name === 'rPh') hint = true;
      else if (name === 't') inText = !hint;
    },
    text(piece) {
      if (inText) text += piece;
    },
    close(name) {
      if (name === 't') inText = false;
      else if (name === 'rPh') hint = false;
      else if (name === 'si') {
        const whole = detached(plainText(text));
        meter.keep(64 + whole.length);
        strings.push(whole);
      }
    },
  });
  return strings;
}

/** Undoes `_x000D_`, the way a workbook writes characters that XML cannot hold. */
export function plainText(text: string): string {
  return text.includes('_x')
    ? text.replace(/_x([0-9A-Fa-f]{4})_/g, (_, code: string) => String.fromCharCode(parseInt(code, 16)))
    : text;
}
