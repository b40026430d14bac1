'use client';
import { useId, useState } from 'react';
import { Button } from '../ui/button';
import { CheckMark } from './check-mark';

export interface Thread {
  readonly id: number;
  /** Letter of its revision; named where it isn't the one on the page. */
  readonly revision: string;
  readonly frameId: string;
  readonly subject: string | null;
  readonly check: string | null;
  readonly raisedBy: string;
  readonly mine: boolean;
  readonly inputHash: string;
  readonly closed: { readonly by: string; readonly when: string } | null;
  readonly messages: readonly { readonly by: string; readonly when: string; readonly text: string }[];
}

interface QueryThreadProps {
  readonly thread: Thread;
  readonly earlier?: boolean;
  /** Absent: nothing can be added. */
  readonly onSay?: (said: { readonly text: string; readonly close: boolean }) => Promise<unknown>;
}

/** A checker's query with what was said to it; who raised it closes it. */
export function QueryThread({ thread, earlier = false, onSay }: QueryThreadProps) {
  const field = useId();
  const [text, setText] = useState('');
  const [busy, setBusy] = useState(false);
  const { subject, check, messages, closed, mine } = thread;
  const about = [check, subject].filter(Boolean).join(', ');
  const say = async (close: boolean) => {
    if (!onSay || busy) return;
    setBusy(true);
    try {
      await onSay({ text: text.trim(), close });
      setText('');
    } catch {
      // said where the page says what went wrong; the words stay in the field
    } finally {
      setBusy(false);
    }
  };
  return (
    <article className={`ck-thread ${closed ? 'ck-thread-closed' : ''}`} aria-label={`Query of ${thread.raisedBy}`}>
      {messages.map((message, i) => (
        <div key={i} className="ck-message">
          <p className="ck-said">
            {i === 0 && <CheckMark kind="queried" />} <b>{message.by}</b>{' '}
            <span>
              {i === 0 ? 'queried' : message.by === thread.raisedBy ? 'added' : 'answered'}
              {i === 0 && earlier && ` revision ${thread.revision}`}
              {i === 0 && about !== '' && ` ${about}`}, {message.when}
            </span>
            {i === 0 && (
              <span className="mono ck-hash" title={`On the input ${thread.inputHash}`}>
                {thread.inputHash.slice(0, 4)} {thread.inputHash.slice(4, 8)}
              </span>
            )}
          </p>
          <p className="ck-words">{message.text}</p>
        </div>
      ))}
      {closed && (
        <p className="ck-closed">
          Closed by {closed.by}, {closed.when}.
        </p>
      )}
      {!closed && onSay && (
        <form
          className="ck-form"
          onSubmit={(event) => {
            event.preventDefault();
            if (text.trim() !== '') void say(false);
          }}
        >
          <label htmlFor={field}>{mine ? 'Add to it' : 'Your answer'}</label>
          <textarea id={field} rows={2} maxLength={2000} value={text} onChange={(event) => setText(event.target.value)} />
          <div className="ck-buttons">
            <Button type="submit" disabled={busy || text.trim() === ''}>
              {mine ? 'Add' : 'Answer'}
            </Button>
            {mine && (
              <Button look="checker" disabled={busy} onClick={() => void say(true)}>
                Close the query
              </Button>
            )}
          </div>
        </form>
      )}
    </article>
  );
}
