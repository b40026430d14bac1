import { fromSI } from '@/lib/units/batch-unit';
import type { Quantity, System } from '@/lib/units/quantity';

export type Rounding = { readonly decimals: number } | { readonly significant: number };

/** What a value that does not exist prints as. */
const noValue = '–';

/**
 * A number as screens and reports print it: a true minus, no minus before zero, no grouping, never an exponent
 * between 1e-6 and 1e15.
 */
export function formatNumber(value: number | null, rounding: Rounding): string {
  if (value === null || !Number.isFinite(value)) return noValue;
  const text = 'decimals' in rounding ? value.toFixed(rounding.decimals) : significant(value, rounding.significant);
  return typographic(text);
}

/** An SI value in the batch's unit, without the unit (it stands in the head: `unitLabel`). */
export function formatQuantity(
  si: number | null,
  quantity: Quantity,
  system: System,
  rounding: Rounding = { significant: 3 },
): string {
  return formatNumber(si === null ? null : fromSI(si, quantity, system), rounding);
}

function significant(value: number, digits: number): string {
  if (value === 0) return '0';
  const rounded = Number(value.toPrecision(digits));
  const power = Math.floor(Math.log10(Math.abs(rounded)));
  return power < -6 || power > 14 ? value.toExponential(digits - 1) : rounded.toFixed(Math.max(0, digits - 1 - power));
}

const typographic = (text: string): string => (/^-[0.]+$/.test(text) ? text.slice(1) : text.replace('-', '−'));

/**
 * A ratio with two decimals that never crosses a boundary of its verdict (engine, Verdicts):
 * 0.997 → 1.00 (near), 1.003 → 1.01 (over), 0.897 → 0.89 (within, near limit 0.9); from 1000 on it is "> 999".
 * @param nearLimit from which a ratio is near, up to 1 inclusive
 */
export function formatRatio(ratio: number | null, nearLimit: number): string {
  if (ratio === null || Number.isNaN(ratio)) return noValue;
  if (ratio === Infinity) return '∞';
  // what nobody could mend by degrees; its digits would say nothing and break every column
  if (ratio >= 1000) return '> 999';
  const band = (r: number): number => (r > 1 ? 2 : r >= nearLimit ? 1 : 0);
  const nearest = Number(ratio.toFixed(2));
  if (band(nearest) === band(ratio)) return nearest.toFixed(2);
  const down = Math.floor(ratio * 100) / 100;
  const up = Math.ceil(ratio * 100) / 100;
  const kept = [down, up].find((r) => band(r) === band(ratio));
  // a near limit between two hundredths with the ratio beside it: no two-decimal figure is in the band, so give more digits
  return kept === undefined ? String(Number(ratio.toPrecision(6))) : kept.toFixed(2);
}
