import Link from 'next/link';
import type { ReactNode } from 'react';
import { aboutEntry, activityPage, detailOf, type ActivityInput } from '@/app/_server/activity';
import { day, time } from '@/app/_server/dates';
import { ButtonLink } from '@/components/ui/button';
import { Empty } from '@/components/ui/notice';
import { Sheet, Zone } from '@/components/ui/sheet';
import type { ActivityListed, listActivityChoices } from '@/db/queries/activity';
import { pages } from '@/lib/api/addresses';
import { ActivityFilter } from './activity-filter';

interface ActivitySheetProps {
  /** Whose activity: "Saltings sheds". */
  readonly of: string;
  readonly back: ReactNode;
  /** The page's own address. */
  readonly address: string;
  readonly exported: (search: string) => string;
  readonly chosen: ActivityInput;
  readonly choices: Awaited<ReturnType<typeof listActivityChoices>>;
  readonly entries: readonly ActivityListed[];
}

/** Who did what, the newest first, with filters that stand in the address. */
export function ActivitySheet({ of, back, address, exported, chosen, choices, entries }: ActivitySheetProps) {
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
        title={`Activity of ${of}`}
        level={1}
        note={<>the newest first; entries are only ever added. {back}</>}
        aside={
          <ButtonLink href={exported(search({}))} download>
            Download as CSV
          </ButtonLink>
        }
      >
        <ActivityFilter action={address} chosen={chosen} people={choices.people} whats={choices.whats} />
        {entries.length === 0 ? (
          <Empty>
            <p>Nothing that fits was done.</p>
          </Empty>
        ) : (
          <ActivityTable entries={entries} />
        )}
        <p className="mt-3 flex gap-4">
          {chosen.before !== undefined && (
            <Link className="link" href={`${address}${search({})}`}>
              The newest
            </Link>
          )}
          {last !== undefined && (
            <Link className="link" href={`${address}${search({ before: last })}`}>
              Older ones
            </Link>
          )}
        </p>
      </Zone>
    </Sheet>
  );
}

function ActivityTable({ entries }: { readonly entries: readonly ActivityListed[] }) {
  return (
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
  );
}
