import type { GoverningCount } from './charts-data';

/** Which check governs how many frames, and how many of those are over; the bar is the share of all frames. */
export function GoverningChecks({ counts, frames }: { readonly counts: readonly GoverningCount[]; readonly frames: number }) {
  return (
    <table className="tbl tbl-side">
      <caption className="sr-only">Governing checks</caption>
      <thead>
        <tr>
          <th scope="col">Check</th>
          <th scope="col" className="num">
            governs
          </th>
          <th scope="col" className="num">
            over
          </th>
          <th scope="col" className="tbl-bar">
            share of frames
          </th>
        </tr>
      </thead>
      <tbody>
        {counts.map((row) => {
          const all = row.over + row.near + row.within + row.notChecked;
          return (
            <tr key={row.check}>
              <th scope="row" className="tbl-plain">
                {row.check}
              </th>
              <td className="num">{all.toLocaleString('en-GB')}</td>
              <td className={`num ${row.over > 0 ? 'text-red font-semibold' : 'text-ink2'}`}>
                {row.over.toLocaleString('en-GB')}
              </td>
              <td className="tbl-bar">
                <Share row={row} frames={Math.max(frames, 1)} />
              </td>
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}

function Share({ row, frames }: { readonly row: GoverningCount; readonly frames: number }) {
  const share = (n: number) => (n / frames) * 100;
  const [over, near, within] = [share(row.over), share(row.near), share(row.within)];
  return (
    <svg className="share" width="100%" height="10" viewBox="0 0 100 10" preserveAspectRatio="none" aria-hidden="true">
      <rect className="level-band" width="100" height="10" />
      <rect className="share-within" x={over + near} width={within} height="10" />
      <rect className="share-near" x={over} width={near} height="10" />
      <rect className="share-over" width={over} height="10" />
    </svg>
  );
}
