import type { Metadata } from 'next';
import Link from 'next/link';
import { day } from '@/app/_server/dates';
import { requirePagePerson } from '@/app/_server/page-person';
import { Columns, Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listInvitations } from '@/db/queries/invitations';
import { listLetters } from '@/db/queries/outbox';
import { listProjects } from '@/db/queries/projects';
import { listStanding } from '@/db/queries/standing';
import { pages } from '@/lib/api/addresses';
import { AddPerson } from './add-person';
import { InvitePerson } from './invite-person';
import { OpenInvitations } from './open-invitations';

export const metadata: Metadata = { title: 'People' };

export default async function PeoplePage() {
  const lead = await requirePagePerson('read people', '/people');
  const people = await listStanding(db(), lead.office);
  const invitations = await listInvitations(db(), lead.office);
  const projects = await listProjects(db(), lead.office);
  const failed = (await listLetters(db(), lead.office, { state: 'failed' })).length;
  const letters = (
    <span className="flex gap-4">
      <Link className="link" href={pages.officeActivity}>
        Activity
      </Link>
      <Link className="link" href={pages.letters}>
        {failed === 0 ? 'Letters sent' : failed === 1 ? '1 letter failed' : `${failed} letters failed`}
      </Link>
    </span>
  );
  const list = (
    <>
      <Zone title="People" note={lead.officeName} level={1} aside={letters}>
        <div className="tbl-wrap">
          <table className="tbl">
            <caption className="sr-only">People of the office</caption>
            <thead>
              <tr>
                <th scope="col">Name</th>
                <th scope="col">E-mail</th>
                <th scope="col">Role</th>
                <th scope="col" className="num">
                  Projects
                </th>
                <th scope="col" className="num">
                  Batches
                </th>
                <th scope="col">Since</th>
                <th scope="col">Standing</th>
              </tr>
            </thead>
            <tbody>
              {people.map((one) => (
                <tr key={one.id}>
                  <th scope="row">
                    <Link href={pages.person(one.id)}>{one.name}</Link>
                  </th>
                  <td>{one.email}</td>
                  <td>{one.role}</td>
                  <td className="num">{one.role === 'client' ? one.projects.length : 'all'}</td>
                  <td className="num">{one.batches === 0 ? '' : one.batches.toLocaleString('en-GB')}</td>
                  <td>{day(one.since)}</td>
                  <td>{one.disabledAt === null ? 'may sign in' : `disabled ${day(one.disabledAt)}`}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      </Zone>
      {invitations.length > 0 && (
        <Zone title="Invited" note="a link works once, for seven days">
          <OpenInvitations
            invitations={invitations.map(({ id, email, role, invitedBy, createdAt, expiresAt }) => ({
              id,
              email,
              role,
              by: invitedBy,
              sent: day(createdAt),
              until: new Date(expiresAt) > new Date() ? `until ${day(expiresAt)}` : 'expired',
            }))}
          />
        </Zone>
      )}
    </>
  );
  return (
    <Sheet>
      <Columns
        main={list}
        side={
          <>
            <Zone title="Invite someone">
              <InvitePerson projects={projects.map(({ id, name }) => ({ id, name }))} />
            </Zone>
            <Zone>
              <details>
                <summary>Add someone without e-mail</summary>
                <AddPerson />
              </details>
            </Zone>
          </>
        }
      />
    </Sheet>
  );
}
