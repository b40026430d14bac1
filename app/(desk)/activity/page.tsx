import type { Metadata } from 'next';
import Link from 'next/link';
import { activityPage, askedActivity } from '@/app/_server/activity';
import { requirePagePerson } from '@/app/_server/page-person';
import { db } from '@/db/client';
import { listActivity, listActivityChoices } from '@/db/queries/activity';
import { api, pages } from '@/lib/api/addresses';
import { activityInput } from '@/lib/api/people-inputs';
import { ActivitySheet } from './activity-sheet';

export const metadata: Metadata = { title: 'Activity' };

interface ActivityPageProps {
  readonly searchParams: Promise<Readonly<Record<string, string | string[] | undefined>>>;
}

/** Who did what in the office: projects, and people, letters and settings besides. */
export default async function OfficeActivityPage({ searchParams }: ActivityPageProps) {
  const lead = await requirePagePerson('read the office’s activity', pages.officeActivity);
  const read = activityInput.safeParse(await searchParams);
  const chosen = read.success ? read.data : {};
  return (
    <ActivitySheet
      of={lead.officeName}
      back={
        <Link className="link" href={pages.people}>
          People
        </Link>
      }
      address={pages.officeActivity}
      exported={api.officeActivityExport}
      chosen={chosen}
      choices={await listActivityChoices(db(), lead.office)}
      entries={await listActivity(db(), lead.office, { ...askedActivity(undefined, chosen), limit: activityPage })}
    />
  );
}
