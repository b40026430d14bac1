import http from 'node:http';
import type { AddressInfo } from 'node:net';
import { afterEach, expect, it } from 'vitest';
import { takeAddressFromConnection } from './peer-address';

const emit = http.Server.prototype.emit;
afterEach(() => {
  http.Server.prototype.emit = emit;
  delete process.env.TRUST_PROXY;
});

/** The address that a server reads of a request that claims another. */
async function addressRead(): Promise<string | undefined> {
  takeAddressFromConnection();
  const server = http.createServer((request, response) => response.end(request.headers['x-forwarded-for']));
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.address() as AddressInfo;
  const answer = await fetch(`http://127.0.0.1:${port}/`, { headers: { 'x-forwarded-for': '192.0.2.1' } });
  const text = await answer.text();
  await new Promise((resolve) => server.close(resolve));
  return text;
}

it('takes the sender’s address from the connection, whatever the sender claims', async () => {
  expect(await addressRead()).toBe('127.0.0.1');
});

it('believes the proxy in front where there is said to be one', async () => {
  process.env.TRUST_PROXY = '1';
  expect(await addressRead()).toBe('192.0.2.1');
});
