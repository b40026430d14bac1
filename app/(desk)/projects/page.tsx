import type { Metadata } from 'next';
import Link from 'next/link';
import { dayTime } from '@/app/_server/dates';
import { requirePagePerson } from '@/app/_server/page-person';
import { Empty } from '@/components/ui/notice';
import { Columns, Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listProjects } from '@/db/queries/projects';
import { may } from '@/lib/access/may';
import { pages } from '@/lib/api/addresses';
import { AddProject } from './add-project';

export const metadata: Metadata = { title: 'Projects' };

export default async function ProjectsPage() {
  const person = await requirePagePerson('read projects', '/projects');
  const projects = await listProjects(db(), person.office);
  const list = (
    <Zone title="Projects" note={`${person.officeName}, the last changed first`} level={1}>
      {projects.length === 0 ? (
        <Empty>
          <p>
            There is no project yet.{' '}
            {may(person, 'add a project') ? 'Add the first one.' : 'The lead or an analyst adds the first one.'}
          </p>
        </Empty>
      ) : (
        <div className="tbl-wrap">
          <table className="tbl">
            <caption className="sr-only">Projects</caption>
            <thead>
              <tr>
                <th scope="col">Number</th>
                <th scope="col">Project</th>
                <th scope="col" className="num">
                  Batches
                </th>
                <th scope="col">Last changed</th>
              </tr>
            </thead>
            <tbody>
              {projects.map((project) => (
                <tr key={project.id}>
                  <td>{project.number ?? ''}</td>
                  <th scope="row">
                    <Link href={pages.project(project.id)}>{project.name}</Link>
                  </th>
                  <td className="num">{project.batches}</td>
                  <td>{dayTime(project.changedAt)}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
    </Zone>
  );
  return (
    <Sheet>
      {may(person, 'add a project') ? (
        <Columns
          main={list}
          side={
            <Zone title="Add a project">
              <AddProject />
            </Zone>
          }
        />
      ) : (
        list
      )}
    </Sheet>
  );
}
