import Link from 'next/link';
import type { System } from '@/lib/units/quantity';
import { unitLabel } from '@/lib/units/batch-unit';
import type { Severity } from '@/lib/problems/problem';
import type { Verdict } from '@/lib/results/result';
import type { Cell, Column, Row } from '@/lib/tables/view';
import { LevelBar } from '../ui/level-bar';
import { RatioText } from '../ui/ratio-text';
import { SeverityMark } from '../ui/severity-mark';
import { VerdictMark } from '../ui/verdict-mark';
import { numberText, quantityOf } from './table-words';

interface TableCellProps {
  readonly column: Column;
  readonly row: Row;
  readonly units: System;
  readonly nearLimit: number;
  readonly href: string | null;
}

const verdicts: readonly string[] = ['within', 'near', 'over', 'not checked'];
const verdictOf = (value: Cell | undefined): Verdict | null =>
  typeof value === 'string' && verdicts.includes(value) ? (value as Verdict) : null;

/** One cell by its column's kind; a number at its column's decimals, its unit beside it only where rows differ. */
export function TableCell({ column, row, units, nearLimit, href }: TableCellProps) {
  const value = row.cells[column.key] ?? null;
  if (column.kind === 'verdict') {
    const verdict = verdictOf(value);
    return verdict ? <VerdictMark verdict={verdict} word /> : <>{value}</>;
  }
  if (column.kind === 'severity') return typeof value === 'string' ? <SeverityMark severity={value as Severity} /> : null;
  if (column.kind === 'ratio') {
    const ratio = typeof value === 'number' ? value : null;
    const verdict = verdictOf(row.cells.verdict) ?? (ratio === null ? 'not checked' : 'within');
    return (
      <span className="tbl-ratio">
        <LevelBar ratio={ratio} verdict={verdict} />
        <RatioText ratio={ratio} verdict={verdict} nearLimit={nearLimit} />
      </span>
    );
  }
  if (column.kind === 'number') {
    const text = numberText(value, column, row, units);
    const unit = column.quantity === 'byCheck' && value !== null ? unitLabel(quantityOf(column, row), units) : '';
    return unit ? (
      <>
        {text} <span className="unit tbl-unit">{unit}</span>
      </>
    ) : (
      <>{text}</>
    );
  }
  if (column.kind === 'id' && href && value !== null)
    return (
      <Link href={href} prefetch={false}>
        {value}
      </Link>
    );
  return <>{value}</>;
}
