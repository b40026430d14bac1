import type { Metadata } from 'next';
import Link from 'next/link';
import { day } from '@/app/_server/dates';
import { requirePagePerson } from '@/app/_server/page-person';
import { standing } from '@/components/issues/issue-data';
import { Cautions, Empty } from '@/components/ui/notice';
import { Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listIssuesFor } from '@/db/queries/issues';
import { listProjectsOf } from '@/db/queries/projects';
import { pages } from '@/lib/api/addresses';

export const metadata: Metadata = { title: 'Issued to you' };

/** A client's first page: what was issued to them, the newest first. */
export default async function IssuedPage() {
  const person = await requirePagePerson('read what was issued', pages.issued);
  const issues = await listIssuesFor(db(), person.office, person.id);
  if (issues.length === 0) return <Nothing office={person.officeName} projects={await namesOf(person.office, person.id)} />;
  return (
    <Sheet>
      <Zone title="Issued to you" note={`by ${person.officeName}, the newest first`} level={1} flush>
        <div className="tbl-wrap" tabIndex={0} role="region" aria-label="Issued to you">
          <table className="tbl issue-list">
            <caption className="sr-only">What was issued to you</caption>
            <thead>
              <tr>
                <th scope="col">Issue</th>
                <th scope="col">Batch</th>
                <th scope="col" className="issue-wide">
                  Project
                </th>
                <th scope="col">Issued</th>
                <th scope="col">State</th>
                <th scope="col" className="issue-wide">
                  Your questions
                </th>
              </tr>
            </thead>
            <tbody>
              {issues.map(({ id, number, batch, project, revision, issuedAt, state, questions }) => (
                <tr key={id}>
                  <th scope="row">
                    <Link href={pages.issuedOne(id)}>{number}</Link>
                  </th>
                  <td className="issue-wraps">
                    {batch.name}, revision {revision.letter}
                  </td>
                  <td className="issue-wide">{project.number ? `${project.number} ${project.name}` : project.name}</td>
                  <td>{day(issuedAt)}</td>
                  <td className={`issue-wraps ${state === 'withdrawn' ? 'is-over' : ''}`}>{standing[state]}</td>
                  <td className="issue-wide">{questions > 0 ? questions : <span className="text-ink3">none</span>}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      </Zone>
      <Cautions />
    </Sheet>
  );
}

async function namesOf(office: number, person: number): Promise<string> {
  return (await listProjectsOf(db(), office, person)).map((one) => one.name).join(', ');
}

function Nothing({ office, projects }: { readonly office: string; readonly projects: string }) {
  return (
    <Sheet>
      <Zone title="Nothing has been issued to you yet" level={1}>
        <Empty>
          <p>
            {projects === ''
              ? `${office} has not assigned you to a project yet. Ask their lead.`
              : `You are assigned to ${projects}. What ${office} issues there appears here, with its result sheets to download.`}
          </p>
        </Empty>
      </Zone>
      <Cautions />
    </Sheet>
  );
}
