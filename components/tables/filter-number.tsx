'use client';
import { useState } from 'react';
import { toSI } from '@/lib/units/batch-unit';
import type { System } from '@/lib/units/quantity';
import type { Column, Filter } from '@/lib/tables/view';
import { Choice } from '../ui/choice';
import { filterNumber, headUnit, quantityOf, spoken } from './table-words';

type Range = Extract<Filter, { op: 'range' }>;
type Side = 'at least' | 'at most' | 'between';

interface FilterNumberProps {
  readonly column: Column;
  /** null = not yet given. */
  readonly filter: Range | null;
  readonly units: System;
  readonly onFilter: (filter: Range) => void;
}

/** "is at least 0.80": which side, and the number in the unit of the column's head. Enter or leaving the field takes it. */
export function FilterNumber({ column, filter, units, onFilter }: FilterNumberProps) {
  const [side, setSide] = useState<Side>(
    filter === null || (filter.min !== null && filter.max === null) ? 'at least' : filter.min === null ? 'at most' : 'between',
  );
  const give = (min: number | null, max: number | null) => {
    if (min !== null || max !== null) onFilter({ column: column.key, op: 'range', min, max });
  };
  const unit = headUnit(column, units);
  const change = (to: Side) => {
    setSide(to);
    if (!filter) return;
    const value = filter.min ?? filter.max;
    if (to === 'at least') give(value, null);
    if (to === 'at most') give(null, filter.max ?? value);
  };
  return (
    <>
      is{' '}
      <Choice
        label={`${spoken(column)}, which side`}
        options={(['at least', 'at most', 'between'] as const).map((value) => ({ value, label: value }))}
        value={[side]}
        onChange={([value]) => value && change(value as Side)}
      />{' '}
      {side !== 'at most' && (
        <NumberField
          label={`${spoken(column)} ${side === 'between' ? 'from' : side}`}
          column={column}
          units={units}
          value={filter?.min ?? null}
          onValue={(min) => give(min, side === 'between' ? (filter?.max ?? null) : null)}
        />
      )}
      {side === 'between' && ' and '}
      {side !== 'at least' && (
        <NumberField
          label={`${spoken(column)} ${side === 'between' ? 'to' : side}`}
          column={column}
          units={units}
          value={filter?.max ?? null}
          onValue={(max) => give(side === 'between' ? (filter?.min ?? null) : null, max)}
        />
      )}
      {unit && ` ${unit}`}
    </>
  );
}

interface NumberFieldProps {
  readonly label: string;
  readonly column: Column;
  readonly units: System;
  readonly value: number | null;
  readonly onValue: (si: number) => void;
}

function NumberField({ label, column, units, value, onValue }: NumberFieldProps) {
  const shown = value === null ? '' : filterNumber(value, column, units);
  const [typed, setTyped] = useState<string | null>(null);
  const text = typed ?? shown;
  const number = Number(text.replace('−', '-').replace(',', '.'));
  const wrong = text.trim() !== '' && !Number.isFinite(number);
  const take = () => {
    if (typed === null) return;
    if (!wrong && text.trim() !== '') onValue(toSI(number, quantityOf(column, null), units));
    if (!wrong) setTyped(null);
  };
  return (
    <input
      className="sentence-field"
      inputMode="decimal"
      aria-label={label}
      aria-invalid={wrong || undefined}
      title={wrong ? 'Enter a number, like 0.80' : undefined}
      size={Math.max(4, text.length)}
      value={text}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={take}
      onKeyDown={(event) => {
        if (event.key === 'Enter') take();
        if (event.key === 'Escape') setTyped(null);
      }}
    />
  );
}
