import type { Metadata } from 'next';
import Link from 'next/link';
import { ActButton } from '@/app/_client/act-button';
import { dayTime } from '@/app/_server/dates';
import { keptLetters } from '@/app/_server/kept-letters';
import { requirePagePerson } from '@/app/_server/page-person';
import { Empty, Notice } from '@/components/ui/notice';
import { Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listLetters } from '@/db/queries/outbox';
import { api, pages } from '@/lib/api/addresses';

export const metadata: Metadata = { title: 'Letters' };

/** The office’s letters: how far each is; and what stands in them where they reach nobody. */
export default async function LettersPage() {
  const lead = await requirePagePerson('read letters', '/letters');
  const letters = await listLetters(db(), lead.office);
  const kept = keptLetters(lead);
  return (
    <Sheet>
      <Zone
        title="Letters"
        level={1}
        note="the newest first"
        aside={
          <Link className="link" href={pages.people}>
            People
          </Link>
        }
      >
        {kept !== null && (
          <Notice kind="near">
            No key of the mail service is set, so letters are kept on this machine and reach nobody. They are shown here for
            development and trying out, but for others’ links to a new password; set MAIL_KEY before real work.
          </Notice>
        )}
        {letters.length === 0 ? (
          <Empty>
            <p>No letter was written yet.</p>
          </Empty>
        ) : (
          <div className="tbl-wrap">
            <table className="tbl">
              <caption className="sr-only">Letters and how far each is</caption>
              <thead>
                <tr>
                  <th scope="col">To</th>
                  <th scope="col">Kind</th>
                  <th scope="col">Written</th>
                  <th scope="col">State</th>
                  <th scope="col">What went wrong</th>
                </tr>
              </thead>
              <tbody>
                {letters.map(({ id, recipient, kind, createdAt, state, sentAt, attempts, lastError }) => (
                  <tr key={id}>
                    <th scope="row">{recipient}</th>
                    <td>{kind}</td>
                    <td>{dayTime(createdAt)}</td>
                    <td>{state === 'sent' ? `${kept === null ? 'sent' : 'kept'} ${dayTime(sentAt ?? createdAt)}` : state}</td>
                    <td>
                      {state !== 'sent' && lastError !== null && (
                        <span className="flex flex-wrap items-center gap-3">
                          {lastError} {attempts === 1 ? '(1 attempt)' : `(${attempts} attempts)`}
                          {state === 'failed' && (
                            <ActButton quiet label="Try again" address={api.letterAgain(id)} method="POST" />
                          )}
                        </span>
                      )}
                    </td>
                  </tr>
                ))}
              </tbody>
            </table>
          </div>
        )}
      </Zone>
      {kept !== null && kept.length > 0 && (
        <Zone title="Kept on this machine" note="what each would say">
          <ul className="flex flex-col gap-1">
            {kept.map(({ id, to, subject, at }) => (
              <li key={id}>
                {/* A page of its own: the style of the letter's HTML needs the nonce of the document it is shown in. */}
                <a className="link" href={pages.letter(id)}>
                  {subject}
                </a>{' '}
                <span className="text-ink2">
                  to {to}, {dayTime(at)}
                </span>
              </li>
            ))}
          </ul>
        </Zone>
      )}
    </Sheet>
  );
}
