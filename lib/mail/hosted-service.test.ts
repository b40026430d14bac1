import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { afterEach, describe, expect, it } from 'vitest';
import { hostedService } from './hosted-service';

const open: (() => void)[] = [];
afterEach(() => open.splice(0).forEach((close) => close()));

interface Seen {
  readonly path?: string;
  readonly authorization?: string;
  readonly key?: string;
  readonly body: Record<string, unknown>;
}

/** A server that answers everything alike and remembers what it was asked. */
async function answering(status: number, body: string) {
  const seen: Seen[] = [];
  const server = createServer((request, response) => {
    let text = '';
    request.on('data', (piece: Buffer) => (text += piece.toString()));
    request.on('end', () => {
      const { authorization, 'idempotency-key': key } = request.headers;
      seen.push({
        path: `${request.method} ${request.url}`,
        authorization,
        key: String(key),
        body: JSON.parse(text) as Seen['body'],
      });
      response.writeHead(status, { 'content-type': 'application/json' }).end(body);
    });
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  open.push(() => server.close());
  const url = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  return { seen, service: hostedService({ key: 'key of tests', from: 'Tallyframe <letters@frames.example>', url }) };
}

const letter = { to: 'pia@client.example', subject: 'S', text: 'T', html: '<p>T</p>', office: 3, kind: 'run finished' };

describe('the hosted mail service', () => {
  it('is asked as its interface has it: POST /emails with a bearer key and the letter’s own idempotency key', async () => {
    const { seen, service } = await answering(200, '{"id":"m-1"}');
    expect(await service.send(letter, 'tallyframe-1')).toEqual({ sent: true, id: 'm-1' });
    expect(seen[0]).toMatchObject({ path: 'POST /emails', authorization: 'Bearer key of tests', key: 'tallyframe-1' });
    expect(seen[0]!.body).toMatchObject({
      from: 'Tallyframe <letters@frames.example>',
      to: 'pia@client.example',
      subject: 'S',
      tags: [
        { name: 'office', value: '3' },
        { name: 'kind', value: 'run-finished' },
      ],
    });
  });

  it('is tried again after faults of its own, limits, and a key that people can mend', async () => {
    for (const [status, body] of [
      [500, '<html>'],
      [503, ''],
      [429, '{"statusCode":429,"name":"rate_limit_exceeded","message":"Too many requests."}'],
      [401, '{"statusCode":401,"name":"missing_api_key","message":"Missing."}'],
      [409, '{"statusCode":409,"name":"concurrent_idempotent_requests","message":"In progress."}'],
    ] as const) {
      const { service } = await answering(status, body);
      expect(await service.send(letter, 'k'), String(status)).toMatchObject({ sent: false, lasting: false });
    }
  });

  it('is not tried again where it refuses the letter itself', async () => {
    const { service } = await answering(422, '{"statusCode":422,"name":"validation_error","message":"Invalid `to` field."}');
    expect(await service.send(letter, 'k')).toEqual({
      sent: false,
      lasting: true,
      reason: 'validation_error: Invalid `to` field.',
    });
  });

  it('says so where nobody answers, in time', async () => {
    const nobody = hostedService({ key: 'k', from: 'f', url: 'http://127.0.0.1:9' });
    expect(await nobody.send(letter, 'k')).toMatchObject({ sent: false, lasting: false });
    const { service } = await answering(200, '{"id":"m-1"}');
    expect(await service.send(letter, 'k', AbortSignal.abort())).toMatchObject({ sent: false, lasting: false });
  });
});
