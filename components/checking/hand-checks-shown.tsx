import { Fragment } from 'react';
import type { HandChecks } from '@/lib/checking/hand-checks/hand-checks';
import { unitLabel } from '@/lib/units/batch-unit';
import { formatQuantity } from '@/lib/units/format';
import type { Quantity, System } from '@/lib/units/quantity';

interface HandChecksShownProps {
  readonly checks: HandChecks;
  readonly units: System;
}

/** Sums of loads and reactions, span moments, and sway bounds, with their numbers and whether they agree. */
export function HandChecksShown({ checks, units }: HandChecksShownProps) {
  if (checks.none !== null) return <p>Not applicable: {checks.none}</p>;
  const of = (value: number | null, quantity: Quantity) => formatQuantity(value, quantity, units, { significant: 4 });
  return (
    <div className="ck-hand">
      <h3>Loads as typed against reactions</h3>
      <p className="ck-note">
        Sums of each load case; moments about {checks.about}. Each pair must cancel: loads and reactions are opposite.
      </p>
      <Scrolled label="Loads as typed against reactions">
        <thead>
          <tr>
            <th scope="col">Case</th>
            <Head label="ΣH loads" quantity="force" units={units} />
            <Head label="reactions" quantity="force" units={units} />
            <Head label="ΣV loads" quantity="force" units={units} />
            <Head label="reactions" quantity="force" units={units} />
            <Head label="ΣM loads" quantity="moment" units={units} />
            <Head label="reactions" quantity="moment" units={units} />
            <th scope="col">Outcome</th>
          </tr>
        </thead>
        <tbody>
          {checks.balance.map(({ result, loads, reactions, agreement }) => {
            const force = Math.max(...[loads, reactions].flatMap(({ H, V }) => [Math.abs(H), Math.abs(V)]));
            const moment = Math.max(Math.abs(loads.M), Math.abs(reactions.M), force);
            return (
              <tr key={result}>
                <th scope="row">{result}</th>
                {(['H', 'V'] as const).map((sum) => (
                  <Fragment key={sum}>
                    <td className="num">{of(rounded(loads[sum], force), 'force')}</td>
                    <td className="num">{of(rounded(reactions[sum], force), 'force')}</td>
                  </Fragment>
                ))}
                <td className="num">{of(rounded(loads.M, moment), 'moment')}</td>
                <td className="num">{of(rounded(reactions.M, moment), 'moment')}</td>
                <td>
                  <Outcome word={agreement} />
                </td>
              </tr>
            );
          })}
        </tbody>
      </Scrolled>
      <h3>Mid moment − mean of end moments = wL²/8</h3>
      <p className="ck-note">
        Of every member under one uniform load, first order; w is the part square to the member per metre of its length. M is
        positive with the member’s bottom face in tension.
      </p>
      {checks.spans.length === 0 ? (
        <p>Not applicable: no member carries one uniform load across it.</p>
      ) : (
        <Scrolled label="Span moments">
          <thead>
            <tr>
              <th scope="col">Case</th>
              <th scope="col">Member</th>
              <Head label="w" quantity="lineLoad" units={units} />
              <Head label="L" quantity="length" units={units} />
              <Head label="M start" quantity="moment" units={units} />
              <Head label="M middle" quantity="moment" units={units} />
              <Head label="M end" quantity="moment" units={units} />
              <Head label="found" quantity="moment" units={units} />
              <Head label="wL²/8" quantity="moment" units={units} />
              <th scope="col">Outcome</th>
            </tr>
          </thead>
          <tbody>
            {checks.spans.map((one) => (
              <tr key={`${one.result} ${one.member}`}>
                <td>{one.result}</td>
                <th scope="row">{one.member}</th>
                <td className="num">{of(one.w, 'lineLoad')}</td>
                <td className="num">{of(one.L, 'length')}</td>
                <td className="num">{of(one.start, 'moment')}</td>
                <td className="num">{of(one.middle, 'moment')}</td>
                <td className="num">{of(one.end, 'moment')}</td>
                <td className="num">{of(one.found, 'moment')}</td>
                <td className="num">{of(one.expected, 'moment')}</td>
                <td>
                  <Outcome word={one.agreement} />
                </td>
              </tr>
            ))}
          </tbody>
        </Scrolled>
      )}
      {checks.spansLeftOut.length > 0 && <p className="ck-note">Not applicable: {leftOutWords(checks.spansLeftOut)}.</p>}
      <h3>Sway against a rigid beam</h3>
      <p className="ck-note">
        Mean movement of the column heads, between H/Σ(12EI/h³), bases fixed, and H/Σ(3EI/h³), bases pinned, where the beam does
        not bend (slope-deflection).
      </p>
      {checks.sway.length > 0 && (
        <Scrolled label="Sway against a rigid beam">
          <thead>
            <tr>
              <th scope="col">Case</th>
              <Head label="H" quantity="force" units={units} />
              <Head label="bases fixed" quantity="displacement" units={units} />
              <Head label="sway" quantity="displacement" units={units} />
              <Head label="bases pinned" quantity="displacement" units={units} />
              <Head label="with this beam" quantity="displacement" units={units} />
              <th scope="col">Outcome</th>
            </tr>
          </thead>
          <tbody>
            {checks.sway.map((one) => (
              <tr key={one.result}>
                <th scope="row">{one.result}</th>
                <td className="num">{of(one.H, 'force')}</td>
                <td className="num">{of(one.fixed, 'displacement')}</td>
                <td className="num">{of(one.sway, 'displacement')}</td>
                <td className="num">{of(one.pinned, 'displacement')}</td>
                <td className="num">{of(one.withBeam, 'displacement')}</td>
                <td className="tbl-wraps">
                  <Outcome word={one.agreement} />
                  {one.outcome === 'between' ? ', between' : ''}
                  {one.why !== null && `: ${one.why}`}
                </td>
              </tr>
            ))}
          </tbody>
        </Scrolled>
      )}
      {checks.swayLeftOut.length > 0 && (
        <p className="ck-note">
          Not applicable: {checks.swayLeftOut.map(({ result, why }) => (result === null ? why : `${result}: ${why}`)).join('; ')}.
        </p>
      )}
    </div>
  );
}

