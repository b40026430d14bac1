import type { Metadata } from 'next';
import { day } from '@/app/_server/dates';
import { requirePagePerson } from '@/app/_server/page-person';
import { Columns, Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listPeople } from '@/db/queries/people';
import { AddPerson } from './add-person';

export const metadata: Metadata = { title: 'People' };

export default async function PeoplePage() {
  const lead = await requirePagePerson('read people', '/people');
  const people = await listPeople(db(), lead.office);
  const list = (
    <Zone title="People" note={lead.officeName} level={1}>
      <div className="tbl-wrap">
        <table className="tbl">
          <caption className="sr-only">People of the office</caption>
          <thead>
            <tr>
              <th scope="col">Name</th>
              <th scope="col">E-mail</th>
              <th scope="col">Role</th>
              <th scope="col">Since</th>
            </tr>
          </thead>
          <tbody>
            {people.map((one) => (
              <tr key={one.id}>
                <th scope="row">{one.name}</th>
                <td>{one.email}</td>
                <td>{one.role}</td>
                <td>{day(one.since)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </Zone>
  );
  return (
    <Sheet>
      <Columns
        main={list}
        side={
          <Zone title="Add a person">
            <AddPerson />
          </Zone>
        }
      />
    </Sheet>
  );
}
