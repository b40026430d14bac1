import { ApiError } from './error';

export interface SentFile {
  /** As the sender named it, any path taken off. */
  readonly name: string;
  readonly bytes: Uint8Array;
}

/**
 * Reads a request's body, counting while it streams, so that one too large is given up at the limit and
 * never held whole.
 *
 * @throws {ApiError} too-large
 */
export async function readBody(body: ReadableStream<Uint8Array> | null, limit: number): Promise<Uint8Array> {
  if (body === null) return new Uint8Array(0);
  const chunks: Uint8Array[] = [];
  let size = 0;
  for await (const chunk of chunksOf(body)) {
    size += chunk.length;
    if (size > limit) throw tooLarge(limit);
    chunks.push(chunk);
  }
  return Buffer.concat(chunks, size);
}

export function tooLarge(limit: number): ApiError {
  return new ApiError(
    'too-large',
    `The files are larger than ${Math.round(limit / 1024 / 1024)} MB. Divide them and bring each part as a batch.`,
  );
}

/** Cancels the stream when its reader stops early. */
async function* chunksOf(body: ReadableStream<Uint8Array>): AsyncGenerator<Uint8Array> {
  const reader = body.getReader();
  let ended = false;
  try {
    for (;;) {
      const { done, value } = await reader.read();
      if (done) {
        ended = true;
        return;
      }
      yield value;
    }
  } finally {
    if (!ended) await reader.cancel().catch(() => undefined);
  }
}

/**
 * The files of a multipart body (RFC 7578), parted at the boundary of the content type; fields that are not
 * files come as text.
 *
 * @throws {ApiError} bad-request where the body doesn't keep to the form
 */
export function splitMultipart(body: Uint8Array, contentType: string): { files: SentFile[]; fields: Record<string, string> } {
  const boundary = /;\s*boundary=(?:"([^"]+)"|([^;\s]+))/i.exec(contentType);
  const word = boundary?.[1] ?? boundary?.[2];
  const bytes = Buffer.from(body.buffer, body.byteOffset, body.byteLength);
  if (word === undefined) throw malformed();
  const dash = Buffer.from(`--${word}`);
  const between = Buffer.from(`\r\n--${word}`);
  const files: SentFile[] = [];
  const fields: Record<string, string> = {};
  let at = bytes.indexOf(dash);
  if (at < 0) throw malformed();
  at += dash.length;
  while (!(bytes[at] === 0x2d && bytes[at + 1] === 0x2d)) {
    const headEnd = bytes.indexOf('\r\n\r\n', at);
    const end = headEnd < 0 ? -1 : bytes.indexOf(between, headEnd + 2);
    if (headEnd < 0 || end < 0) throw malformed();
    const head = bytes.toString('utf8', at, headEnd);
    const content = bytes.subarray(Math.min(headEnd + 4, end), end);
    const fileName = parameter(head, 'filename');
    if (fileName === undefined) fields[parameter(head, 'name') ?? ''] = content.toString('utf8');
    else if (fileName !== '') files.push({ name: baseName(fileName), bytes: content });
    at = end + between.length;
  }
  return { files, fields };
}

const malformed = () => new ApiError('bad-request', 'The upload was cut short or is not a form with files. Send it again.');

function parameter(head: string, name: string): string | undefined {
  const line = head.split('\r\n').find((one) => /^content-disposition:/i.test(one)) ?? '';
  const found = new RegExp(`;\\s*${name}="((?:[^"\\\\]|\\\\.)*)"`, 'i').exec(line);
  return found?.[1]?.replaceAll('%22', '"').replaceAll('%0D', '').replaceAll('%0A', '');
}

/** The last part of a name, whichever way its folders are written, without control characters. */
export function baseName(name: string): string {
  const last = name.split(/[\\/]/).at(-1) ?? '';
  return last
    .replace(/[\u0000-\u001f\u007f]/g, '')
    .trim()
    .slice(0, 200);
}
