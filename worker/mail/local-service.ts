/**
 * A mail service for machines without a key of the hosted one: speaks the same HTTP on a port of this machine, delivers
 * nothing, and keeps each letter as a file, from which a page shows it. A key used twice keeps one letter.
 */
import { createHash, randomBytes, randomUUID, timingSafeEqual } from 'node:crypto';
import { linkSync, mkdirSync, readFileSync, unlinkSync, writeFileSync } from 'node:fs';
import { createServer, type IncomingMessage, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import type { KeptLetter } from './kept-letters';

export interface LocalService {
  readonly url: string;
  /** The bearer key that it takes: another with every start. */
  readonly key: string;
  readonly close: () => Promise<void>;
}

/** What it answers instead of taking a letter: for tests of a service that fails. */
export interface ToldAnswer {
  readonly status: number;
  readonly body: unknown;
}

interface LocalOptions {
  readonly folder: string;
  /** Asked for every request before it is looked at; null = serve it. */
  readonly instead?: () => ToldAnswer | null;
  /** Told of every letter that was kept, not of repetitions. */
  readonly onKept?: (letter: KeptLetter) => void;
}

/** No letter of the product is a tenth of this. */
const longest = 1024 * 1024;

export async function startLocalService({ folder, instead, onKept }: LocalOptions): Promise<LocalService> {
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  const key = randomBytes(24).toString('base64url');
  const server = createServer((request, response) => {
    void answer(request, { folder, key, instead, onKept })
      .catch((): ToldAnswer => refusal(500, 'internal_server_error', 'A fault of the service.'))
      .then(({ status, body }) => {
        response.writeHead(status, { 'content-type': 'application/json' }).end(JSON.stringify(body));
      });
  });
  await new Promise<void>((resolve, reject) => server.once('error', reject).listen(0, '127.0.0.1', resolve));
  server.unref();
  return { url: `http://127.0.0.1:${(server.address() as AddressInfo).port}`, key, close: () => closed(server) };
}

async function answer(request: IncomingMessage, options: LocalOptions & { readonly key: string }): Promise<ToldAnswer> {
  const told = options.instead?.() ?? null;
  if (told !== null) return told;
  if (request.method !== 'POST' || request.url !== '/emails') return refusal(404, 'not_found', 'There is no such address.');
  if (!isKey(request.headers.authorization, options.key)) return refusal(401, 'invalid_api_key', 'API key is not valid.');
  const sent = JSON.parse(await bodyOf(request)) as Partial<Record<string, unknown>>;
  const { from, to, subject, html, text } = sent;
  const recipient: unknown = Array.isArray(to) ? to[0] : to;
  if ([from, recipient, subject, html, text].some((each) => typeof each !== 'string' || each === '')) {
    return refusal(422, 'missing_required_field', 'from, to, subject, html and text are needed.');
  }
  const idempotencyKey = request.headers['idempotency-key'];
  const content = { from, to: recipient, subject, html, text } as Pick<KeptLetter, 'from' | 'to' | 'subject' | 'html' | 'text'>;
  return keep(options, typeof idempotencyKey === 'string' ? idempotencyKey : randomUUID(), {
    ...content,
    ...tagsOf(sent['tags']),
  });
}

function keep({ folder, onKept }: LocalOptions, idempotencyKey: string, content: Omit<KeptLetter, 'id' | 'at'>): ToldAnswer {
  const file = join(folder, `${createHash('sha256').update(idempotencyKey).digest('hex')}.json`);
  const letter: KeptLetter = { id: randomUUID(), at: new Date().toISOString(), ...content };
  const whole = join(folder, `${letter.id}.part`);
  writeFileSync(whole, JSON.stringify(letter), { mode: 0o600 });
  try {
    // Named only where it is not there yet, whatever other process does the same, and never half written.
    linkSync(whole, file);
  } catch (cause) {
    if ((cause as NodeJS.ErrnoException).code !== 'EEXIST') throw cause;
    const { id, at: _at, ...earlier } = JSON.parse(readFileSync(file, 'utf8')) as KeptLetter;
    if (JSON.stringify(earlier) === JSON.stringify(content)) return { status: 200, body: { id } };
    return refusal(409, 'invalid_idempotent_request', 'The key was used for another letter.');
  } finally {
    unlinkSync(whole);
  }
  onKept?.(letter);
  return { status: 200, body: { id: letter.id } };
}

function tagsOf(tags: unknown): Pick<KeptLetter, 'office' | 'kind'> {
  const pairs = Array.isArray(tags) ? (tags as readonly { readonly name?: unknown; readonly value?: unknown }[]) : [];
  const value = (name: string): string => String(pairs.find((tag) => tag.name === name)?.value ?? '');
  return { office: Number(value('office')), kind: value('kind').replaceAll('-', ' ') };
}

function isKey(header: string | undefined, key: string): boolean {
  const [given, wanted] = [Buffer.from(header ?? ''), Buffer.from(`Bearer ${key}`)];
  return given.length === wanted.length && timingSafeEqual(given, wanted);
}

async function bodyOf(request: IncomingMessage): Promise<string> {
  const pieces: Buffer[] = [];
  let size = 0;
  for await (const piece of request as AsyncIterable<Buffer>) {
    size += piece.length;
    if (size > longest) throw new Error('The request is too long');
    pieces.push(piece);
  }
  return Buffer.concat(pieces).toString('utf8');
}

const refusal = (statusCode: number, name: string, message: string): ToldAnswer => ({
  status: statusCode,
  body: { statusCode, name, message },
});

const closed = (server: Server): Promise<void> =>
  new Promise((resolve) => {
    server.close(() => resolve());
    server.closeAllConnections();
  });
