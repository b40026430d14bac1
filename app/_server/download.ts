import 'server-only';
import { Readable } from 'node:stream';

const kinds: Readonly<Record<string, string>> = {
  csv: 'text/csv; charset=utf-8',
  xlsx: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
  json: 'application/json; charset=utf-8',
  pdf: 'application/pdf',
  zip: 'application/zip',
};

/** A file that is sent as it is made, at the pace it is taken. A fault on the way cuts it off, so that it can't pass for whole. */
export function attachment(name: string, content: ReadableStream<Uint8Array> | Uint8Array<ArrayBuffer>): Response {
  const safe = [...name]
    .map((letter) => (letter < ' ' || '\\/:*?"<>|'.includes(letter) ? ' ' : letter))
    .join('')
    .trim();
  const plain = safe.replace(/[^\x20-\x7e]/g, '_');
  const headers = new Headers({
    'content-type': kinds[name.split('.').at(-1) ?? ''] ?? 'application/octet-stream',
    'content-disposition': `attachment; filename="${plain}"; filename*=UTF-8''${encodeURIComponent(safe)}`,
  });
  if (content instanceof Uint8Array) headers.set('content-length', String(content.byteLength));
  return new Response(content, { headers });
}

/** What is made piece by piece, texts in UTF-8, as the body of a reply. */
export function bodyOf(pieces: AsyncIterable<unknown> | Iterable<unknown>): ReadableStream<Uint8Array> {
  const encoder = new TextEncoder();
  const bytes = Readable.from(pieces).map((piece: unknown) => (typeof piece === 'string' ? encoder.encode(piece) : piece));
  return Readable.toWeb(bytes) as ReadableStream<Uint8Array>;
}