/** What is left of figures that cancel is no figure: 5e-17 kN beside 5 kN is 0. */
const rounded = (value: number, size: number): number => (Math.abs(value) <= 1e-9 * size ? 0 : value);

/** "BC in wind: a point load acts on it"; members alike in one. */
function leftOutWords(leftOut: HandChecks['spansLeftOut']): string {
  const groups = new Map<string, string[]>();
  for (const { result, member, why } of leftOut) {
    const key = `in ${result}: ${why}`;
    groups.set(key, [...(groups.get(key) ?? []), member]);
  }
  return [...groups].map(([key, members]) => `${members.join(', ')} ${key}`).join('; ');
}

function Outcome({ word }: { readonly word: 'agrees' | 'differs' | 'explained' }) {
  return <span className={word === 'differs' ? 'ck-differs' : 'ck-agrees'}>{word === 'explained' ? 'outside' : word}</span>;
}

function Head({ label, quantity, units }: { readonly label: string; readonly quantity: Quantity; readonly units: System }) {
  return (
    <th scope="col" className="num">
      {label}
      <span className="unit">{unitLabel(quantity, units)}</span>
    </th>
  );
}

function Scrolled({ label, children }: { readonly label: string; readonly children: React.ReactNode }) {
  return (
    <div className="tbl-wrap" role="region" tabIndex={0} aria-label={label}>
      <table className="tbl tbl-side">
        <caption className="sr-only">{label}</caption>
        {children}
      </table>
    </div>
  );
}
