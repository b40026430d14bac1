import type { Metadata } from 'next';
import Link from 'next/link';
import { dayTime } from '@/app/_server/dates';
import { requirePagePerson } from '@/app/_server/page-person';
import { pageThing } from '@/app/_server/page-thing';
import { requireProject } from '@/app/_server/things';
import { ButtonLink } from '@/components/ui/button';
import { Empty } from '@/components/ui/notice';
import { Columns, Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listBatches } from '@/db/queries/batches';
import { listPeople } from '@/db/queries/people';
import { listAssigned } from '@/db/queries/projects';
import { may } from '@/lib/access/may';
import { pages } from '@/lib/api/addresses';
import { AssignPeople } from './assign-people';
import { BatchList } from './batch-list';

export const metadata: Metadata = { title: 'Project' };

export default async function ProjectPage({ params }: { readonly params: Promise<{ readonly project: string }> }) {
  const { project: asked } = await params;
  const person = await requirePagePerson('read projects', `/projects/${asked}`);
  const project = await pageThing(requireProject(person, asked));
  const batches = await listBatches(db(), person.office, project.id);
  const mayBring = may(person, 'bring sheets in');
  const name = project.number === null || project.number === '' ? project.name : `${project.number} ${project.name}`;
  const list = (
    <Zone
      title={`Batches of ${name}`}
      level={1}
      note={
        <>
          the newest first, each by its latest revision.{' '}
          <Link className="link" href={pages.activity(project.id)}>
            Activity
          </Link>
        </>
      }
      aside={
        <>
          <Link href={pages.issues(project.id)}>Issues</Link>
          {mayBring && (
            <ButtonLink href={pages.bring(project.id)} look="filled">
              Bring sheets in
            </ButtonLink>
          )}
        </>
      }
    >
      {batches.length === 0 ? (
        <Empty>
          <p>
            This project has no batch yet.{' '}
            {mayBring ? (
              <Link href={pages.bring(project.id)}>Bring the first sheets in</Link>
            ) : (
              'An analyst brings the first sheets in'
            )}
            .
          </p>
        </Empty>
      ) : (
        <BatchList
          batches={batches.map((batch) => ({ ...batch, changed: dayTime(batch.latest?.changedAt ?? batch.createdAt) }))}
        />
      )}
    </Zone>
  );
  return (
    <Sheet>
      {may(person, 'assign people') ? (
        <Columns
          main={list}
          side={
            <Zone title="People" note="clients see what is issued to the projects they are assigned to">
              <AssignPeople
                project={project.id}
                people={(await listPeople(db(), person.office)).map(({ id, name, role }) => ({ id, name, role }))}
                assigned={(await listAssigned(db(), person.office, project.id)).map((one) => one.id)}
              />
            </Zone>
          }
        />
      ) : (
        list
      )}
    </Sheet>
  );
}
