'use client';
import { CheckMark } from '@/components/checking/check-mark';
import { QueryThread } from '@/components/checking/query-thread';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Zone } from '@/components/ui/sheet';
import { AcceptChecks } from './accept-checks';
import { OwnValues } from './own-values';
import { RaiseQuery } from './raise-query';
import type { FrameCheckingActs } from './use-frame-checking';

interface FramePanelProps {
  readonly acts: FrameCheckingActs;
  /** On the checker's list: a key marks it and goes on. */
  readonly onSeen?: () => void;
}

/** A checker's marks on a frame, beside its figures: seen, queries, acceptances, own values. */
export function FramePanel({ acts, onSeen }: FramePanelProps) {
  const { marks, error } = acts;
  if (marks === null)
    return <Zone title="Marks">{error ? <Notice kind="error">{error.message}</Notice> : <p>Being read …</p>}</Zone>;
  const mine = marks.seen.some((one) => one.mine);
  const answered = marks.mayAnswer ? acts.answer : null;
  return (
    <>
      <Zone title={`Marks on ${marks.id}`}>
        {marks.state === 'to check' && marks.whyNotCheck !== null && <Notice>{marks.whyNotCheck}</Notice>}
        {marks.seen.length === 0 && <p className="ck-none">Not seen yet.</p>}
        {marks.seen.map((one) => (
          <p key={`${one.name} ${one.at}`} className="ck-said">
            <CheckMark kind="seen" /> <b>{one.name}</b> <span>saw it, {one.when}</span>
            <span className="mono ck-hash" title={`On the input ${one.inputHash}, by ${one.engine}`}>
              {one.inputHash.slice(0, 4)} {one.inputHash.slice(4, 8)}
            </span>
          </p>
        ))}
        {marks.mayMark && (
          <div className="ck-buttons">
            {!mine && (
              <Button look="checker" disabled={acts.busy} onClick={() => (onSeen ? onSeen() : acts.seen(true))}>
                <CheckMark kind="seen" /> Seen{onSeen ? ' and next' : ''}
              </Button>
            )}
            {mine && (
              <button type="button" className="link choice-plain" disabled={acts.busy} onClick={() => acts.seen(false)}>
                Take my mark back
              </button>
            )}
          </div>
        )}
        {error && <Notice kind="error">{error.message}</Notice>}
      </Zone>
      {(marks.queries.length > 0 || marks.earlierQueries.length > 0 || marks.mayMark) && (
        <Zone title="Queries" note={queryWords(marks.queries)}>
          {marks.earlierQueries.map((thread) => (
            <QueryThread key={thread.id} thread={thread} earlier />
          ))}
          {marks.queries.map((thread) => (
            <QueryThread
              key={thread.id}
              thread={thread}
              onSay={answered === null ? undefined : (said) => answered(thread.id, said)}
            />
          ))}
          {marks.mayMark && <RaiseQuery key={marks.number} marks={marks} acts={acts} />}
        </Zone>
      )}
      {marks.toAccept.length > 0 && marks.sent && (
        <Zone title="Over or not checked" note={acceptWords(marks.toAccept)}>
          <AcceptChecks key={marks.number} marks={marks} acts={acts} />
        </Zone>
      )}
      {(marks.ownValues.length > 0 || marks.mayMark) && (
        <Zone title="Own values" note="a checker’s figure beside ours; kept in the record">
          <OwnValues key={marks.number} marks={marks} acts={acts} />
        </Zone>
      )}
    </>
  );
}

function queryWords(queries: readonly { closed: unknown }[]): string {
  const open = queries.filter(({ closed }) => closed === null).length;
  return queries.length === 0 ? 'none' : `${open} open, ${queries.length - open} closed`;
}

function acceptWords(items: readonly { accepted: unknown }[]): string {
  const left = items.filter(({ accepted }) => accepted === null).length;
  return left === 0 ? 'all accepted' : `${left} not accepted: not to be built from`;
}
