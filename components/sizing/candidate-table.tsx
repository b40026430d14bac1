'use client';
import { useEffect, useRef, useState } from 'react';
import { Field } from '@/components/ui/field';
import { RatioText } from '@/components/ui/ratio-text';
import { VerdictMark } from '@/components/ui/verdict-mark';
import { libraryNumber, libraryUnit } from '@/lib/library/columns-of-library';
import { candidateVerdict, failsWords } from '@/lib/sizing/candidate-verdict';
import type { CandidateFound, GroupFound } from '@/lib/sizing/sizing';
import { formatNumber } from '@/lib/units/format';
import type { System } from '@/lib/units/quantity';

interface CandidateTableProps {
  readonly group: GroupFound;
  readonly units: System;
  readonly nearLimit: number;
}

const shows = { all: 'all', fits: 'that fit', out: 'that are out' } as const;
type Show = keyof typeof shows;

const fits = ({ over, notChecked, notSolved, unfit, lookedAt, frames }: CandidateFound): boolean =>
  unfit === null && over + notChecked + notSolved === 0 && lookedAt === frames;

/** Candidates of a group, the lightest first: ratio, how many frames each fails and what governs. */
export function CandidateTable({ group, units, nearLimit }: CandidateTableProps) {
  const [text, setText] = useState('');
  const [show, setShow] = useState<Show>('all');
  const { candidates, chosen, name } = group;
  const box = useRef<HTMLDivElement>(null);
  useEffect(() => {
    // the lightest come first, of which nearly all fail: what is chosen is brought into sight, within the table alone
    const row = box.current?.querySelector<HTMLElement>('.tbl-selected');
    if (row && box.current) box.current.scrollTop = Math.max(0, row.offsetTop - box.current.clientHeight / 2);
  }, []);
  const found = candidates
    .filter((one) => one.name.toLowerCase().replaceAll(' ', '').includes(text.toLowerCase().replaceAll(' ', '')))
    .filter((one) => show === 'all' || fits(one) === (show === 'fits'))
    .toSorted((a, b) => a.A_m2 - b.A_m2);
  return (
    <>
      <div className="sizing-filter">
        <Field label={`Section of ${name}`} type="search" value={text} onChange={(event) => setText(event.target.value)} />
        <label className="section-pick">
          Candidates
          <select value={show} onChange={(event) => setShow(event.target.value as Show)}>
            {Object.entries(shows).map(([key, words]) => (
              <option key={key} value={key}>
                {words}
              </option>
            ))}
          </select>
        </label>
        <p role="status">
          {found.length} of {candidates.length}
        </p>
      </div>
      <div ref={box} className="tbl-wrap sizing-table" role="region" tabIndex={0} aria-label={`Candidates for ${name}`}>
        <table className="tbl">
          <caption className="sr-only">Candidates for {name}, the lightest first</caption>
          <thead>
            <tr>
              <th scope="col">Section</th>
              <th scope="col" className="num">
                Mass<span className="unit">{libraryUnit('massPerLength', units)}</span>
              </th>
              <th scope="col" className="num">
                Ratio
              </th>
              <th scope="col">Verdict</th>
              <th scope="col">Frames it fails</th>
              <th scope="col">Worst frame</th>
              <th scope="col">Governs</th>
            </tr>
          </thead>
          <tbody>
            {found.map((one) => {
              const verdict = candidateVerdict(one, nearLimit);
              return (
                <tr key={one.name} className={one.name === chosen ? 'tbl-selected' : undefined}>
                  <th scope="row">
                    {one.name}
                    {one.name === chosen && <span className="unit"> chosen</span>}
                  </th>
                  <td className="num">
                    {one.mass_kg_m === null
                      ? '–'
                      : formatNumber(libraryNumber(one.mass_kg_m, 'massPerLength', units), { decimals: 1 })}
                  </td>
                  <td className="num">
                    <RatioText ratio={one.ratio} verdict={verdict} nearLimit={nearLimit} />
                  </td>
                  <td>
                    <VerdictMark verdict={verdict} word />
                  </td>
                  <td>{failsWords(one)}</td>
                  <td>{one.frame ?? ''}</td>
                  <td>{one.unfit ?? one.governs ?? ''}</td>
                </tr>
              );
            })}
          </tbody>
        </table>
      </div>
    </>
  );
}
