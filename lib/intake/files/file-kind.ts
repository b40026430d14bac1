import { unreadable } from '@/lib/intake/files/refusal';

export type FileKind = 'zip' | 'text';

const starts: readonly (readonly [bytes: readonly number[], what: string])[] = [
  [[0x25, 0x50, 0x44, 0x46], 'a PDF'],
  [[0x89, 0x50, 0x4e, 0x47], 'a picture'],
  [[0xff, 0xd8, 0xff], 'a picture'],
  [[0x47, 0x49, 0x46, 0x38], 'a picture'],
  [[0x42, 0x4d], 'a picture'],
  [[0x49, 0x49, 0x2a, 0x00], 'a picture'],
  [[0x4d, 0x4d, 0x00, 0x2a], 'a picture'],
  [[0x52, 0x61, 0x72, 0x21], 'a RAR archive'],
  [[0x37, 0x7a, 0xbc, 0xaf], 'a 7z archive'],
  [[0x1f, 0x8b], 'a gzip archive'],
  [[0x09, 0x08], 'a very old .xls workbook'],
];

/**
 * What a file is by its content; its name only has a say for text. @throws Refusal saying what it is instead and what to do
 */
export function fileKind(name: string, bytes: Uint8Array): FileKind {
  if (bytes.byteLength === 0) throw unreadable(`${name} is empty. Was it saved?`);
  if (beginsWith(bytes, [0x50, 0x4b, 0x03, 0x04]) || beginsWith(bytes, [0x50, 0x4b, 0x05, 0x06])) return 'zip';
  if (beginsWith(bytes, [0xd0, 0xcf, 0x11, 0xe0])) throw unreadable(ofCompoundFile(name, bytes));
  const extension = name.slice(name.lastIndexOf('.') + 1).toLowerCase();
  const isText = ['csv', 'tsv', 'txt'].includes(extension);
  const other = starts.find(([start]) => beginsWith(bytes, start) && (start.length > 2 || !isText));
  if (other) throw unreadable(`${name} is ${other[1]}, not a workbook. Save the sheets as .xlsx or .csv.`);
  if (isText) return 'text';
  const text = new TextDecoder('utf-8').decode(bytes.subarray(0, 200)).trimStart();
  if (text.startsWith('<')) {
    throw unreadable(`${name} is a web page or XML, not a workbook. Open it in a spreadsheet and save it as .xlsx.`);
  }
  throw unreadable(`${name} is not a workbook. Tallyframe reads .xlsx, .csv and .zip files of these.`);
}

/** An encrypted workbook and an .xls are both compound files; their directory names what they hold, in UTF-16. */
function ofCompoundFile(name: string, bytes: Uint8Array): string {
  const buffer = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  if (buffer.includes(Buffer.from('EncryptedPackage', 'utf16le'))) {
    return `${name} is locked with a password. Save it without one and send it again.`;
  }
  return `${name} is an old workbook (.xls) or another old office file. Open it in a spreadsheet and save it as .xlsx.`;
}

const beginsWith = (bytes: Uint8Array, start: readonly number[]): boolean => start.every((b, i) => bytes[i] === b);
