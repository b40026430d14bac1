import 'server-only';
import { PassThrough, Readable } from 'node:stream';
import type { ReportSheet } from '@/lib/reports/workbook/report-sheet';
import { writeXlsx } from '@/lib/reports/workbook/write-xlsx';

const kinds: Readonly<Record<string, string>> = {
  csv: 'text/csv; charset=utf-8',
  xlsx: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
  json: 'application/json; charset=utf-8',
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

/** Sheets as one XLSX, written while it is read. */
export function xlsxStream(sheets: Iterable<ReportSheet>): ReadableStream<Uint8Array> {
  const sink = new PassThrough();
  writeXlsx(sheets, sink).catch((fault: unknown) => sink.destroy(fault instanceof Error ? fault : new Error(String(fault))));
  return bytesOf(sink);
}

/** Pieces of text as bytes. */
export const textStream = (pieces: Iterable<string> | AsyncIterable<string>): ReadableStream<Uint8Array> =>
  bytesOf(Readable.from(pieces, { objectMode: false }));

const bytesOf = (stream: Readable) => Readable.toWeb(stream) as ReadableStream<Uint8Array>;
