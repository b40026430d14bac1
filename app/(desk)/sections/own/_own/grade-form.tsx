'use client';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Segments } from '@/components/ui/segments';
import { Zone } from '@/components/ui/sheet';
import { RequestError } from '@/lib/api/fetch';
import { readOwnRecord } from '@/lib/intake/own/read-own-records';
import { unitLabel } from '@/lib/units/batch-unit';
import type { Quantity, System } from '@/lib/units/quantity';
import { errorsByField } from './errors-by-field';
import type { FormStart } from './section-form';
import { useSaveOwn } from './use-save-own';

const figures: readonly (readonly [column: string, label: string, quantity: Quantity, hint?: string])[] = [
  ['E', 'elastic modulus, E', 'stress'],
  ['G', 'shear modulus, G', 'stress', 'Blank: checks and analyses that need it say so.'],
  ['fu', 'tensile strength, fu', 'stress'],
  ['density', 'density', 'density', 'For self-weight and mass.'],
  ['expansion', 'expansion', 'expansion', 'For temperature.'],
];

interface Step {
  readonly fy: string;
  readonly upTo: string;
}

/** `355 MPa to 16 mm; 345 MPa to 40 mm` ↔ the rows of a form, in the units of the form. */
function stepsOf(text: string, fy: string): Step[] {
  const steps = text.split(';').flatMap((piece): Step[] => {
    const [, strength, upTo] = /^\s*([\d.]+)\s*\S+\s+(?:up\s*)?to\s+([\d.]+)/i.exec(piece) ?? [];
    return strength !== undefined && upTo !== undefined ? [{ fy: strength, upTo }] : [];
  });
  return steps.length > 0 ? steps : [{ fy, upTo: '' }];
}

/** A steel grade of the office's own: its strength by thickness and its constants; saved as a version. */
export function GradeForm({ start }: { readonly start: FormStart }) {
  const [name, setName] = useState(start.name);
  const [units, setUnits] = useState<System>(start.units);
  const [typed, setTyped] = useState<Readonly<Record<string, string>>>(start.cells);
  const [steps, setSteps] = useState<readonly Step[]>(() =>
    stepsOf(start.cells['fy by thickness'] ?? '', start.cells['fy'] ?? ''),
  );
  const [note, setNote] = useState(start.note);
  const [tried, setTried] = useState(false);
  const [stress, thickness] = [unitLabel('stress', units), unitLabel('dimension', units)];
  const cells: Record<string, string> = {};
  for (const [column] of figures) if ((typed[column] ?? '').trim() !== '') cells[column] = (typed[column] ?? '').trim();
  if ((typed['grade'] ?? '') !== '') cells['grade'] = typed['grade'] ?? '';
  const filled = steps.filter(({ fy, upTo }) => fy.trim() !== '' || upTo.trim() !== '');
  const [only] = filled;
  if (only && filled.length === 1 && only.upTo.trim() === '') cells['fy'] = only.fy.trim();
  else if (filled.length > 0) {
    const plain = (text: string): string => text.trim().replace(',', '.');
    cells['fy by thickness'] = filled.map(({ fy, upTo }) => `${plain(fy)} ${stress} to ${plain(upTo)} ${thickness}`).join('; ');
  }
  const record = { name: name.trim() === '' ? 'grade' : name.trim(), units, cells };
  const read = readOwnRecord('material', record, note.trim());
  const wrong = errorsByField('material', read.problems);
  const warnings = read.problems.filter(({ severity }) => severity === 'warning');
  const save = useSaveOwn('material', start.id, { ...record, name }, note);
  const sent = save.error instanceof RequestError ? save.error.body.fields : undefined;
  const errorOf = (field: string): string | null =>
    (tried || (typed[field] ?? '') !== '' ? (wrong[field] ?? null) : null) ?? sent?.[field]?.[0] ?? null;
  const edit = (at: number, part: Partial<Step>): void =>
    setSteps(steps.map((step, i) => (i === at ? { ...step, ...part } : step)));
  const noE = tried && (wrong['grade'] ?? null) !== null ? 'Give the elastic modulus.' : null;
  return (
    <Zone title={start.id === null ? 'Figures' : `Figures of version ${start.next}`}>
      <form
        className="own-form"
        onSubmit={(event) => {
          event.preventDefault();
          setTried(true);
          if (read.records.length > 0 && name.trim() !== '') save.mutate();
        }}
      >
        {start.id === null && (
          <Field
            label="Name"
            hint="As Members, Sections and Setup name it. A standard grade is refused."
            maxLength={60}
            value={name}
            error={(name.trim() !== '' ? wrong['name'] : tried ? 'Give it a name.' : null) ?? sent?.['name']?.[0] ?? null}
            onChange={(event) => setName(event.target.value)}
          />
        )}
        <div className="own-choices">
          <Segments
            label="Units"
            options={[
              { value: 'metric', label: 'metric' },
              { value: 'us', label: 'US' },
            ]}
            value={units}
            onChange={(one) => setUnits(one === 'us' ? 'us' : 'metric')}
          />
        </div>
        <fieldset className="own-steps">
          <legend>Yield strength by thickness of the thickest part, thinnest first</legend>
          {steps.map((step, i) => (
            <div key={i} className="own-step">
              <Field
                label={`Yield strength ${i + 1}`}
                unit={stress}
                inputMode="decimal"
                value={step.fy}
                onChange={(event) => edit(i, { fy: event.target.value })}
              />
              <Field
                label={`to a thickness of, ${i + 1}`}
                unit={thickness}
                inputMode="decimal"
                value={step.upTo}
                onChange={(event) => edit(i, { upTo: event.target.value })}
              />
              {steps.length > 1 && (
                <button
                  type="button"
                  className="link"
                  aria-label={`Take away step ${i + 1}`}
                  onClick={() => setSteps(steps.filter((_, at) => at !== i))}
                >
                  Take away
                </button>
              )}
            </div>
          ))}
          <p className="field-hint">
            One strength without a thickness holds for every thickness. Above the last thickness no strength is known: checks say
            so.
          </p>
          {(tried || filled.length > 0) && (wrong['fy by thickness'] ?? wrong['fy']) && (
            <p className="field-error" role="alert">
              {wrong['fy by thickness'] ?? wrong['fy']}
            </p>
          )}
          <Button disabled={steps.length >= 12} onClick={() => setSteps([...steps, { fy: '', upTo: '' }])}>
            Add a thickness
          </Button>
        </fieldset>
        <fieldset className="own-figures">
          <legend>Constants</legend>
          {figures.map(([column, label, quantity, hint]) => (
            <Field
              key={column}
              label={label}
              unit={unitLabel(quantity, units)}
              inputMode="decimal"
              autoComplete="off"
              value={typed[column] ?? ''}
              hint={hint}
              error={errorOf(column) ?? (column === 'E' ? noE : null)}
              onChange={(event) => setTyped({ ...typed, [column]: event.target.value })}
            />
          ))}
        </fieldset>
        <Field
          label="Source"
          hint="Where the figures come from: a mill’s certificate, tests. It stands on the cover of what is computed with it."
          maxLength={300}
          value={note}
          onChange={(event) => setNote(event.target.value)}
        />
        {warnings.map(({ column, message }) => (
          <Notice key={`${column} ${message}`} kind="near">
            {column}: {message}.
          </Notice>
        ))}
        {save.error && sent === undefined && <Notice kind="error">{save.error.message}</Notice>}
        <p>
          <Button type="submit" look="filled" disabled={save.isPending}>
            Save as version {start.next}
          </Button>
        </p>
      </form>
    </Zone>
  );
}
