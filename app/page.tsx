import { redirect } from 'next/navigation';
import { homeOf } from '@/lib/access/may';
import { pagePerson } from './_server/page-person';

/** Goes on to where the person's work is. */
export default async function Start() {
  const person = await pagePerson();
  redirect(person === null ? '/sign-in' : homeOf(person.role));
}
