import Link from 'next/link';
import type { Verdict } from '@/lib/results/result';
import { RatioText } from '../ui/ratio-text';
import { VerdictMark } from '../ui/verdict-mark';

export interface WorstFrame {
  readonly id: string;
  readonly href: string;
  readonly ratio: number | null;
  readonly verdict: Verdict;
  readonly check: string | null;
  readonly subject: string | null;
  readonly section: string | null;
  readonly combination: string | null;
}

/** The worst frames, worst first. */
export function WorstFrames({ frames, nearLimit }: { readonly frames: readonly WorstFrame[]; readonly nearLimit: number }) {
  return (
    <div className="tbl-wrap">
      <table className="tbl tbl-side">
        <caption className="sr-only">Worst frames</caption>
        <thead>
          <tr>
            <th scope="col">Frame</th>
            <th scope="col" className="num" aria-sort="descending">
              Ratio ↓
            </th>
            <th scope="col">
              <span className="sr-only">Verdict</span>
            </th>
            <th scope="col">Check</th>
            <th scope="col">Where</th>
            <th scope="col">Section</th>
            <th scope="col">Comb.</th>
          </tr>
        </thead>
        <tbody>
          {frames.map((row) => (
            <tr key={row.href}>
              <th scope="row">
                <Link href={row.href} prefetch={false}>
                  {row.id}
                </Link>
              </th>
              <td className="num">
                <RatioText ratio={row.ratio} verdict={row.verdict} nearLimit={nearLimit} />
              </td>
              <td>
                <VerdictMark verdict={row.verdict} />
                <span className="sr-only">{row.verdict}</span>
              </td>
              <td>{row.check}</td>
              <td>{row.subject}</td>
              <td>{row.section}</td>
              <td>{row.combination}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
