import type { ReactNode } from 'react';
import { DeskBar } from '@/app/_client/desk-bar';
import { QueryProvider } from '@/app/_client/query-provider';
import { pagePerson } from '@/app/_server/page-person';
import { db } from '@/db/client';
import { countRevisionsToCheck } from '@/db/queries/checking';
import { may } from '@/lib/access/may';

/** The bar over every page of the office. Whether the page may be seen is settled by the page itself. */
export default async function DeskLayout({ children }: { readonly children: ReactNode }) {
  const person = await pagePerson();
  if (person === null) return children;
  const words = [
    ...(may(person, 'read projects') ? [{ label: 'Projects', href: '/projects', within: ['/projects', '/batches'] }] : []),
    ...(may(person, 'read a batch')
      ? [{ label: 'To check', href: '/to-check', within: ['/to-check'], count: await countRevisionsToCheck(db(), person.office) }]
      : []),
    ...(may(person, 'read issues') ? [{ label: 'Issues', href: '/issues', within: ['/issues'] }] : []),
    ...(may(person, 'read sections') ? [{ label: 'Sections', href: '/sections', within: ['/sections'] }] : []),
    ...(may(person, 'read combination sets')
      ? [{ label: 'Combinations', href: '/combinations', within: ['/combinations'] }]
      : []),
    ...(may(person, 'read limits') ? [{ label: 'Limits', href: '/limits', within: ['/limits'] }] : []),
    ...(may(person, 'read people') ? [{ label: 'People', href: '/people', within: ['/people', '/letters', '/activity'] }] : []),
    ...(may(person, 'read what was issued') ? [{ label: 'Issued', href: '/issued', within: ['/issued'] }] : []),
  ];
  return (
    <QueryProvider>
      <DeskBar office={person.officeName} person={person.name} role={person.role} home="/" words={words} />
      <main id="content">{children}</main>
    </QueryProvider>
  );
}
