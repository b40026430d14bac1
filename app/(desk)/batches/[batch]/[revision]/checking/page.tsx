import type { Metadata } from 'next';
import { checkingDetail } from '@/app/_server/checking-detail';
import { checkedWords } from '@/app/_server/checked-words';
import { needResults, pageRevision, type RevisionParams } from '@/app/_server/page-revision';
import type { SearchParams } from '@/app/_server/search-params';
import { Cautions } from '@/components/ui/notice';
import { Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { findSummary } from '@/db/queries/summary';
import { may } from '@/lib/access/may';
import { frameNumberInput } from '@/lib/api/inputs';
import { whyNotMove } from '@/lib/checking/checking-states';
import { RevisionHead } from '../_head/revision-head';
import { stripFrames } from '../_head/strip-frames';
import { CheckingDesk } from './checking-desk';
import { CheckingRecord } from './checking-record';
import { SendToCheck } from './send-to-check';

export const metadata: Metadata = { title: 'Checking' };

interface CheckingPageProps {
  readonly params: Promise<RevisionParams>;
  readonly searchParams: Promise<SearchParams>;
}

/** Sheet 9: a revision with its checker. */
export default async function CheckingPage({ params, searchParams }: CheckingPageProps) {
  const { person, revision } = await pageRevision(params, 'checking');
  needResults(revision);
  const { batch, letter, state } = revision;
  const asked = frameNumberInput.safeParse((await searchParams).frame);
  const [detail, summary] = [await checkingDetail(person, revision), await findSummary(db(), person.office, revision.id)];
  if (summary === undefined) throw new Error(`Expected a summary of revision ${revision.id}`);
  const whyNotSend = whyNotMove(state, 'send');
  const maySend = may(person, 'send to check') && whyNotSend === null;
  const checkers = detail.checkers.filter((name) => name !== person.name);
  const send = maySend && (
    <Zone title={revision.sent === null ? 'Send to check' : 'Send to check again'} level={revision.sent === null ? 1 : 2}>
      <SendToCheck batch={batch} letter={letter} checkers={checkers} again={revision.sent !== null} />
    </Zone>
  );
  return (
    <Sheet>
      <RevisionHead revision={revision} sheet="checking" />
      {send}
      {revision.sent === null ? (
        !maySend && (
          <Zone title="Checking" level={1}>
            <p>
              {whyNotSend === null
                ? `Revision ${letter} has not been sent to check. Its analyst or the lead sends it.`
                : `Revision ${letter} has not been sent to check. ${whyNotSend}`}
            </p>
          </Zone>
        )
      ) : (
        <CheckingDesk
          // another state, another desk: what may be done is not what it was
          key={`${batch} ${letter} ${state}`}
          batch={batch}
          letter={letter}
          nearLimit={revision.settings?.nearLimit ?? 0.9}
          first={detail}
          strip={stripFrames(summary.cells)}
          asked={asked.success && asked.data <= revision.frames ? asked.data : null}
        />
      )}
      {revision.sent !== null && <CheckingRecord detail={detail} />}
      <Cautions {...checkedWords(revision)} />
    </Sheet>
  );
}
