import type { CheckingDetail } from '@/app/_server/checking-detail';
import { Zone } from '@/components/ui/sheet';

const words = { sent: 'sent it to check', returned: 'returned it', passed: 'passed it' } as const;

/** Who sent, returned and passed it, who had a hand in it, and what is not issued. */
export function CheckingRecord({ detail }: { readonly detail: CheckingDetail }) {
  const { acts, preparers, checkers, notIssued } = detail;
  return (
    <div className="border-hair grid border-t md:grid-cols-2">
      <Zone title="Record">
        <ul>
          {acts.map(({ what, by, at, when, note }) => (
            <li key={at}>
              <b>{by}</b> {words[what]}, {when}
              {note !== '' && `: ${note}`}
            </li>
          ))}
        </ul>
        {notIssued.length > 0 && (
          <>
            <p>
              {notIssued.length.toLocaleString('en-GB')} {notIssued.length === 1 ? 'frame has' : 'frames have'} no solution. They
              are not issued, and are not part of the list:
            </p>
            <ul className="list-disc pl-5">
              {notIssued.slice(0, 50).map(({ frame, reason }) => (
                <li key={frame}>
                  {frame}: {reason}
                </li>
              ))}
            </ul>
            {notIssued.length > 50 && <p>and {(notIssued.length - 50).toLocaleString('en-GB')} more.</p>}
          </>
        )}
      </Zone>
      <Zone title="Who may check it" note="never one of which they uploaded, changed or ran any frame">
        <p>{checkers.length > 0 ? checkers.join(', ') : 'Nobody of the office, as it stands.'}</p>
        <ul className="ck-none">
          {preparers.map(({ name, did }) => (
            <li key={name}>
              Not {name}, who {did}.
            </li>
          ))}
        </ul>
      </Zone>
    </div>
  );
}
