import type { ReactNode } from 'react';
import { limitKey, limitedBy, type OfficeLimit } from '@/lib/model/office-limit';
import { figureWords, limitedWords, measureWords } from './limit-words';

interface LimitTableProps {
  readonly limits: readonly OfficeLimit[];
  /** What stands at the end of each row, and its heading for those who don't see it. */
  readonly acts?: { readonly heading: string; readonly of: (index: number) => ReactNode };
}

/** An office's limits: on what, of which members or nodes, in which combinations, and where the figure is from. */
export function LimitTable({ limits, acts }: LimitTableProps) {
  if (limits.length === 0) return <p>The office has no limits of its own yet.</p>;
  return (
    <div className="tbl-wrap" role="region" tabIndex={0} aria-label="Limits of the office">
      <table className="tbl">
        <caption className="sr-only">Limits of the office</caption>
        <thead>
          <tr>
            <th scope="col">Applies to</th>
            <th scope="col">Measure</th>
            <th scope="col" className="num">
              At most
            </th>
            <th scope="col">In combinations</th>
            <th scope="col">Source</th>
            {acts && (
              <th scope="col">
                <span className="sr-only">{acts.heading}</span>
              </th>
            )}
          </tr>
        </thead>
        <tbody>
          {limits.map((limit, index) => (
            <tr key={limitKey(limit)}>
              <th scope="row">{limitedWords(limit, limitedBy)}</th>
              <td>{measureWords(limit)}</td>
              <td className="num">{figureWords(limit)}</td>
              <td>{limit.combination ?? 'every service combination'}</td>
              <td>{limit.source === '' ? 'the office’s own' : limit.source}</td>
              {acts && <td>{acts.of(index)}</td>}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
