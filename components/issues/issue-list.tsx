import Link from 'next/link';
import { standing, type ShownIssue } from './issue-data';

/** Issues of a batch, the newest first, each with what it is worth now. */
export function IssueList({ issues }: { readonly issues: readonly ShownIssue[] }) {
  return (
    <div className="tbl-wrap" tabIndex={0} role="region" aria-label="Issues">
      <table className="tbl issue-list">
        <caption className="sr-only">Issues of this batch</caption>
        <thead>
          <tr>
            <th scope="col">Issue</th>
            <th scope="col">Issued</th>
            <th scope="col">Revision</th>
            <th scope="col">State</th>
          </tr>
        </thead>
        <tbody>
          {issues.map(({ number, href, date, revision, state, here }) => (
            <tr key={number} className={here ? 'is-here' : ''}>
              <th scope="row">{here ? number : <Link href={href}>{number}</Link>}</th>
              <td>{date}</td>
              <td>{revision}</td>
              <td className={state === 'withdrawn' ? 'is-over' : ''}>{standing[state]}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
