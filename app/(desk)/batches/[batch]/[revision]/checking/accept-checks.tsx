'use client';
import { useId, useState } from 'react';
import { CheckMark } from '@/components/checking/check-mark';
import { VerdictMark } from '@/components/ui/verdict-mark';
import { RatioText } from '@/components/ui/ratio-text';
import { Button } from '@/components/ui/button';
import type { FrameChecking } from '@/app/_server/checking-detail';
import type { FrameCheckingActs } from './use-frame-checking';

/** What of a frame is over or not checked, and the reason with which a checker accepts it. */
export function AcceptChecks({ marks, acts }: { readonly marks: FrameChecking; readonly acts: FrameCheckingActs }) {
  const id = useId();
  const open = marks.toAccept.filter(({ accepted }) => accepted === null);
  // What is over is accepted check by check: nobody should pass it by with a single press.
  const [picked, setPicked] = useState<ReadonlySet<number>>(
    () => new Set(open.filter(({ verdict }) => verdict === 'not checked').map(({ item }) => item)),
  );
  const [reason, setReason] = useState('');
  const [alike, setAlike] = useState(false);
  const chosen = open.filter(({ item }) => picked.has(item));
  const unchecked = chosen.some(({ verdict }) => verdict === 'not checked');
  const accept = () => {
    if (reason.trim() === '' || chosen.length === 0 || acts.busy) return;
    acts.accept({ checks: chosen.map(({ item }) => item), reason: reason.trim(), alike: alike && unchecked }).then(
      () => setReason(''),
      () => undefined, // said above; the words stay in the field
    );
  };
  return (
    <>
      {marks.toAccept.map(({ item, check, subject, verdict, ratio, accepted }) =>
        accepted === null ? null : (
          <div key={item} className="ck-accepted">
            <p>
              <CheckMark kind="accepted" /> <b>{[check, subject].filter(Boolean).join(' ')}</b>{' '}
              <VerdictMark verdict={verdict} word /> <RatioText ratio={ratio} verdict={verdict} nearLimit={0.9} />{' '}
              <span className="ck-none">
                accepted by {accepted.by}, {accepted.when}
              </span>
              {marks.mayMark && (
                <button
                  type="button"
                  className="link choice-plain"
                  disabled={acts.busy}
                  aria-label={`Take back the acceptance of ${check} ${subject ?? ''}`}
                  onClick={() => acts.takeBack(item)}
                >
                  take back
                </button>
              )}
            </p>
            <p className="ck-words">{accepted.reason}</p>
          </div>
        ),
      )}
      {open.length > 0 && (
        <form
          className="ck-form"
          onSubmit={(event) => {
            event.preventDefault();
            accept();
          }}
        >
          <div role="group" aria-label="Checks to accept">
            {open.map(({ item, check, subject, combination, verdict, ratio, why }) => (
              <div key={item} className="ck-check">
                {marks.mayMark && (
                  <input
                    id={`${id} ${item}`}
                    type="checkbox"
                    checked={picked.has(item)}
                    onChange={(event) => {
                      const next = new Set(picked);
                      if (event.target.checked) next.add(item);
                      else next.delete(item);
                      setPicked(next);
                    }}
                  />
                )}
                <label htmlFor={`${id} ${item}`}>
                  <VerdictMark verdict={verdict} word /> <RatioText ratio={ratio} verdict={verdict} nearLimit={0.9} />{' '}
                  {[check, subject, combination].filter(Boolean).join(', ')}
                  {why !== null && `: ${why}`}
                </label>
              </div>
            ))}
          </div>
          {marks.mayMark && (
            <>
              <label htmlFor={`${id} reason`}>Reason, printed beside it</label>
              <textarea
                id={`${id} reason`}
                data-key="a"
                rows={2}
                maxLength={1000}
                value={reason}
                onChange={(event) => setReason(event.target.value)}
                onKeyDown={(event) => {
                  if (event.key === 'Enter' && (event.ctrlKey || event.metaKey)) accept();
                  if (event.key === 'Escape') event.currentTarget.blur();
                }}
              />
              {unchecked && (
                <div className="ck-check">
                  <input
                    id={`${id} alike`}
                    type="checkbox"
                    checked={alike}
                    onChange={(event) => setAlike(event.target.checked)}
                  />
                  <label htmlFor={`${id} alike`}>
                    also in every other frame where the same is not checked for the very same cause
                  </label>
                </div>
              )}
              <div className="ck-buttons">
                <Button type="submit" look="checker" disabled={acts.busy || reason.trim() === '' || chosen.length === 0}>
                  <CheckMark kind="accepted" />{' '}
                  {chosen.length === 0
                    ? 'Tick what you accept'
                    : `Accept ${chosen.length} ${chosen.length === 1 ? 'check' : 'checks'}, with the reason`}
                </Button>
              </div>
            </>
          )}
        </form>
      )}
    </>
  );
}
