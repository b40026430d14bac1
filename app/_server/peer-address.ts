import 'server-only';
import http from 'node:http';

/**
 * Sign-in attempts are counted by address, and Next believes an `x-forwarded-for` that the sender wrote. Unless
 * the server stands behind a proxy that sets it (TRUST_PROXY=1), the header is replaced by the address of the
 * connection before anything reads it.
 */
export function takeAddressFromConnection(): void {
  if (process.env.TRUST_PROXY === '1') return;
  const emit = http.Server.prototype.emit;
  http.Server.prototype.emit = function (this: http.Server, event: string | symbol, ...rest: unknown[]): boolean {
    const request = rest[0];
    if (event === 'request' && request instanceof http.IncomingMessage) {
      request.headers['x-forwarded-for'] = request.socket.remoteAddress ?? 'unknown';
    }
    return emit.apply(this, [event, ...rest] as Parameters<typeof emit>);
  };
}
