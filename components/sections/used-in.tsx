import Link from 'next/link';

export interface UseLine {
  readonly version: number;
  readonly project: string;
  readonly batch: string;
  readonly letter: string;
  readonly state: string;
  readonly frames: number;
  /** The frames that are made of it. */
  readonly href: string;
}

/** Revisions whose frames are made of one of the office's own, by version. */
export function UsedIn({ name, uses }: { readonly name: string; readonly uses: readonly UseLine[] }) {
  if (uses.length === 0) return <p>No revision is made of it yet.</p>;
  return (
    <div className="tbl-scroll section-list" role="region" tabIndex={0} aria-label={`Revisions made of ${name}, scrolls`}>
      <table className="tbl">
        <caption className="sr-only">Revisions made of {name}</caption>
        <thead>
          <tr>
            <th scope="col">Batch</th>
            <th scope="col">Revision</th>
            <th scope="col">State</th>
            <th scope="col">Version</th>
            <th scope="col" className="num">
              Frames
            </th>
            <th scope="col">Project</th>
          </tr>
        </thead>
        <tbody>
          {uses.map(({ version, project, batch, letter, state, frames, href }) => (
            <tr key={`${href} ${version}`}>
              <th scope="row" className="tbl-plain">
                {batch}
              </th>
              <td>
                <Link className="link" href={href} aria-label={`Revision ${letter} of ${batch}`}>
                  {letter}
                </Link>
              </td>
              <td>{state}</td>
              <td>v{version}</td>
              <td className="num">{frames.toLocaleString('en-GB')}</td>
              <td className="tc-wordy">{project}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
