/**
 * Whether a write comes from a page of this very site. Browsers send `Origin` with every write and
 * `Sec-Fetch-Site` besides; a write that carries neither is refused, since nothing says where it came from.
 *
 * @param host the host the request was sent to, as the browser named it
 */
export function isSameOrigin(headers: Pick<Headers, 'get'>, host: string | null): boolean {
  const site = headers.get('sec-fetch-site');
  if (site !== null && site !== 'same-origin') return false;
  const origin = headers.get('origin');
  if (origin === null) return site === 'same-origin';
  if (host === null) return false;
  try {
    return new URL(origin).host === host.toLowerCase();
  } catch {
    return false; // "null", as sandboxed pages send it
  }
}
