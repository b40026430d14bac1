import { scaled } from '@/lib/units/batch-unit';
import { foot_m, inch_m } from '@/lib/units/constants';
import { factorFor, parseUnit, type Unit } from '@/lib/units/parse-unit';
import type { Quantity } from '@/lib/units/quantity';

export type DecimalMark = '.' | ',';

/** How a text reads as a number. `unit` is one typed in the cell, null where there is none. */
export type NumberReading =
  | { readonly kind: 'number'; readonly value: number; readonly unit: Unit | null }
  | { readonly kind: 'not-a-number' }
  /** `1,234` where nothing settles whether the comma is a decimal mark. */
  | { readonly kind: 'ambiguous' }
  | { readonly kind: 'unknown-unit'; readonly unitText: string };

export type QuantityReading =
  | { readonly kind: 'number'; readonly si: number; readonly converted: Unit | null }
  | { readonly kind: 'not-a-number' }
  | { readonly kind: 'ambiguous' }
  | { readonly kind: 'unknown-unit'; readonly unitText: string }
  | { readonly kind: 'wrong-unit-kind'; readonly unit: Unit };

const blanks = /[\s\u00a0\u2007\u2009\u202f]+/g;

/** The figure at the start of a text, and what follows it. */
const figure = /^([+-]?)(\d(?:[\d ,.'’_]*[\d.,])?|[.,]\d+)(e[+-]?\d{1,3}(?![\d.,]))?(.*)$/i;

/**
 * Reads a number as people type it: `1 234.5`, `−3`, `5e-3`, `1,234.5`, `6000 mm`, `5'-6"`.
 * @param options.decimalMark what the file's other numbers settle the decimal mark to; null = nothing does (then a point)
 */
export function readNumber(text: string, options: { readonly decimalMark: DecimalMark | null }): NumberReading {
  const typed = text.trim().replace(blanks, ' ').replace(/^[−–]/, '-').replace(/(e)−/i, '$1-');
  const feet = feetAndInches(typed);
  if (feet) return feet;
  const match = figure.exec(typed.replace(/^([+-]) /, '$1'));
  if (!match) return { kind: 'not-a-number' };
  const [, sign = '', digits = '', exponent = '', tail = ''] = match;
  const plain = plainDigits(digits, options.decimalMark);
  if (plain === 'ambiguous') return { kind: 'ambiguous' };
  if (plain === null) return { kind: 'not-a-number' };
  const value = Number(sign + plain + exponent);
  if (!Number.isFinite(value)) return { kind: 'not-a-number' };
  const unitText = tail.trim();
  if (unitText === '') return { kind: 'number', value, unit: null };
  const unit = /^[-–—−]|^1/.test(unitText) ? null : parseUnit(unitText);
  if (unit) return { kind: 'number', value, unit };
  // "28,5O" is a slip of the finger, "5 furlong" is a unit nobody knows
  const looksLikeUnit = tail.startsWith(' ') && /^\p{L}{2,}[\p{L}\d/^·*.²³⁴⁶]*$/u.test(unitText);
  return looksLikeUnit ? { kind: 'unknown-unit', unitText } : { kind: 'not-a-number' };
}

/** Reads a number of a known quantity into SI; `unit` is that of its heading, its unit row or the batch. */
export function readQuantity(
  text: string,
  options: { readonly quantity: Quantity; readonly unit: Unit; readonly decimalMark: DecimalMark | null },
): QuantityReading {
  const read = readNumber(text, options);
  if (read.kind !== 'number') return read;
  const factor = factorFor(read.unit ?? options.unit, options.quantity);
  if (factor === null) return { kind: 'wrong-unit-kind', unit: read.unit ?? options.unit };
  return { kind: 'number', si: scaled(read.value, factor), converted: read.unit };
}

/**
 * What one text says about the decimal mark of its file: ',' for `1,5` `0,123` `1.234,5`, '.' for `1.5` `1,234.5`,
 * null where it reads either way (`1,234`, `12`) or is no number.
 */
export function decimalMarkShown(text: string): DecimalMark | null {
  const match = figure.exec(text.trim().replace(blanks, ' ').replace(/^[−–]/, '-'));
  const digits = (match?.[2] ?? '').replace(/[ '’_]/g, '');
  const tail = match?.[4]?.trim() ?? 'x';
  if (tail !== '' && !parseUnit(tail)) return null;
  if (!/[.,]/.test(digits)) return null;
  const grouped = (mark: string): boolean => new RegExp(`^[1-9]\\d{0,2}(\\${mark}\\d{3})+$`).test(digits);
  if (/^\d*,\d*$/.test(digits)) return grouped(',') ? null : ',';
  if (/^\d*\.\d*$/.test(digits)) return grouped('.') ? null : '.';
  if (/^\d{1,3}(\.\d{3})+,\d+$/.test(digits)) return ',';
  if (/^\d{1,3}(,\d{3})+\.\d+$/.test(digits)) return '.';
  return null;
}

/** Digits with a point for the decimal mark and nothing else; null = not a number; one comma and three digits may be either. */
function plainDigits(digits: string, mark: DecimalMark | null): string | null | 'ambiguous' {
  let text = digits;
  if (/[ '’_]/.test(text)) {
    if (!/^\d{1,3}([ '’_])\d{3}(?:\1\d{3})*(?:[.,]\d*)?$/.test(text)) return null;
    text = text.replace(/[ '’_]/g, '');
    // blanks group the thousands, so the one mark left can only be the decimal mark
    if (mark === null) return text.replace(',', '.');
  }
  const decimal = mark ?? '.';
  const other = decimal === '.' ? ',' : '.';
  if (!text.includes(other)) return text.split(decimal).length > 2 ? null : text.replace(decimal, '.');
  if (new RegExp(`^\\d{1,3}(\\${other}\\d{3})+\\${decimal}\\d*$`).test(text) || thousandsOnly(text, other)) {
    return text.replaceAll(other, '').replace(decimal, '.');
  }
  if (new RegExp(`^[1-9]\\d{0,2}\\${other}\\d{3}$`).test(text)) return 'ambiguous';
  // nothing else in the file says what the mark is, and this can only be read so
  if (mark === null && decimalMarkShown(text) === ',') return text.replaceAll('.', '').replace(',', '.');
  return null;
}

const thousandsOnly = (text: string, mark: string): boolean => new RegExp(`^[1-9]\\d{0,2}(\\${mark}\\d{3}){2,}$`).test(text);

const feetInches = parseUnit('ft');

function feetAndInches(typed: string): NumberReading | null {
  const match = /^(-?)(\d+)\s?(?:'|′|ft)\s?-?\s?(\d+(?:\.\d+)?)?(?:\s?(\d+)\/(\d+))?\s?(?:"|″|in)$/i.exec(typed);
  if (!match || (match[3] === undefined && match[4] === undefined)) return null;
  const [, sign, feet, inches = '0', above = '0', below = '1'] = match;
  const total = Number(feet) + ((Number(inches) + Number(above) / Number(below)) * inch_m) / foot_m;
  return Number.isFinite(total) ? { kind: 'number', value: sign === '-' ? -total : total, unit: feetInches } : null;
}
