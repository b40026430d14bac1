import { NextResponse, type NextRequest } from 'next/server';

/**
 * Sets the nonce of the content security policy for a page, and decides nothing: who may see what is settled
 * where it is read. Next puts the nonce on its own scripts when it finds the policy among the request's headers.
 */
export function proxy(request: NextRequest): NextResponse {
  const nonce = btoa(crypto.randomUUID());
  const policy = pagePolicy(nonce, process.env.NODE_ENV === 'development');
  const headers = new Headers(request.headers);
  headers.set('content-security-policy', policy);
  headers.set('x-nonce', nonce);
  const response = NextResponse.next({ request: { headers } });
  response.headers.set('content-security-policy', policy);
  // Over TLS only, which ends at the proxy in front.
  if (request.headers.get('x-forwarded-proto') === 'https') {
    response.headers.set('strict-transport-security', 'max-age=31536000; includeSubDomains');
  }
  return response;
}

/** Scripts run by nonce only; style attributes are allowed, since drawings set widths and places with them. */
function pagePolicy(nonce: string, development: boolean): string {
  return [
    "default-src 'none'",
    `script-src 'nonce-${nonce}' 'strict-dynamic'${development ? " 'unsafe-eval'" : ''}`,
    `style-src 'self' ${development ? "'unsafe-inline'" : `'nonce-${nonce}'`}`,
    "style-src-attr 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "font-src 'self'",
    "connect-src 'self'",
    // the engine, where sections are tried
    "worker-src 'self'",
    "manifest-src 'self'",
    "form-action 'self'",
    "base-uri 'none'",
    "frame-ancestors 'none'",
  ].join('; ');
}

/** Pages only. The API has a fixed policy (next.config.mjs), and uploads must not be buffered on their way. */
export const config = { matcher: ['/((?!api/|_next/static|_next/image|icon.svg).*)'] };
