import type { Metadata } from 'next';
import Link from 'next/link';
import { ActivitySheet } from '@/app/(desk)/activity/activity-sheet';
import { activityPage, askedActivity } from '@/app/_server/activity';
import { requirePagePerson } from '@/app/_server/page-person';
import { pageThing } from '@/app/_server/page-thing';
import { requireProject } from '@/app/_server/things';
import { db } from '@/db/client';
import { listActivity, listActivityChoices } from '@/db/queries/activity';
import { api, pages } from '@/lib/api/addresses';
import { activityInput } from '@/lib/api/people-inputs';

export const metadata: Metadata = { title: 'Activity' };

interface ActivityPageProps {
  readonly params: Promise<{ readonly project: string }>;
  readonly searchParams: Promise<Readonly<Record<string, string | string[] | undefined>>>;
}

/** Who did what in a project. */
export default async function ProjectActivityPage({ params, searchParams }: ActivityPageProps) {
  const { project: asked } = await params;
  const reader = await requirePagePerson('read activity', `/projects/${asked}/activity`);
  const { id, name } = await pageThing(requireProject(reader, asked));
  const read = activityInput.safeParse(await searchParams);
  const chosen = read.success ? read.data : {};
  return (
    <ActivitySheet
      of={name}
      back={
        <Link className="link" href={pages.project(id)}>
          Batches
        </Link>
      }
      address={pages.activity(id)}
      exported={(search) => api.activityExport(id, search)}
      chosen={chosen}
      choices={await listActivityChoices(db(), reader.office, id)}
      entries={await listActivity(db(), reader.office, { ...askedActivity(id, chosen), limit: activityPage })}
    />
  );
}
