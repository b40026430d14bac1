import Link from 'next/link';
import { day } from '@/app/_server/dates';
import { CheckMark } from '@/components/checking/check-mark';
import { db } from '@/db/client';
import { listCheckingActs } from '@/db/queries/checking';
import { listEarlierQueries, listQueries } from '@/db/queries/checking-queries';
import type { RevisionRecord } from '@/db/queries/revisions';
import { pages } from '@/lib/api/addresses';
import { isFrozen } from '@/lib/checking/checking-states';

/** What the checker left with a revision: returned with a note, open queries, queries of the one before. Nothing where there is none. */
export async function CheckingLine({ revision }: { readonly revision: RevisionRecord }) {
  const { office, id, batch, letter, state, sent } = revision;
  const open = sent === null ? [] : (await listQueries(db(), office, id)).filter(({ closed }) => closed === null);
  const earlier = isFrozen(state) ? [] : (await listEarlierQueries(db(), revision)).filter(({ closed }) => closed === null);
  const returned =
    state === 'returned' ? (await listCheckingActs(db(), office, id)).findLast(({ what }) => what === 'returned') : undefined;
  if (returned === undefined && open.length === 0 && earlier.length === 0) return null;
  return (
    <div className="ck-banner">
      {returned && (
        <p>
          <b>
            Returned by {returned.name}, {day(returned.at)}.
          </b>{' '}
          {returned.note}
        </p>
      )}
      {open.length > 0 && (
        <p>
          <CheckMark kind="queried" /> {counted(open.length, 'open query', 'open queries')}:{' '}
          {open.slice(0, 8).map((query, i) => (
            <span key={query.id}>
              {i > 0 && ', '}
              <Link href={pages.checking(batch, letter, query.frame + 1)}>{query.frameId}</Link>
            </span>
          ))}
          {open.length > 8 && ' …'}
        </p>
      )}
      {earlier.length > 0 && (
        <p>
          <CheckMark kind="queried" /> {counted(earlier.length, 'query', 'queries')} of earlier revisions open:{' '}
          {earlier.slice(0, 8).map((query, i) => (
            <span key={query.id}>
              {i > 0 && ', '}
              <Link href={pages.checking(batch, query.revision, query.frame + 1)}>
                {query.frameId} of {query.revision}
              </Link>
            </span>
          ))}
          {earlier.length > 8 && ' …'}
        </p>
      )}
    </div>
  );
}

const counted = (n: number, one: string, many: string): string => `${n.toLocaleString('en-GB')} ${n === 1 ? one : many}`;
