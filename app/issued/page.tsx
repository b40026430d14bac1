import type { Metadata } from 'next';
import { DeskBar } from '@/app/_client/desk-bar';
import { requirePagePerson } from '@/app/_server/page-person';
import { Cautions, Empty } from '@/components/ui/notice';
import { Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listProjectsOf } from '@/db/queries/projects';

export const metadata: Metadata = { title: 'Issued to you' };

/** A client's own page: what was issued to their projects. Issuing comes later, so there is nothing in it yet. */
export default async function IssuedPage() {
  const person = await requirePagePerson('read what was issued', '/issued');
  const projects = await listProjectsOf(db(), person.office, person.id);
  const names = projects.map((one) => one.name).join(', ');
  return (
    <>
      <DeskBar office={person.officeName} person={person.name} role={person.role} home="/issued" words={[]} />
      <main id="content">
        <Sheet>
          <Zone title="Nothing has been issued to you yet" level={1}>
            <Empty>
              <p>
                {names === ''
                  ? `${person.officeName} has not assigned you to a project yet. Ask their lead.`
                  : `You are assigned to ${names}. What ${person.officeName} issues there appears here, with its result sheets to download.`}
              </p>
            </Empty>
          </Zone>
          <Cautions />
        </Sheet>
      </main>
    </>
  );
}
