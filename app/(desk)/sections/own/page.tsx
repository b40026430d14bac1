import type { Metadata } from 'next';
import Link from 'next/link';
import { requirePagePerson } from '@/app/_server/page-person';
import { ButtonLink } from '@/components/ui/button';
import { Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listOwnParts } from '@/db/queries/own-parts';
import { may } from '@/lib/access/may';
import { pages } from '@/lib/api/addresses';
import type { OwnKind } from '@/lib/intake/own/own-thing';
import { GradeTable, OwnSectionTable } from './_own/own-tables';

export const metadata: Metadata = { title: 'The office’s own sections and grades' };

/** The office's own sections and steel grades: everyone reads them, the lead edits them. */
export default async function OwnPage() {
  const person = await requirePagePerson('read sections', pages.own);
  const [sections, grades] = await Promise.all([
    listOwnParts(db(), person.office, 'section'),
    listOwnParts(db(), person.office, 'material'),
  ]);
  const acts = (kind: OwnKind, word: string) =>
    may(person, 'change sections') && (
      <span className="own-acts">
        <ButtonLink href={pages.ownNew(kind)}>New {word}</ButtonLink>
        <ButtonLink href={pages.ownImport(kind)}>Bring a table in</ButtonLink>
      </span>
    );
  return (
    <Sheet>
      <Zone title="The office’s own sections" level={1} note={person.officeName} aside={acts('section', 'section')}>
        <p>
          A batch takes them where its sheets name them and say nothing else: a row of its own Sections comes first. What was read
          with a version keeps that version.{' '}
          <Link className="link" href={pages.sections}>
            Standard ranges
          </Link>
        </p>
        <OwnSectionTable parts={sections} />
      </Zone>
      <Zone title="The office’s own steel grades" aside={acts('material', 'grade')}>
        <GradeTable parts={grades} />
      </Zone>
    </Sheet>
  );
}
