import 'server-only';
import { notFound } from 'next/navigation';
import type { Act, Person } from '@/lib/access/may';
import { ownPath } from '@/lib/api/own-inputs';
import type { OwnKind } from '@/lib/intake/own/own-thing';
import { requirePagePerson } from './page-person';

/** Who looks at a page of the office's own sections or grades, and which of the two. */
export async function pageOwnKind(path: string, act: Act, rest: string): Promise<{ person: Person; kind: OwnKind }> {
  const person = await requirePagePerson(act, `/sections/own/${path}/${rest}`);
  const kind = ownPath.safeParse(path);
  if (!kind.success) notFound();
  return { person, kind: kind.data };
}
