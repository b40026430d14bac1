import Link from 'next/link';
import type { ReactNode } from 'react';
import { formatNumber, formatQuantity } from '@/lib/units/format';
import { unitLabel } from '@/lib/units/batch-unit';
import type { System } from '@/lib/units/quantity';
import { massChange, massOf, type FramePair, type MemberPair, type Movement, type Standing } from '@/lib/results/compare';
import type { ComparedRows } from '@/lib/results/compared-page';
import type { Range } from '@/lib/results/compare-reactions';
import { RatioText } from '../ui/ratio-text';
import { VerdictMark } from '../ui/verdict-mark';

export interface MovedContext {
  readonly letters: { readonly before: string; readonly after: string };
  /** Of each revision. */
  readonly nearLimits: { readonly before: number; readonly after: number };
  readonly units: System;
  /** Address of a frame by its place in a revision's sheet order, from 0. */
  readonly frameHref: (side: 'before' | 'after', index: number) => string;
}

interface MovedTableProps {
  readonly page: ComparedRows;
  readonly of: MovedContext;
  /** By row of frames or members, which change of the inputs touches it. */
  readonly causes?: readonly (string | null)[] | null;
}

/** A page of what moved, each row with before, after and change. */
export function MovedTable({ page, of, causes = null }: MovedTableProps) {
  const { before, after } = of.letters;
  if (page.rows.length === 0) return <p className="tbl-reading">None.</p>;
  switch (page.list) {
    case 'frames':
      return (
        <Table caption="Frames that moved" heads={['Frame', ...standingHeads(of), 'Governing check', 'Section that governs', <Unit key="m" name="Steel added" unit={unitLabel('mass', of.units)} />, `α_cr ${before}`, `α_cr ${after}`, 'Cause']} numeric={[1, 2, 3, 7, 8, 9]}>
          {page.rows.map((pair, i) => (
            <tr key={pair.id}>
              <th scope="row">
                <FrameLink pair={pair} of={of} />
              </th>
              <StandingCells pair={pair} of={of} />
              <td>{fromTo(pair.before?.check, pair.after?.check)}</td>
              <td>{fromTo(pair.before?.section, pair.after?.section)}</td>
              <td className="num">{added(pair, of.units)}</td>
              <td className="num">{formatNumber(pair.before?.criticalLoadFactor ?? null, { significant: 3 })}</td>
              <td className="num">{formatNumber(pair.after?.criticalLoadFactor ?? null, { significant: 3 })}</td>
              <td className="compare-wide">{causes?.[i] ?? '–'}</td>
            </tr>
          ))}
        </Table>
      ); // prettier-ignore
    case 'members':
      return (
        <Table caption="Members that moved" heads={['Frame', 'Member', ...standingHeads(of), 'Role', 'Section', 'Governing check', 'Cause']} numeric={[2, 3, 4]}>
          {page.rows.map((pair, i) => (
            <tr key={`${pair.frame} ${pair.id}`}>
              <th scope="row">
                <Link href={of.frameHref('after', pair.index)} prefetch={false}>
                  {pair.frame}
                </Link>
              </th>
              <td>{pair.id}</td>
              <StandingCells pair={pair} of={of} />
              <td>{(pair.after ?? pair.before)?.role}</td>
              <td>{fromTo(pair.before?.section, pair.after?.section)}</td>
              <td>{fromTo(pair.before?.check, pair.after?.check)}</td>
              <td className="compare-wide">{causes?.[i] ?? '–'}</td>
            </tr>
          ))}
        </Table>
      ); // prettier-ignore
    case 'reactions':
      return (
        <Table caption="Reactions that moved" heads={['Frame', 'Node', 'Direction', 'Unit', `${before} from … to`, `${after} from … to`, 'Change', 'of the frame’s largest']} numeric={[4, 5, 6, 7]}>
          {page.rows.map((pair) => {
            const quantity = pair.direction === 'Mz' ? 'moment' : 'force';
            const range = (one: Range | null) =>
              one === null ? 'no support' : `${formatQuantity(one.min, quantity, of.units)} … ${formatQuantity(one.max, quantity, of.units)}`;
            return (
              <tr key={`${pair.frame} ${pair.node} ${pair.direction}`}>
                <th scope="row">
                  <Link href={of.frameHref('after', pair.index)} prefetch={false}>
                    {pair.frame}
                  </Link>
                </th>
                <td>{pair.node}</td>
                <td>{pair.direction}</td>
                <td className="unit">{unitLabel(quantity, of.units)}</td>
                <td className="num">{range(pair.before)}</td>
                <td className="num">{range(pair.after)}</td>
                <td className="num">{signed(pair.change, (value) => formatQuantity(value, quantity, of.units))}</td>
                <td className="num">{pair.share === null ? '–' : `${formatNumber(100 * pair.share, { decimals: 1 })} %`}</td>
              </tr>
            );
          })}
        </Table>
      ); // prettier-ignore
    case 'inputs':
      return (
        <Table caption="Inputs that differ" heads={['Sheet', 'Where', 'What', before, after, 'Cells']} numeric={[5]}>
          {page.rows.map((one, i) => (
            <tr key={i}>
              <td>{one.sheet}</td>
              <th scope="row" className="compare-wide">
                {one.where.join('; ')}
                {one.cells > one.where.length && ` and ${(one.cells - one.where.length).toLocaleString('en-GB')} more`}
              </th>
              <td>{one.what ?? 'whole row'}</td>
              <Typed text={one.before} struck />
              <Typed text={one.after} />
              <td className="num">{one.cells.toLocaleString('en-GB')}</td>
            </tr>
          ))}
        </Table>
      );
    case 'cells':
      return (
        <Table caption="Cells that differ" heads={['Sheet', 'Where', 'What', before, after, `Row in ${before}`, `Row in ${after}`]} numeric={[5, 6]}>
          {page.rows.map((one, i) => (
            <tr key={i}>
              <td>{one.sheet}</td>
              <th scope="row">{one.where}</th>
              <td>{one.what ?? 'whole row'}</td>
              <Typed text={one.before} struck />
              <Typed text={one.after} />
              <td className="num">{one.rowBefore ?? '–'}</td>
              <td className="num">{one.rowAfter ?? '–'}</td>
            </tr>
          ))}
        </Table>
      ); // prettier-ignore
  }
}

