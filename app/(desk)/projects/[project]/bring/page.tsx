import type { Metadata } from 'next';
import { BringSheets } from '@/app/_client/bring-sheets';
import { requirePagePerson } from '@/app/_server/page-person';
import { pageThing } from '@/app/_server/page-thing';
import { requireProject } from '@/app/_server/things';
import { TitleBlock } from '@/components/title-block/title-block';
import { Sheet, Zone } from '@/components/ui/sheet';
import { api, pages } from '@/lib/api/addresses';

export const metadata: Metadata = { title: 'Bring sheets in' };

/** A new batch from files. */
export default async function BringPage({ params }: { readonly params: Promise<{ readonly project: string }> }) {
  const { project: asked } = await params;
  const person = await requirePagePerson('bring sheets in', `/projects/${asked}/bring`);
  const project = await pageThing(requireProject(person, asked));
  const name = project.number === null || project.number === '' ? project.name : `${project.number} ${project.name}`;
  return (
    <Sheet>
      <TitleBlock
        project={{ name, href: pages.project(project.id) }}
        batch={{ name: 'new' }}
        revision={null}
        state="not read yet"
        prepared={null}
        checked={null}
        issued={null}
        inputHash={null}
        sheet="bring in"
      />
      <Zone title="Bring sheets in" note="they become a new batch, revision A" level={1}>
        <BringSheets to={api.batches(project.id)} named />
      </Zone>
    </Sheet>
  );
}
