import Link from 'next/link';
import { formatNumber, formatQuantity } from '@/lib/units/format';
import { unitLabel } from '@/lib/units/batch-unit';
import type { System } from '@/lib/units/quantity';
import { comparedVerdicts, type ComparedTotals } from '@/lib/results/compare-totals';
import { VerdictMark } from '../ui/verdict-mark';

interface ComparedFactsProps {
  readonly totals: ComparedTotals;
  readonly letters: { readonly before: string; readonly after: string };
  readonly units: System;
  readonly by: number;
  /** Address of the frames that moved in one way. */
  readonly hrefOf: (show: 'over' | 'near' | 'within' | 'not-checked' | 'moved' | 'only' | 'critical' | 'mass') => string;
}

const n = (value: number): string => value.toLocaleString('en-GB');

/** What moved, in figures; each is a link to the frames it counts. */
export function ComparedFacts({ totals, letters, units, by, hrefOf }: ComparedFactsProps) {
  const { frames, became, mass, critical } = totals;
  const { before, after } = letters;
  const kg = (value: number) => `${formatQuantity(value, 'mass', units, { significant: 4 })} ${unitLabel('mass', units)}`;
  const added = mass.after - mass.before;
  const unknown = mass.unknownBefore + mass.unknownAfter;
  const lowest = (one: typeof critical.before) =>
    one === null ? 'none' : `${formatNumber(one.value, { significant: 3 })} (${one.frame})`;
  return (
    <dl className="compare-facts" aria-label="What moved">
      {comparedVerdicts.map((verdict) => (
        <Fact key={verdict} label={`Became ${verdict}`}>
          <VerdictMark verdict={verdict} />{' '}
          <Link className="link" href={hrefOf(verdict === 'not checked' ? 'not-checked' : verdict)}>
            {n(became[verdict])}
          </Link>
        </Fact>
      ))}
      <Fact label="No longer over">{n(totals.noLongerOver)}</Fact>
      <Fact label={`Ratio moved by more than ${by}`}>
        <Link className="link" href={hrefOf('moved')}>
          {n(totals.moved)}
        </Link>{' '}
        of {n(frames.after - frames.onlyAfter)}
      </Fact>
      <Fact label="Carried over">{n(frames.carried)} frames, the same content and results</Fact>
      <Fact label="Only in one">
        <Link className="link" href={hrefOf('only')}>
          {n(frames.onlyBefore)} in {before}, {n(frames.onlyAfter)} in {after}
        </Link>
      </Fact>
      <Fact label="Steel, number off included">
        <Link className="link" href={hrefOf('mass')}>
          {added > 0 ? '+' : ''}
          {kg(added)}
        </Link>
        : {kg(mass.before)} in {before}, {kg(mass.after)} in {after}
        {unknown > 0 && ` (not known of ${n(mass.unknownBefore)} and ${n(mass.unknownAfter)} frames)`}
      </Fact>
      <Fact label="Lowest α_cr">
        {lowest(critical.before)} in {before}, {lowest(critical.after)} in {after};{' '}
        <Link className="link" href={hrefOf('critical')}>
          moved in {n(critical.moved)}
        </Link>
      </Fact>
    </dl>
  ); // prettier-ignore
}

function Fact({ label, children }: { readonly label: string; readonly children: React.ReactNode }) {
  return (
    <>
      <dt>{label}</dt>
      <dd>{children}</dd>
    </>
  );
}

/** Frames of both revisions: verdict before down, after across. */
export function VerdictTable({ totals, letters }: Pick<ComparedFactsProps, 'totals' | 'letters'>) {
  const { verdicts } = totals;
  const column = (at: number) => verdicts.reduce((sum, row) => sum + (row[at] ?? 0), 0);
  return (
    <div className="tbl-wrap" role="region" aria-label="Verdicts before and after" tabIndex={0}>
      <table className="tbl tbl-side">
        <caption className="sr-only">
          Verdicts of frames, revision {letters.before} down and {letters.after} across
        </caption>
        <thead>
          <tr>
            <th scope="col">
              {letters.before} ↓ {letters.after} →
            </th>
            {comparedVerdicts.map((verdict) => (
              <th key={verdict} scope="col" className="num">
                <VerdictMark verdict={verdict} word />
              </th>
            ))}
            <th scope="col" className="num">
              in {letters.before}
            </th>
          </tr>
        </thead>
        <tbody>
          {comparedVerdicts.map((verdict, i) => (
            <tr key={verdict}>
              <th scope="row">
                <VerdictMark verdict={verdict} word />
              </th>
              {comparedVerdicts.map((to, j) => (
                <td key={to} className={`num ${i === j ? 'compare-diagonal' : ''}`}>
                  {verdicts[i]?.[j] ? n(verdicts[i][j]) : '–'}
                </td>
              ))}
              <td className="num">{n((verdicts[i] ?? []).reduce((sum, count) => sum + count, 0))}</td>
            </tr>
          ))}
          <tr>
            <th scope="row">in {letters.after}</th>
            {comparedVerdicts.map((verdict, j) => (
              <td key={verdict} className="num">
                {n(column(j))}
              </td>
            ))}
            <td className="num">{n(comparedVerdicts.reduce((sum, _, j) => sum + column(j), 0))}</td>
          </tr>
        </tbody>
      </table>
    </div>
  );
}
