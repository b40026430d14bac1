import { errorShape, type ErrorBody } from './error';

/** What a route answered instead of its result, as pages meet it. */
export class RequestError extends Error {
  constructor(
    readonly status: number,
    readonly body: ErrorBody['error'],
  ) {
    super(body.message);
    this.name = 'RequestError';
  }
}

interface Sent {
  readonly method?: 'GET' | 'POST' | 'PUT' | 'DELETE';
  /** Sent as JSON. */
  readonly json?: unknown;
  readonly body?: BodyInit;
  readonly signal?: AbortSignal;
}

/**
 * One call of the product's own API, from a page.
 *
 * @throws {RequestError} with the published shape, also where no answer came or it could not be read
 */
export async function request<T>(address: string, sent: Sent = {}): Promise<T> {
  let response: Response;
  try {
    response = await fetch(address, {
      method: sent.method ?? 'GET',
      headers: sent.json === undefined ? undefined : { 'content-type': 'application/json' },
      body: sent.json === undefined ? sent.body : JSON.stringify(sent.json),
      signal: sent.signal,
    });
  } catch (cause) {
    if (cause instanceof DOMException && cause.name === 'AbortError') throw cause;
    throw new RequestError(0, {
      code: 'failed',
      message: 'The server did not answer. What was saved is safe; check the connection and try again.',
    });
  }
  if (response.ok) return (await response.json()) as T;
  throw new RequestError(response.status, await readError(response));
}

async function readError(response: Response): Promise<ErrorBody['error']> {
  try {
    return errorShape.parse(await response.json()).error;
  } catch {
    return { code: 'failed', message: `The server answered ${response.status} and nothing that could be read. Try again.` };
  }
}
