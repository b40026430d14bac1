export interface VersionLine {
  readonly version: number;
  /** "h 600 mm, b 250 mm, tw 8 mm" */
  readonly figures: string;
  readonly note: string;
  readonly person: string;
  /** As shown. */
  readonly at: string;
}

/** Every version of one of the office's own, the latest first. */
export function VersionList({ name, versions }: { readonly name: string; readonly versions: readonly VersionLine[] }) {
  return (
    <div className="tbl-scroll section-list" role="region" tabIndex={0} aria-label={`Versions of ${name}, scrolls`}>
      <table className="tbl">
        <caption className="sr-only">Versions of {name}</caption>
        <thead>
          <tr>
            <th scope="col">Version</th>
            <th scope="col">Figures</th>
            <th scope="col">Source</th>
            <th scope="col">By</th>
            <th scope="col">When</th>
          </tr>
        </thead>
        <tbody>
          {versions.map(({ version, figures, note, person, at }) => (
            <tr key={version}>
              <th scope="row">v{version}</th>
              <td className="tc-wordy">{figures}</td>
              <td className="tc-wordy">{note === '' ? 'nothing said' : note}</td>
              <td>{person}</td>
              <td>{at}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
