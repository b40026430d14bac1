import 'server-only';
import { randomUUID } from 'node:crypto';
import { ApiError } from '@/lib/api/error';
import { isSameOrigin } from '@/lib/access/same-origin';
import { log } from './log';
import { bearerOf } from './person';

/** What Next hands a route handler beside the request. */
export interface Params<K extends string = never> {
  readonly params: Promise<Record<K, string>>;
}

type Handler<K extends string> = (request: Request, context: Params<K>) => Promise<Response>;

/**
 * The frame around every route handler: a request id, the same-origin check on writes, one shape of error,
 * one log line. What the handler throws as an ApiError is answered as such; anything else is a fault of the
 * service, logged once with its cause and answered without a word of its inside.
 */
export function door<K extends string = never>(handler: Handler<K>): Handler<K> {
  return async (request, context) => {
    const started = performance.now();
    const requestId = randomUUID();
    let response: Response;
    try {
      refuseOtherOrigins(request);
      response = await handler(request, context);
    } catch (thrown) {
      response = answer(thrown, requestId);
    }
    response.headers.set('x-request-id', requestId);
    if (!response.headers.has('cache-control')) response.headers.set('cache-control', 'private, no-store');
    // The address without its query: queries hold ids of frames and people's words.
    const path = new URL(request.url).pathname;
    log.info(
      { requestId, method: request.method, path, status: response.status, ms: Math.round(performance.now() - started) },
      'request',
    );
    return response;
  };
}

function refuseOtherOrigins(request: Request): void {
  // A browser sends no token of its own accord, and where one is sent, cookies count for nothing.
  if (bearerOf(request) !== null) return;
  if (request.method === 'GET' || request.method === 'HEAD' || request.method === 'OPTIONS') return;
  if (isSameOrigin(request.headers, request.headers.get('host') ?? new URL(request.url).host)) return;
  throw new ApiError(
    'other-origin',
    'This came from another site, so nothing was changed. Open Tallyframe itself and do it there.',
  );
}

function answer(thrown: unknown, requestId: string): Response {
  if (thrown instanceof ApiError) return Response.json(thrown.toBody(), { status: thrown.status });
  log.error({ requestId, err: thrown }, 'a request failed');
  const fault = new ApiError(
    'failed',
    `The server met a fault of its own and changed nothing. Try again; if it stays, name request ${requestId}.`,
  );
  return Response.json(fault.toBody(), { status: fault.status });
}
