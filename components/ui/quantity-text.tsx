import { formatQuantity, type Rounding } from '@/lib/units/format';
import { unitLabel } from '@/lib/units/batch-unit';
import type { Quantity, System } from '@/lib/units/quantity';

interface QuantityTextProps {
  /** SI. */
  readonly value: number | null;
  readonly quantity: Quantity;
  readonly units: System;
  readonly rounding?: Rounding;
}

/** A number and its unit, never apart: three figures unless more is asked for. */
export function QuantityText({ value, quantity, units, rounding }: QuantityTextProps) {
  const unit = unitLabel(quantity, units);
  const text = formatQuantity(value, quantity, units, rounding);
  if (value === null || unit === '') return <span className="quantity">{text}</span>;
  return (
    <span className="quantity whitespace-nowrap">
      {text} <span className="unit">{unit}</span>
    </span>
  );
}
