'use client';
import type { KeyboardEvent } from 'react';
import type { CheckLine } from '@/lib/results/check-line';
import { LevelBar } from '@/components/ui/level-bar';
import { QuantityText } from '@/components/ui/quantity-text';
import { RatioText } from '@/components/ui/ratio-text';
import { VerdictMark } from '@/components/ui/verdict-mark';
import { formatQuantity } from '@/lib/units/format';
import type { System } from '@/lib/units/quantity';

interface ChecksTableProps {
  readonly checks: readonly CheckLine[];
  readonly units: System;
  readonly nearLimit: number;
  /** The check whose working is open. */
  readonly open: string | null;
  readonly onOpen: (id: string) => void;
}

/** A frame's checks, the worst first; arrow keys or a press open the working of one. */
export function ChecksTable({ checks, units, nearLimit, open, onOpen }: ChecksTableProps) {
  const onKeyDown = (event: KeyboardEvent) => {
    const at = checks.findIndex((check) => check.id === open);
    const to = { ArrowDown: at + 1, ArrowUp: at - 1, Home: 0, End: checks.length - 1 }[event.key];
    const next = to === undefined ? undefined : checks[to];
    if (next === undefined) return;
    event.preventDefault();
    onOpen(next.id);
  };
  return (
    <div
      className="tbl-wrap max-h-[320px] overflow-y-auto print:max-h-none print:overflow-visible"
      role="region"
      tabIndex={0}
      aria-label="Checks; arrow keys open a working"
      onKeyDown={onKeyDown}
    >
      <table className="tbl tbl-side [&_td]:px-1 [&_th]:px-1">
        <caption className="sr-only">Checks, the worst first</caption>
        <thead>
          <tr>
            <th scope="col">Where</th>
            <th scope="col">Check</th>
            <th scope="col">Comb.</th>
            <th scope="col" className="num">
              Value
            </th>
            <th scope="col" className="num">
              Limit
            </th>
            <th scope="col" className="num" aria-sort="descending">
              Ratio ↓
            </th>
          </tr>
        </thead>
        <tbody>
          {checks.map((check) => (
            <tr
              key={check.id}
              className={check.id === open ? 'tbl-selected' : undefined}
              aria-selected={check.id === open}
              onClick={() => onOpen(check.id)}
            >
              <th scope="row">
                <button
                  type="button"
                  className="tbl-sort"
                  onClick={() => onOpen(check.id)}
                  aria-label={`Working of ${check.where}, ${check.check}`}
                >
                  {check.where}
                </button>
              </th>
              <td className="tbl-wraps">{check.check}</td>
              <td className="tbl-wraps">{check.combination ?? ''}</td>
              <td className="num">{formatQuantity(check.value, check.quantity, units)}</td>
              <td className="num">
                <QuantityText value={check.limit} quantity={check.quantity} units={units} />
              </td>
              <td className="num">
                <span className="tbl-ratio">
                  <LevelBar ratio={check.ratio} verdict={check.verdict} width={46} />
                  <RatioText ratio={check.ratio} verdict={check.verdict} nearLimit={nearLimit} />
                  <VerdictMark verdict={check.verdict} />
                  <span className="sr-only">{check.verdict}</span>
                </span>
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
