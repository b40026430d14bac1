'use client';
import { useState } from 'react';
import type { CombinationAdded } from '@/components/combinations/combination-edits';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Segments } from '@/components/ui/segments';
import { editedFactor } from '@/lib/combinations/edited-factor';
import type { Purpose } from '@/lib/model/frame';

interface AddCombinationProps {
  readonly cases: readonly string[];
  /** Names that are taken. */
  readonly taken: readonly string[];
  readonly onAdd: (added: CombinationAdded) => void;
}

const purposes = ['strength', 'service'] as const;

/** A combination to add: its name, its purpose, and a factor on each case that it holds. */
export function AddCombination({ cases, taken, onAdd }: AddCombinationProps) {
  const [name, setName] = useState('');
  const [purpose, setPurpose] = useState<Purpose>('strength');
  const [factors, setFactors] = useState<Readonly<Record<string, string>>>({});
  const key = (text: string) => text.trim().toLowerCase();
  const known = [...taken, ...cases].some((one) => key(one) === key(name));
  const given = cases.filter((one) => (factors[one] ?? '').trim() !== '');
  const terms = given.flatMap((one) => {
    const factor = editedFactor(factors[one] ?? '');
    return factor === null || factor === 0 ? [] : [{ case: one, factor }];
  });
  const ready = name.trim() !== '' && !known && terms.length > 0 && terms.length === given.length;
  return (
    <fieldset className="my-3">
      <legend>A combination more</legend>
      <div className="flex flex-wrap items-end gap-3">
        <Field
          label="Its name"
          maxLength={200}
          value={name}
          error={known && name.trim() !== '' ? 'That name is taken.' : null}
          onChange={(event) => setName(event.target.value)}
        />
        <Segments
          label="Its purpose"
          options={purposes.map((value) => ({ value, label: value }))}
          value={purpose}
          onChange={(value) => setPurpose(value === 'service' ? 'service' : 'strength')}
        />
        {cases.map((one) => (
          <Field
            key={one}
            className="w-24"
            label={one}
            inputMode="decimal"
            value={factors[one] ?? ''}
            error={(factors[one] ?? '').trim() !== '' && editedFactor(factors[one] ?? '') === null ? 'no number' : null}
            onChange={(event) => setFactors({ ...factors, [one]: event.target.value })}
          />
        ))}
        <Button
          disabled={!ready}
          onClick={() => {
            onAdd({ name: name.trim(), purpose, terms });
            setName('');
            setFactors({});
          }}
        >
          Add the row
        </Button>
      </div>
    </fieldset>
  );
}
