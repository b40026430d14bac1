'use client';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { RatioAgainst } from '@/components/charts/ratio-against';
import { Choice } from '@/components/ui/choice';
import { Notice } from '@/components/ui/notice';
import { Zone } from '@/components/ui/sheet';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';
import type { Verdict } from '@/lib/results/result';
import { parameterQuantity, type ParameterColumn } from '@/lib/tables/shown-columns';
import { fromSI, unitLabel } from '@/lib/units/batch-unit';
import type { System } from '@/lib/units/quantity';

export interface ParameterRatio {
  readonly index: number;
  readonly value: number;
  readonly ratio: number | null;
  readonly verdict: Verdict | null;
  readonly group: string | null;
}

interface RatioOverProps {
  readonly batch: number;
  readonly letter: string;
  readonly units: System;
  readonly nearLimit: number;
  /** Numeric ones, at least one. */
  readonly parameters: readonly ParameterColumn[];
  /** The one shown first. */
  readonly first: { readonly name: string; readonly ratios: readonly ParameterRatio[] };
  /** Ids of the frames, in sheet order. */
  readonly frames: readonly string[];
}

/** Governing ratio against a parameter of the family, which may be chosen. */
export function RatioOver({ batch, letter, units, nearLimit, parameters, first, frames }: RatioOverProps) {
  const [name, setName] = useState(first.name);
  const ratios = useQuery({
    queryKey: ['over', batch, letter, name],
    queryFn: ({ signal }) =>
      request<{ ratios: ParameterRatio[] }>(`${api.part(batch, letter, 'summary')}?over=${encodeURIComponent(name)}`, { signal }),
    initialData: name === first.name ? { ratios: [...first.ratios] } : undefined,
    placeholderData: keepPreviousData,
  });
  const quantity = parameterQuantity(parameters.find((one) => one.name === name)?.quantity ?? '') ?? 'number';
  const inUnits = quantity === 'byCheck' ? 'number' : quantity;
  const points = (ratios.data?.ratios ?? []).flatMap(({ index, value, ratio, verdict, group }) =>
    ratio === null
      ? []
      : [{ frame: frames[index] ?? '', ratio, verdict: verdict ?? 'not checked', group, x: fromSI(value, inUnits, units) }],
  );
  const chosen = (
    <>
      Ratio against{' '}
      <Choice
        label="parameter"
        options={parameters.map((one) => ({ value: one.name, label: one.name }))}
        value={[name]}
        onChange={([to]) => setName(to ?? name)}
      />
    </>
  );
  return (
    <Zone title={chosen}>
      {ratios.error && <Notice kind="error">{ratios.error.message}</Notice>}
      <RatioAgainst points={points} parameter={name} unit={unitLabel(inUnits, units)} nearLimit={nearLimit} />
    </Zone>
  );
}
