import Link from 'next/link';
import { RevisionMark } from '@/components/title-block/revision-mark';
import { VerdictMark } from '@/components/ui/verdict-mark';
import type { BatchListed } from '@/db/queries/batches';
import { pages } from '@/lib/api/addresses';

interface BatchListProps {
  readonly batches: readonly (BatchListed & { readonly changed: string })[];
}

/** A project's batches: state, frames by verdict, who prepared the latest revision. */
export function BatchList({ batches }: BatchListProps) {
  return (
    <div className="tbl-wrap">
      <table className="tbl">
        <caption className="sr-only">Batches</caption>
        <thead>
          <tr>
            <th scope="col">Batch</th>
            <th scope="col">Revision</th>
            <th scope="col">State</th>
            <th scope="col" className="num">
              Frames
            </th>
            <th scope="col">Verdicts</th>
            <th scope="col">Prepared</th>
            <th scope="col">Last changed</th>
          </tr>
        </thead>
        <tbody>
          {batches.map(({ id, name, latest, changed }) => (
            <tr key={id}>
              <th scope="row">{latest ? <Link href={pages.revision(id, latest.letter)}>{name}</Link> : name}</th>
              <td>{latest && <RevisionMark letter={latest.letter} />}</td>
              <td>{latest?.state ?? 'empty'}</td>
              <td className="num">{latest?.frames.toLocaleString('en-GB') ?? ''}</td>
              <td>{latest && <Verdicts latest={latest} />}</td>
              <td>{latest?.createdBy ?? ''}</td>
              <td>{changed}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function Verdicts({ latest }: { readonly latest: NonNullable<BatchListed['latest']> }) {
  const { over, near, within, notChecked } = latest.verdicts;
  if (over + near + within + notChecked === 0) return <span className="text-ink3">none yet</span>;
  const all = [
    { verdict: 'over', count: over },
    { verdict: 'near', count: near },
    { verdict: 'within', count: within },
    { verdict: 'not checked', count: notChecked },
  ] as const;
  return (
    <span className="inline-flex gap-3">
      {all.map(({ verdict, count }) => (
        <span key={verdict} className="inline-flex items-center gap-1">
          <VerdictMark verdict={verdict} size={12} /> {count.toLocaleString('en-GB')} <span className="sr-only">{verdict}</span>
        </span>
      ))}
    </span>
  );
}
