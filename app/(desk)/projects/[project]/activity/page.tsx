import type { Metadata } from 'next';
import Link from 'next/link';
import { aboutEntry, activityPage, askedActivity, detailOf } from '@/app/_server/activity';
import { day, time } from '@/app/_server/dates';
import { requirePagePerson } from '@/app/_server/page-person';
import { pageThing } from '@/app/_server/page-thing';
import { requireProject } from '@/app/_server/things';
import { ButtonLink } from '@/components/ui/button';
import { Empty } from '@/components/ui/notice';
import { Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listActivity, listActivityChoices } from '@/db/queries/activity';
import { api, pages } from '@/lib/api/addresses';
import { activityInput } from '@/lib/api/people-inputs';
import { ActivityFilter } from './activity-filter';

export const metadata: Metadata = { title: 'Activity' };

interface ActivityPageProps {
  readonly params: Promise<{ readonly project: string }>;
  readonly searchParams: Promise<Readonly<Record<string, string | string[] | undefined>>>;
}

/** Who did what in a project, the newest first. Entries are only ever added. */
export default async function ActivityPage({ params, searchParams }: ActivityPageProps) {
  const { project: asked } = await params;
  const reader = await requirePagePerson('read activity', `/projects/${asked}/activity`);
  const project = await pageThing(requireProject(reader, asked));
  const read = activityInput.safeParse(await searchParams);
  const chosen = read.success ? read.data : {};
  const choices = await listActivityChoices(db(), reader.office, project.id);
  const wanted = askedActivity(project.id, chosen);
  const entries = await listActivity(db(), reader.office, { ...wanted, limit: activityPage });
  const search = (more: { readonly before?: number }): string => {
    const params = new URLSearchParams();
    for (const [key, value] of Object.entries({ ...chosen, before: undefined, ...more })) {
      if (value !== undefined) params.set(key, String(value));
    }
    return params.size === 0 ? '' : `?${params.toString()}`;
  };
  const last = entries.length < activityPage ? undefined : entries.at(-1)?.id;
  return (
    <Sheet>
      <Zone
        title={`Activity of ${project.name}`}
        level={1}
        note={
          <>
            the newest first; entries are only ever added.{' '}
            <Link className="link" href={pages.project(project.id)}>
              Batches
            </Link>
          </>
        }
        aside={
          <ButtonLink href={api.activityExport(project.id, search({}))} download>
            Download as CSV
          </ButtonLink>
        }
      >
        <ActivityFilter action={pages.activity(project.id)} chosen={chosen} people={choices.people} whats={choices.whats} />
        {entries.length === 0 ? (
          <Empty>
            <p>Nothing that fits was done.</p>
          </Empty>
        ) : (
          <div className="tbl-wrap">
            <table className="tbl">
              <caption className="sr-only">Activity</caption>
              <thead>
                <tr>
                  <th scope="col">When</th>
                  <th scope="col">Who</th>
                  <th scope="col">What</th>
                  <th scope="col">About</th>
                  <th scope="col">Detail</th>
                </tr>
              </thead>
              <tbody>
                {entries.map((entry) => (
                  <tr key={entry.id}>
                    <td>
                      {day(entry.at)}, {time(entry.at)}
                    </td>
                    <td>{entry.person ?? 'the service'}</td>
                    <th scope="row">{entry.what}</th>
                    <td>
                      {entry.batch !== null && entry.letter !== null ? (
                        <Link href={pages.revision(entry.batch, entry.letter)}>{aboutEntry(entry)}</Link>
                      ) : (
                        aboutEntry(entry)
                      )}
                    </td>
                    <td>{detailOf(entry)}</td>
                  </tr>
                ))}
              </tbody>
            </table>
          </div>
        )}
        <p className="mt-3 flex gap-4">
          {chosen.before !== undefined && (
            <Link className="link" href={`${pages.activity(project.id)}${search({})}`}>
              The newest
            </Link>
          )}
          {last !== undefined && (
            <Link className="link" href={`${pages.activity(project.id)}${search({ before: last })}`}>
              Older ones
            </Link>
          )}
        </p>
      </Zone>
    </Sheet>
  );
}
