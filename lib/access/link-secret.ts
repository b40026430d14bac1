/** Secrets of links that work once: made from the server's own secret, so that they are kept nowhere. Server-side only. */
import { createHash, createHmac } from 'node:crypto';

/**
 * The secret of a link: HMAC-SHA256 of its nonce under the server's secret, so that a letter can be written again,
 * byte for byte, while the database holds a hash only.
 */
export function linkSecret(serverSecret: string, nonce: string): string {
  return createHmac('sha256', serverSecret).update(`tallyframe single-use link ${nonce}`).digest('base64url');
}

/** What is kept of a secret that someone else carries. */
export const secretHash = (secret: string): string => createHash('sha256').update(secret).digest('hex');
