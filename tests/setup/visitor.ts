/** Someone with a browser's manners but no browser: keeps cookies, says where a write comes from. */
import type { PersonRole } from '@/lib/access/may';
import { emailOf, testPassword, type OfficeKey } from './people';

let addresses = 0;

export class Visitor {
  private readonly cookies = new Map<string, string>();
  /** Each has an address of its own, so that the limit on attempts of one isn't another's. */
  private readonly address = `10.0.${Math.floor(++addresses / 250)}.${addresses % 250}`;

  constructor(readonly url: string) {}

  async fetch(path: string, init: RequestInit = {}): Promise<Response> {
    const headers = new Headers(init.headers);
    headers.set('cookie', [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; '));
    if (!headers.has('x-forwarded-for')) headers.set('x-forwarded-for', this.address);
    if (!headers.has('origin') && init.method !== undefined && init.method !== 'GET') headers.set('origin', this.url);
    const ask = (): Promise<Response> => fetch(`${this.url}${path}`, { redirect: 'manual', ...init, headers });
    // a kept connection that the server closes just then is opened anew, as browsers do: for what only asks
    const asksOnly = init.method === undefined || init.method === 'GET';
    const response = await ask().catch((error: unknown) => {
      if (asksOnly && isClosedConnection(error)) return ask();
      throw error;
    });
    for (const cookie of response.headers.getSetCookie()) {
      const [pair] = cookie.split(';');
      const at = pair?.indexOf('=') ?? -1;
      if (pair && at > 0) this.cookies.set(pair.slice(0, at), pair.slice(at + 1));
    }
    return response;
  }

  async json<T>(path: string, init: RequestInit = {}): Promise<T> {
    const response = await this.fetch(path, init);
    const text = await response.text();
    if (!response.ok) throw new Error(`${init.method ?? 'GET'} ${path}: ${response.status} ${text.slice(0, 300)}`);
    return JSON.parse(text) as T;
  }

  send(path: string, body: unknown, method: 'POST' | 'PUT' = 'POST'): Promise<Response> {
    return this.fetch(path, { method, body: JSON.stringify(body), headers: { 'content-type': 'application/json' } });
  }

  /** The answer of the sign-in route. */
  async trySignIn(email: string, password: string): Promise<Response> {
    const { csrfToken } = await this.json<{ csrfToken: string }>('/api/auth/csrf');
    const body = new URLSearchParams({ email, password, csrfToken, json: 'true' });
    return this.fetch('/api/auth/callback/credentials', { method: 'POST', body });
  }
}

const isClosedConnection = (error: unknown): boolean =>
  error instanceof TypeError && (error.cause as { code?: unknown } | undefined)?.code === 'UND_ERR_SOCKET';

/** A visitor signed in as someone of an office. */
export async function signedIn(url: string, office: OfficeKey, role: PersonRole): Promise<Visitor> {
  const visitor = new Visitor(url);
  const answer = await visitor.trySignIn(emailOf(office, role), testPassword);
  if (!answer.ok) throw new Error(`Sign-in as ${role} of ${office} was answered ${answer.status}: ${await answer.text()}`);
  return visitor;
}
