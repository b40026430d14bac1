import type { SizingTold } from '@/app/_server/sizings';
import { ButtonLink } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Zone } from '@/components/ui/sheet';
import { api } from '@/lib/api/addresses';
import { askedWords } from '@/lib/changes/members-asked';
import { changesOf } from '@/lib/sizing/changes-of';
import type { SizingFound } from '@/lib/sizing/sizing';
import { formatNumber, formatRatio } from '@/lib/units/format';
import type { System } from '@/lib/units/quantity';
import { MakeChanges } from '../_head/make-changes';

interface FoundTogetherProps {
  readonly batch: number;
  readonly letter: string;
  readonly next: string;
  readonly units: System;
  readonly nearLimit: number;
  readonly sizing: SizingTold;
  readonly found: SizingFound;
  readonly mayChange: boolean;
}

/** How the search ended, what is chosen as a whole, and the way to make it a change. */
export function FoundTogether({ batch, letter, next, units, nearLimit, sizing, found, mayChange }: FoundTogetherProps) {
  const { groups, together, mass, outcome, words } = found;
  const { changes, refused } = changesOf(groups);
  const tonnes = (kg: number): string => units === 'metric' ? `${formatNumber(kg / 1000, { significant: 4 })} t` : `${formatNumber(kg / 0.45359237, { significant: 4 })} lb`; // prettier-ignore
  const change = mass === null ? null : 100 * (mass.after_kg / mass.before_kg - 1);
  return (
    <Zone
      title="What was found"
      note={`${sizing.by}, ${sizing.at.slice(0, 10)}; ${sizing.done.toLocaleString('en-GB')} frames × candidates in ${formatNumber(sizing.seconds, { significant: 2 })} s; ${sizing.engine}; hash of frames and candidates ${sizing.inputHash?.slice(0, 8) ?? ''}`}
      aside={
        <ButtonLink href={api.sizing(batch, letter, sizing.id, '/export')} download>
          CSV
        </ButtonLink>
      }
    >
      {outcome === 'converged' ? <p>{words}</p> : <Notice kind="near">{words}</Notice>}
      <table className="tbl">
        <caption className="sr-only">What is chosen</caption>
        <thead>
          <tr>
            <th scope="col">Members</th>
            <th scope="col">Now</th>
            <th scope="col">Lightest</th>
          </tr>
        </thead>
        <tbody>
          {groups.map(({ by, name, before, chosen }) => (
            <tr key={`${by} ${name}`}>
              <th scope="row">
                {by} {name}
              </th>
              <td>{before.length > 4 ? `${before.slice(0, 3).join(', ')} and ${before.length - 3} more` : before.join(', ')}</td>
              <td>{chosen ?? 'none fits'}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {together && (
        <p className="sizing-together">
          Looked at together: {together.fit.toLocaleString('en-GB')} of {together.frames.toLocaleString('en-GB')} frames fit in
          every check; worst {together.frame} with {together.ratio === null ? 'no ratio' : formatRatio(together.ratio, nearLimit)},{' '}
          {together.governs}.
          {mass && change !== null && (
            <>
              {' '}
              Steel of these frames, number off counted: {tonnes(mass.before_kg)} → {tonnes(mass.after_kg)} ({change > 0 ? '+' : ''}
              {formatNumber(change, { decimals: 1 })} %).
            </>
          )}
        </p>
      )}
      {mayChange && changes.length > 0 && (
        <MakeChanges batch={batch} letter={letter} next={next} changes={changes} reason="The lightest that fits">
          <p>
            Make it a change: {changes.map(({ what, to }) => `${askedWords(what)} → ${to}`).join('; ')}. {letter} stays as it is.
          </p>
        </MakeChanges>
      )}
      {mayChange && refused !== null && <Notice kind="near">{refused}</Notice>}
      {mayChange && changes.length === 0 && refused === null && groups.some(({ chosen }) => chosen !== null) && <p>The members have these sections already.</p>}
    </Zone>
  ); // prettier-ignore
}