interface TableProps {
  readonly caption: string;
  readonly heads: readonly ReactNode[];
  /** Columns of numbers, from 0. */
  readonly numeric: readonly number[];
  readonly children: ReactNode;
}

function Table({ caption, heads, numeric, children }: TableProps) {
  return (
    <div className="tbl-wrap" role="region" aria-label={caption} tabIndex={0}>
      <table className="tbl">
        <caption className="sr-only">{caption}</caption>
        <thead>
          <tr>
            {heads.map((head, i) => (
              <th key={i} scope="col" className={numeric.includes(i) ? 'num' : undefined}>
                {head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>{children}</tbody>
      </table>
    </div>
  );
}

const Unit = ({ name, unit }: { readonly name: string; readonly unit: string }) => (
  <>
    {name} <span className="unit">{unit}</span>
  </>
);

const standingHeads = ({ letters }: MovedContext): string[] => [`Ratio ${letters.before}`, `Ratio ${letters.after}`, 'Change', 'What moved']; // prettier-ignore

function StandingCells({ pair, of }: { readonly pair: FramePair | MemberPair; readonly of: MovedContext }) {
  const { before, after } = pair;
  return (
    <>
      <RatioCell one={before} nearLimit={of.nearLimits.before} />
      <RatioCell one={after} nearLimit={of.nearLimits.after} />
      <td className="num">{signed(pair.change, (value) => formatNumber(value, { decimals: 2 }))}</td>
      <td>
        {before && <VerdictMark verdict={before.verdict} />}
        {before && after && <span aria-hidden="true"> → </span>}
        {after && <VerdictMark verdict={after.verdict} />} {said(pair, before, after, of)}
      </td>
    </>
  );
}

function said(pair: Movement, before: Standing | null, after: Standing | null, { letters }: MovedContext): string {
  if (before === null) return `only in ${letters.after}`;
  if (after === null) return `only in ${letters.before}`;
  return pair.became === null ? `${after.verdict} in both` : `became ${pair.became}`;
}

const RatioCell = ({ one, nearLimit }: { readonly one: Standing | null; readonly nearLimit: number }) => (
  <td className="num">
    {one === null || one.ratio === null ? '–' : <RatioText ratio={one.ratio} verdict={one.verdict} nearLimit={nearLimit} />}
  </td>
);

function FrameLink({ pair, of }: { readonly pair: FramePair; readonly of: MovedContext }) {
  const [side, one] = pair.after ? (['after', pair.after] as const) : (['before', pair.before] as const);
  return (
    <Link href={of.frameHref(side, one?.index ?? 0)} prefetch={false}>
      {pair.id}
    </Link>
  );
}

/** A true plus or minus; "0.00" without a sign. */
function signed(value: number | null, format: (value: number) => string): string {
  if (value === null) return '–';
  const text = format(value);
  return value > 0 && /[1-9∞]/.test(text) ? `+${text}` : text;
}

function added(pair: FramePair, units: System): string {
  if (massOf(pair.before) === null || massOf(pair.after) === null) return '–';
  return signed(pair.before && pair.after ? massChange(pair) : (massOf(pair.after) ?? 0) - (massOf(pair.before) ?? 0), (value) => formatQuantity(value, 'mass', units)); // prettier-ignore
}

function fromTo(before: string | null | undefined, after: string | null | undefined): ReactNode {
  if (!before || !after || before === after) return after ?? before ?? '–';
  return (
    <>
      <s className="compare-was">{before}</s> <span aria-hidden="true">→</span>
      <span className="sr-only"> becomes </span> {after}
    </>
  );
}

const Typed = ({ text, struck = false }: { readonly text: string | null; readonly struck?: boolean }) => (
  <td className="compare-wide">
    {text === null ? <span className="compare-was">(none)</span> : struck ? <s className="compare-was">{text}</s> : text}
  </td>
);
