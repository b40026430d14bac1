import type { Metadata } from 'next';
import { requirePagePerson } from '@/app/_server/page-person';
import { LimitTable } from '@/components/limits/limit-table';
import { Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listOfficeLimits } from '@/db/queries/office-limits';
import { may } from '@/lib/access/may';
import { EditLimits } from './edit-limits';

export const metadata: Metadata = { title: 'Limits' };

/** The office's own limits on movement: everyone reads them, the lead edits them. */
export default async function LimitsPage() {
  const person = await requirePagePerson('read limits', '/limits');
  const limits = await listOfficeLimits(db(), person.office);
  return (
    <Sheet>
      <Zone title="Limits on movement" note={person.officeName} level={1}>
        <p>
          Used where the sheets of a batch give none: a row of Limits or a ratio in Setup comes first. What a revision was read
          with stays with it.
        </p>
        {may(person, 'change limits') ? <EditLimits limits={limits} /> : <LimitTable limits={limits} />}
      </Zone>
    </Sheet>
  );
}
