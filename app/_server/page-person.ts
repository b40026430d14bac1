import 'server-only';
import { cookies } from 'next/headers';
import { notFound, redirect } from 'next/navigation';
import { cache } from 'react';
import { may, type Act, type Person } from '@/lib/access/may';
import { sessionCookie } from './auth';
import { personOf } from './person';

/** Who looks at a page, read once a request. */
export const pagePerson = cache(async (): Promise<Person | null> => personOf((await cookies()).get(sessionCookie())?.value));

/**
 * Who looks at a page, and that they may. Signed out: to the sign-in page, and back afterwards. Not theirs to
 * see: there is no such page.
 *
 * @param address of the page, to come back to
 */
export async function requirePagePerson(act: Act, address: string): Promise<Person> {
  const person = await pagePerson();
  if (person === null) redirect(`/sign-in?next=${encodeURIComponent(address)}`);
  if (!may(person, act)) notFound();
  return person;
}
