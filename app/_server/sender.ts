import 'server-only';

/** The sender's address: the last one that was added on the way (see peer-address.ts). */
export function senderOf(headers: Headers): string {
  return headers.get('x-forwarded-for')?.split(',').at(-1)?.trim() ?? 'unknown';
}
