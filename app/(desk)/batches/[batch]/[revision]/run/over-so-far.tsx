'use client';
import Link from 'next/link';
import { useState } from 'react';
import { RatioText } from '@/components/ui/ratio-text';
import { Zone } from '@/components/ui/sheet';
import { pages } from '@/lib/api/addresses';
import type { GlanceCell } from '../_head/strip-frames';

interface OverSoFarProps {
  readonly cells: readonly GlanceCell[];
  readonly nearLimit: number;
  readonly batch: number;
  readonly letter: string;
  readonly going: boolean;
}

const most = 12;

/** Frames over their limits, the newest first: in the order in which they came to be known. */
export function OverSoFar({ cells, nearLimit, batch, letter, going }: OverSoFarProps) {
  const [seen, setSeen] = useState<readonly number[]>([]);
  const over = cells.filter((cell) => cell.verdict === 'over').map((cell) => cell.index);
  const known = new Set(seen);
  const fresh = over.filter((index) => !known.has(index));
  if (fresh.length > 0) setSeen([...fresh.reverse(), ...seen]);
  const rows = [...fresh, ...seen].slice(0, most).flatMap((index) => cells[index] ?? []);
  return (
    <Zone title="Over, newest first" note={noteOf(over.length, rows.length, going)}>
      {rows.length === 0 ? (
        <p className="text-ink2">No frame is over its limits{going ? ' so far' : ''}.</p>
      ) : (
        <table className="tbl tbl-side">
          <caption className="sr-only">Frames over their limits, the newest first</caption>
          <thead>
            <tr>
              <th scope="col" className="num">
                No.
              </th>
              <th scope="col">Frame</th>
              <th scope="col" className="num">
                Ratio
              </th>
              <th scope="col">Check</th>
              <th scope="col">Where</th>
            </tr>
          </thead>
          <tbody>
            {rows.map((cell) => (
              <tr key={cell.index}>
                <td className="num">{cell.index + 1}</td>
                <th scope="row">
                  <Link href={pages.frame(batch, letter, cell.index + 1)}>{cell.id}</Link>
                </th>
                <td className="num">
                  <RatioText ratio={cell.ratio} verdict={cell.verdict} nearLimit={nearLimit} />
                </td>
                <td>{cell.check}</td>
                <td>{cell.subject}</td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
    </Zone>
  );
}

function noteOf(over: number, shown: number, going: boolean): string {
  const count = `${over.toLocaleString('en-GB')}${going ? ' so far' : ''}`;
  return shown < over ? `${count}, the last ${shown} shown` : count;
}
