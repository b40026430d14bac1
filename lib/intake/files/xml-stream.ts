import { SaxesParser } from 'saxes';
import { unreadable } from '@/lib/intake/files/refusal';

export interface XmlHandlers {
  /** Name without its prefix. */
  open(name: string, attributes: Readonly<Record<string, string>>): void;
  close(name: string): void;
  text?(text: string): void;
}

/** Characters without a tag beginning or ending: far above any cell, far below what a process can hold. */
const longestRun = 4_000_000;
/** Tags within tags: a workbook needs about ten. */
const deepest = 60;
const broken = 'A part of the workbook is not as a spreadsheet writes it. Open it in a spreadsheet, save it again as .xlsx.';

/**
 * Parses a part of a workbook as it is unpacked. A document type declaration is refused (a spreadsheet writes none, and
 * entities can be nested into gigabytes), so is what is not well-formed.
 */
export async function parseXml(chunks: AsyncIterable<Uint8Array>, handlers: XmlHandlers): Promise<void> {
  const parser = new SaxesParser<{ xmlns: false; position: false }>({ xmlns: false, position: false });
  let run = 0;
  let depth = 0;
  parser.on('opentag', (tag) => {
    run = 0;
    depth += 1;
    if (depth > deepest) throw unreadable(broken);
    handlers.open(local(tag.name), tag.attributes);
  });
  parser.on('closetag', (tag) => {
    run = 0;
    depth -= 1;
    handlers.close(local(tag.name));
  });
  if (handlers.text) parser.on('text', handlers.text.bind(handlers));
  parser.on('doctype', () => {
    throw unreadable('The workbook declares entities, which no spreadsheet does; it is not read. Save it again as .xlsx.');
  });
  parser.on('error', () => {
    throw unreadable(broken);
  });
  let decoder: TextDecoder | null = null;
  for await (const chunk of chunks) {
    decoder ??= new TextDecoder(encodingOf(chunk));
    const text = decoder.decode(chunk, { stream: true });
    run += text.length;
    parser.write(text);
    if (run > longestRun) throw unreadable(broken);
  }
  if (!decoder) throw unreadable(broken);
  parser.write(decoder.decode());
  parser.close();
}

const prefixes = new Map<string, string>();
function local(name: string): string {
  if (!name.includes(':')) return name;
  let known = prefixes.get(name);
  if (known === undefined) {
    known = name.slice(name.indexOf(':') + 1);
    if (prefixes.size < 1000) prefixes.set(name, known);
  }
  return known;
}

function encodingOf(start: Uint8Array): string {
  if ((start[0] === 0xff && start[1] === 0xfe) || (start[0] === 0x3c && start[1] === 0)) return 'utf-16le';
  if ((start[0] === 0xfe && start[1] === 0xff) || (start[0] === 0 && start[1] === 0x3c)) return 'utf-16be';
  return 'utf-8';
}
