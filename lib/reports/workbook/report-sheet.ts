/** A sheet of the workbook before it is a file: named columns with units, and rows of plain values. */
import type { Quantity, System } from '@/lib/units/quantity';
import { fromSI, unitLabel } from '@/lib/units/batch-unit';
import type { Verdict } from '@/lib/results/result';

export type ReportCell = string | number | null;
export type ReportRow = readonly ReportCell[];

export interface ReportColumn {
  /** With its unit: "N max [kN]". */
  readonly heading: string;
  /** Spreadsheet number format; absent = text or as it comes. */
  readonly format?: string;
  readonly width?: number;
  /** Filled by its word (over, near, not checked). */
  readonly verdict?: boolean;
  /** A ratio, with the near limit: printed with more digits where three would cross a boundary of its verdict. */
  readonly nearLimit?: number;
}

export interface ReportSheet {
  readonly name: string;
  /** Empty: free text (the cover), no heading row, no filter. */
  readonly columns: readonly ReportColumn[];
  readonly rows: () => Iterable<ReportRow> | AsyncIterable<ReportRow>;
  /** Columns whose text is bold (the cover's labels). */
  readonly boldFirst?: boolean;
}

const formats: Partial<Record<Quantity, string>> = {
  length: '0.000',
  displacement: '0.00',
  dimension: '0.0',
  force: '0.00',
  moment: '0.00',
  lineLoad: '0.000',
  stress: '0.0',
  mass: '0.0',
  rotation: '0.000000',
};

export function text(heading: string, width = 12): ReportColumn {
  return { heading, width };
}

export function verdictColumn(heading = 'verdict'): ReportColumn {
  return { heading, width: 12, verdict: true };
}

/** A number with its unit in the heading. Full precision is in the cell; the format rounds what is shown. */
export function quantityColumn(heading: string, quantity: Quantity, system: System): ReportColumn {
  const unit = unitLabel(quantity, system);
  return { heading: unit === '' ? heading : `${heading} [${unit}]`, format: formats[quantity] ?? '0.000', width: 12 };
}

/** A ratio: three decimals are shown, or as many as keep it on its side of the near limit and of 1 (1.0003 is over). */
export function ratioColumn(nearLimit: number, heading = 'ratio'): ReportColumn {
  return { heading, format: '0.000', width: 8, nearLimit };
}

/** Whether a ratio shown with three decimals would stand on another side of the near limit or of 1. */
export function crossesAsShown(ratio: number, nearLimit: number): boolean {
  const band = (value: number): number => (value > 1 ? 2 : value >= nearLimit ? 1 : 0);
  return band(Number(ratio.toFixed(3))) !== band(ratio);
}

/** An SI value in the batch's unit; null and not-a-number stay empty. */
export function cellOf(value: number | null | undefined, quantity: Quantity, system: System): number | null {
  if (value === null || value === undefined || !Number.isFinite(value)) return null;
  return fromSI(value, quantity, system) + 0;
}

/** Worst first: over, not checked, near, within. */
export const verdictOrder: Readonly<Record<Verdict, number>> = { over: 0, 'not checked': 1, near: 2, within: 3 };
