import type { Metadata } from 'next';
import Link from 'next/link';
import { day } from '@/app/_server/dates';
import { requirePagePerson } from '@/app/_server/page-person';
import { Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listCombinationSets } from '@/db/queries/combination-sets';
import { may } from '@/lib/access/may';
import { pages } from '@/lib/api/addresses';
import { EditSet } from './edit-set';

export const metadata: Metadata = { title: 'Combination sets' };

/** The office's own combination sets: everyone reads them, the lead makes them. */
export default async function CombinationSetsPage() {
  const person = await requirePagePerson('read combination sets', pages.combinationSets);
  const sets = await listCombinationSets(db(), person.office);
  return (
    <Sheet>
      <Zone title="Combination sets" note={person.officeName} level={1}>
        <p className="max-w-3xl">
          Chosen on a revision’s settings, a set makes the combinations of its load cases and writes them into the next revision’s
          sheet. What was made by a version stays as it is, whatever becomes of the set.
        </p>
        {sets.length === 0 ? (
          <p>The office has no combination sets of its own yet.</p>
        ) : (
          <div className="tbl-wrap" role="region" tabIndex={0} aria-label="Combination sets of the office">
            <table className="tbl">
              <caption className="sr-only">Combination sets of the office</caption>
              <thead>
                <tr>
                  <th scope="col">Set</th>
                  <th scope="col" className="num">
                    Version
                  </th>
                  <th scope="col">Begun from</th>
                  <th scope="col" className="num">
                    Rules
                  </th>
                  <th scope="col" className="num">
                    Used by revisions
                  </th>
                  <th scope="col">Kept</th>
                </tr>
              </thead>
              <tbody>
                {sets.map((set) => (
                  <tr key={set.set}>
                    <th scope="row">
                      <Link href={pages.combinationSet(set.set)}>{set.name}</Link>
                      {set.withdrawnAt !== null && ', out of use'}
                    </th>
                    <td className="num">{set.version}</td>
                    <td>{set.basedOn ?? '–'}</td>
                    <td className="num">{set.rules.length}</td>
                    <td className="num">{set.used}</td>
                    <td>
                      {day(set.at)}, {set.person}
                    </td>
                  </tr>
                ))}
              </tbody>
            </table>
          </div>
        )}
      </Zone>
      {may(person, 'change combination sets') && (
        <Zone title="Make a set">
          <EditSet from={null} />
        </Zone>
      )}
    </Sheet>
  );
}
