import type { MemberChange, SectionFigures, SectionPreview } from '@/lib/changes/section-preview';
import { libraryNumber, libraryUnit } from '@/lib/library/columns-of-library';
import { formatNumber } from '@/lib/units/format';
import type { System } from '@/lib/units/quantity';

interface SectionEffectProps {
  readonly preview: Pick<SectionPreview, 'to' | 'from' | 'touched' | 'carriedOver' | 'members' | 'mass'> & {
    readonly frames: number;
    readonly count: number;
  };
  /** The revision that is changed. */
  readonly letter: string;
  readonly units: System;
}

const rows = [
  { label: 'mass', quantity: 'massPerLength', value: (of: SectionFigures) => of.mass_kg_m },
  { label: 'A', quantity: 'area', value: (of: SectionFigures) => of.A_m2 },
  { label: 'I', quantity: 'secondMoment', value: (of: SectionFigures) => of.I_m4 },
  { label: 'W', quantity: 'modulus', value: (of: SectionFigures) => of.W_m3 },
] as const;

const count = (n: number, one: string): string => `${n.toLocaleString('en-GB')} ${n === 1 ? one : `${one}s`}`;

/** "+12.4 %"; "–" where a figure is not known. */
function changeText(before: number | null, after: number | null): string {
  if (before === null || after === null || before === 0) return '–';
  const change = 100 * (after / before - 1);
  return `${change > 0 ? '+' : ''}${formatNumber(change, { decimals: 1 })} %`;
}

/** What a change of section touches: figures before and after, frames that run again, frames carried over, the members. */
export function SectionEffect({ preview, letter, units }: SectionEffectProps) {
  const { to, from, frames, carriedOver, members, mass } = preview;
  const kg = (value: number): string => `${formatNumber(units === 'metric' ? value : value / 0.45359237, { significant: 4 })} ${units === 'metric' ? 'kg' : 'lb'}`; // prettier-ignore
  return (
    <div role="status">
      <p className="section-facts">
        <b>
          {count(preview.count, 'member')} in {count(frames, 'frame')}
        </b>{' '}
        change to {to}; {frames === 1 ? 'that frame runs' : 'those frames run'} again.{' '}
        {carriedOver === 0
          ? 'No other frame can run.'
          : `${count(carriedOver, 'other frame')} ${carriedOver === 1 ? 'keeps its' : 'keep their'} results, carried over from ${letter}.`}
        {mass && (
          <>
            {' '}
            Steel of these members, number off counted: {kg(mass.before_kg)} → {kg(mass.after_kg)} (
            {changeText(mass.before_kg, mass.after_kg)}).
          </>
        )}
      </p>
      {from.map(({ before, after, members: many }) => (
        <div key={`${before.section} ${before.mass_kg_m}`} className="tbl-wrap">
          <table className="tbl">
            <caption className="sr-only">
              {before.section} becomes {after.section}
            </caption>
            <thead>
              <tr>
                <th scope="col">{count(many, 'member')}</th>
                <th scope="col" className="num">
                  {before.section}
                </th>
                <th scope="col" className="num">
                  {after.section}
                </th>
                <th scope="col" className="num">
                  Change
                </th>
              </tr>
            </thead>
            <tbody>
              {rows.map(({ label, quantity, value }) => (
                <tr key={label}>
                  <th scope="row" className="tbl-plain">
                    {label} <span className="unit">{libraryUnit(quantity, units)}</span>
                  </th>
                  {[value(before), value(after)].map((si, i) => (
                    <td key={i} className="num">
                      {si === null ? 'not available' : formatNumber(libraryNumber(si, quantity, units), { significant: 4 })}
                    </td>
                  ))}
                  <td className="num">{changeText(value(before), value(after))}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      ))}
      <Members members={members} all={preview.count} />
    </div>
  );
}

function Members({ members, all }: { readonly members: readonly MemberChange[]; readonly all: number }) {
  return (
    <details>
      <summary>
        Members that change{all > members.length && ` (the first ${members.length} of ${all.toLocaleString('en-GB')})`}
      </summary>
      <div className="tbl-scroll section-members" role="region" tabIndex={0} aria-label="Members that change">
        <table className="tbl">
          <thead>
            <tr>
              <th scope="col">Frame</th>
              <th scope="col">Member</th>
              <th scope="col">Role</th>
              <th scope="col">From</th>
              <th scope="col">To</th>
            </tr>
          </thead>
          <tbody>
            {members.map(({ frame, member, role, before, after }) => (
              <tr key={`${frame} ${member}`}>
                <td>{frame}</td>
                <td>{member}</td>
                <td>{role ?? ''}</td>
                <td>{before.section}</td>
                <td>{after.section}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </details>
  );
}
