import type { Metadata } from 'next';
import Link from 'next/link';
import { toCheck } from '@/app/_server/checking-detail';
import { requirePagePerson } from '@/app/_server/page-person';
import { RevisionMark } from '@/components/title-block/revision-mark';
import { Empty } from '@/components/ui/notice';
import { Sheet, Zone } from '@/components/ui/sheet';
import { pages } from '@/lib/api/addresses';

export const metadata: Metadata = { title: 'To check' };

/** The office's revisions that are with a checker. */
export default async function ToCheckPage() {
  const person = await requirePagePerson('read a batch', pages.toCheck);
  const revisions = await toCheck(person);
  return (
    <Sheet>
      <Zone title="To check" note={`${person.officeName}, the longest waiting first`} level={1}>
        {revisions.length === 0 ? (
          <Empty>
            <p>Nothing is with a checker. A revision that was run is sent to check from its sheet 9.</p>
          </Empty>
        ) : (
          <div className="tbl-wrap" role="region" tabIndex={0} aria-label="Revisions to check">
            <table className="tbl">
              <caption className="sr-only">Revisions to check</caption>
              <thead>
                <tr>
                  <th scope="col">Batch</th>
                  <th scope="col">Revision</th>
                  <th scope="col">Project</th>
                  <th scope="col" className="num">
                    Frames
                  </th>
                  <th scope="col">Sent by</th>
                  <th scope="col">Sent</th>
                  <th scope="col" className="num">
                    Seen
                  </th>
                  <th scope="col" className="num">
                    Open queries
                  </th>
                  <th scope="col" className="num">
                    Left to accept
                  </th>
                  <th scope="col">For you</th>
                  <th scope="col">Note</th>
                </tr>
              </thead>
              <tbody>
                {revisions.map((one) => (
                  <tr key={`${one.batch} ${one.letter}`}>
                    <th scope="row">
                      <Link href={pages.checking(one.batch, one.letter)}>{one.batchName}</Link>
                    </th>
                    <td>
                      <RevisionMark letter={one.letter} />
                    </td>
                    <td>{one.project}</td>
                    <td className="num">{one.frames.toLocaleString('en-GB')}</td>
                    <td>{one.sentBy}</td>
                    <td>{one.sentWhen}</td>
                    <td className="num">
                      {one.progress.seen.toLocaleString('en-GB')} of {one.progress.listed.toLocaleString('en-GB')}
                    </td>
                    <td className="num">{one.progress.openQueries}</td>
                    <td className="num">{(one.progress.toAccept - one.progress.accepted).toLocaleString('en-GB')}</td>
                    <td className="tc-wordy">{one.whyNotCheck ?? 'you may check it'}</td>
                    <td className="tc-wordy">{one.note}</td>
                  </tr>
                ))}
              </tbody>
            </table>
          </div>
        )}
      </Zone>
    </Sheet>
  );
}
