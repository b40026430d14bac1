import type { ReactNode } from 'react';
import { DeskBar } from '@/app/_client/desk-bar';
import { QueryProvider } from '@/app/_client/query-provider';
import { pagePerson } from '@/app/_server/page-person';
import { homeOf } from '@/lib/access/may';
import { pages } from '@/lib/api/addresses';

/** The bar over a client's pages. Whether a page may be seen is settled by the page itself. */
export default async function IssuedLayout({ children }: { readonly children: ReactNode }) {
  const person = await pagePerson();
  if (person === null) return children;
  const words = person.role === 'client' ? [{ label: 'Issued', href: pages.issued, within: [pages.issued] }] : [];
  return (
    <QueryProvider>
      <DeskBar office={person.officeName} person={person.name} role={person.role} home={homeOf(person.role)} words={words} />
      <main id="content">{children}</main>
    </QueryProvider>
  );
}
