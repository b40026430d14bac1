import { unreadable } from '@/lib/intake/files/refusal';

export type Delimiter = ',' | ';' | '\t';
export type Encoding = 'utf-8' | 'utf-16le' | 'utf-16be' | 'windows-1252';

/** A file's bytes, readable more than once: to see what they are, then to read them. */
export type Source = () => AsyncIterable<Uint8Array>;

export interface CsvShape {
  readonly encoding: Encoding;
  readonly delimiter: Delimiter;
  /** True where the first line is only `sep=;`, which a spreadsheet takes as a hint. */
  readonly hint: boolean;
}

const sampleBytes = 64 * 1024;

/** Looks at a file's bytes: UTF-8 (with or without BOM), UTF-16 with BOM, else Windows-1252; then which delimiter parts it. */
export async function csvShape(source: Source): Promise<CsvShape> {
  const utf8 = new TextDecoder('utf-8', { fatal: true });
  const sample: Uint8Array[] = [];
  let size = 0;
  let valid = true;
  for await (const chunk of source()) {
    if (size < sampleBytes) sample.push(chunk);
    size += chunk.byteLength;
    if (valid) valid = decodes(utf8, chunk);
  }
  if (valid) valid = decodes(utf8, null);
  const start = Buffer.concat(sample).subarray(0, sampleBytes);
  const encoding = encodingOf(start, valid);
  if (encoding !== 'utf-16le' && encoding !== 'utf-16be' && start.includes(0)) {
    throw unreadable('The file is not text. Save it as CSV UTF-8 or .xlsx and send it again.');
  }
  const text = new TextDecoder(encoding).decode(start);
  const hint = /^sep=([,;\t])\r?\n/i.exec(text)?.[1];
  return { encoding, delimiter: hint ? (hint as Delimiter) : delimiterOf(text), hint: hint !== undefined };
}

/** Decodes piece by piece, every kind of line end as `\n`. */
export async function* decodedText(source: Source, encoding: Encoding): AsyncGenerator<string> {
  const decoder = new TextDecoder(encoding);
  let heldReturn = '';
  for await (const chunk of source()) {
    const text = heldReturn + decoder.decode(chunk, { stream: true });
    heldReturn = text.endsWith('\r') ? '\r' : '';
    const whole = heldReturn ? text.slice(0, -1) : text;
    if (whole !== '') yield whole.includes('\r') ? whole.replace(/\r\n?/g, '\n') : whole;
  }
  const rest = heldReturn + decoder.decode();
  if (rest !== '') yield rest.replace(/\r\n?/g, '\n');
}

function decodes(decoder: TextDecoder, chunk: Uint8Array | null): boolean {
  try {
    if (chunk) decoder.decode(chunk, { stream: true });
    else decoder.decode();
    return true;
  } catch {
    return false;
  }
}

function encodingOf(start: Uint8Array, validUtf8: boolean): Encoding {
  if (start[0] === 0xff && start[1] === 0xfe) return 'utf-16le';
  if (start[0] === 0xfe && start[1] === 0xff) return 'utf-16be';
  return validUtf8 ? 'utf-8' : 'windows-1252';
}

/**
 * The delimiter that parts most of the first lines. A comma between two digits may be a decimal mark and counts for nothing,
 * so a semicolon file full of `0,5` stays one. On a tie: tab, semicolon, comma.
 */
function delimiterOf(text: string): Delimiter {
  const lines = text
    .replace(/"(?:[^"]|"")*"/g, 'q')
    .split(/\r\n|\r|\n/)
    .slice(0, 300)
    .filter((line) => /[^\s,;]/.test(line));
  const parted = (pattern: RegExp): number => lines.filter((line) => pattern.test(line)).length;
  const scores: readonly (readonly [Delimiter, number])[] = [
    ['\t', parted(/\t/)],
    [';', parted(/;/)],
    [',', Math.max(parted(/(?:^|\D),|,(?:\D|$)/), parted(/\d,\d+,\d/))],
  ];
  return scores.reduce((best, next) => (next[1] > best[1] ? next : best), [',', 0] as const)[0];
}
