import Link from 'next/link';
import type { ReactNode } from 'react';
import { RatioAgainst } from '@/components/charts/ratio-against';
import { Notice } from '@/components/ui/notice';
import { Zone } from '@/components/ui/sheet';
import { libraryNumber, libraryUnit } from '@/lib/library/columns-of-library';
import { candidateVerdict } from '@/lib/sizing/candidate-verdict';
import type { GroupFound } from '@/lib/sizing/sizing';
import { formatRatio } from '@/lib/units/format';
import type { System } from '@/lib/units/quantity';
import { CandidateTable } from './candidate-table';

interface GroupResultProps {
  readonly group: GroupFound;
  readonly units: System;
  readonly nearLimit: number;
  /** Others were sized too: figures are with them as chosen. */
  readonly withOthers: boolean;
  readonly frameHref: (frame: string) => string;
}

const count = (n: number, one: string): string => `${n.toLocaleString('en-GB')} ${n === 1 ? one : `${one}s`}`;

/** What was found for one group: the lightest, ratio against mass of every candidate, the table, and frames that fit with none. */
export function GroupResult({ group, units, nearLimit, withOthers, frameHref }: GroupResultProps): ReactNode {
  const { by, name, range, members, frames, chosen, before, candidates, stubborn, stubbornCount } = group;
  const points = candidates.flatMap((one) =>
    one.ratio === null || one.mass_kg_m === null
      ? []
      : [
          {
            frame: one.name,
            ratio: one.ratio,
            verdict: candidateVerdict(one, nearLimit),
            x: libraryNumber(one.mass_kg_m, 'massPerLength', units),
          },
        ],
  );
  return (
    <Zone
      title={`${by} ${name}`}
      note={`${count(members, 'member')} in ${count(frames, 'frame')}, now ${before.slice(0, 4).join(', ')}${before.length > 4 ? ` and ${before.length - 4} more` : ''}; tried: ${range}`}
    >
      {chosen === null ? <Notice kind="near">No candidate fits every frame.</Notice> : <p className="sizing-chosen">{chosen}</p>}
      <p>
        Ratio of the worst frame against mass{withOthers ? ', the other groups as chosen' : ''}. A candidate of which anything is
        not checked is out.
      </p>
      <div className="sizing-chart">
        <RatioAgainst
          points={points}
          parameter="mass"
          unit={libraryUnit('massPerLength', units)}
          nearLimit={nearLimit}
          chosen={chosen}
          none="No candidate has a mass and a ratio."
        />
      </div>
      <CandidateTable group={group} units={units} nearLimit={nearLimit} />
      {stubbornCount > 0 && (
        <>
          <h3 className="sizing-stubborn">
            {count(stubbornCount, 'frame')} that {stubbornCount === 1 ? 'fits' : 'fit'} with no candidate
          </h3>
          <div
            className="tbl-wrap sizing-table"
            role="region"
            tabIndex={0}
            aria-label={`Frames that fit with no candidate for ${name}`}
          >
            <table className="tbl">
              <caption className="sr-only">Frames that fit with no candidate, worst first</caption>
              <thead>
                <tr>
                  <th scope="col">Frame</th>
                  <th scope="col">Nearest with</th>
                  <th scope="col">Comes to</th>
                  <th scope="col">Governs</th>
                </tr>
              </thead>
              <tbody>
                {stubborn.map((one) => (
                  <tr key={one.frame}>
                    <th scope="row">
                      <Link href={frameHref(one.frame)} prefetch={false}>
                        {one.frame}
                      </Link>
                    </th>
                    <td>{one.candidate}</td>
                    <td>
                      {one.outcome}
                      {one.ratio === null ? '' : ` ${formatRatio(one.ratio, nearLimit)}`}
                    </td>
                    <td>{one.governs}</td>
                  </tr>
                ))}
              </tbody>
            </table>
          </div>
          {stubbornCount > stubborn.length && <p>{count(stubbornCount - stubborn.length, 'more')} are not listed.</p>}
        </>
      )}
    </Zone>
  );
}
