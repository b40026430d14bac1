/** Signing in and out through next-auth's own routes, without its client library. */
async function csrfToken(): Promise<string> {
  const response = await fetch('/api/auth/csrf');
  const { csrfToken: token } = (await response.json()) as { csrfToken: string };
  return token;
}

async function post(path: string, fields: Record<string, string>): Promise<Response> {
  const body = new URLSearchParams({ ...fields, csrfToken: await csrfToken(), json: 'true' });
  return fetch(`/api/auth/${path}`, { method: 'POST', body });
}

export type SignedIn = 'yes' | 'no' | 'wait' | 'no answer';

/** 'no' for a wrong password and for an unknown account alike; 'wait' after too many attempts. */
export async function signIn(email: string, password: string): Promise<SignedIn> {
  try {
    const response = await post('callback/credentials', { email, password });
    if (response.ok) return 'yes';
    const { url } = (await response.json()) as { url?: string };
    return url?.includes('error=wait') ? 'wait' : 'no';
  } catch {
    return 'no answer';
  }
}

export async function signOut(): Promise<void> {
  await post('signout', {});
}
