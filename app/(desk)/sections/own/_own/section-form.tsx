'use client';
import { useState } from 'react';
import { dimensionWords, OwnSection } from '@/components/sections/own-section';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Segments } from '@/components/ui/segments';
import { Columns, Zone } from '@/components/ui/sheet';
import { RequestError } from '@/lib/api/fetch';
import { readOwnRecord } from '@/lib/intake/own/read-own-records';
import { unitLabel } from '@/lib/units/batch-unit';
import type { Quantity, System } from '@/lib/units/quantity';
import { errorsByField } from './errors-by-field';
import { useSaveOwn } from './use-save-own';

export interface FormStart {
  /** Null = a new one. */
  readonly id: number | null;
  readonly name: string;
  readonly units: System;
  readonly cells: Readonly<Record<string, string>>;
  readonly note: string;
  /** Of the version that saving makes. */
  readonly next: number;
}

const shapes = {
  I: { label: 'I', of: ['h', 'b', 'tw', 'tf', 'r'] },
  channel: { label: 'channel', of: ['h', 'b', 'tw', 'tf', 'r'] },
  rhs: { label: 'rectangular hollow', of: ['h', 'b', 't', 'r'] },
  chs: { label: 'round hollow', of: ['d', 't'] },
  bar: { label: 'flat or square bar', of: ['h', 'b'] },
  round: { label: 'round bar', of: ['d'] },
  none: { label: 'properties alone', of: ['h', 'b', 't'] },
} as const;
type ShapeName = keyof typeof shapes;

const ofNone = { h: 'depth', b: 'width', t: 'thickest part' } as const;

const properties: readonly (readonly [column: string, what: string, quantity: Quantity])[] = [
  ['A', 'area', 'area'],
  ['I', 'second moment, major axis', 'secondMoment'],
  ['W top', 'elastic modulus, top face', 'modulus'],
  ['W bottom', 'elastic modulus, bottom face', 'modulus'],
  ['Av', 'shear area along the depth', 'area'],
  ['Wpl', 'plastic modulus, major axis', 'modulus'],
  ['I minor', 'second moment, minor axis', 'secondMoment'],
  ['W minor', 'elastic modulus, minor axis', 'modulus'],
  ['Wpl minor', 'plastic modulus, minor axis', 'modulus'],
  ['It', 'torsion constant', 'secondMoment'],
  ['Iw', 'warping constant', 'warping'],
];

function shapeOf({ cells }: FormStart): ShapeName {
  const shape = cells['shape'];
  if (shape === 'bar') return (cells['d'] ?? '') === '' ? 'bar' : 'round';
  if (shape === 'I' || shape === 'channel' || shape === 'rhs' || shape === 'chs') return shape;
  return Object.keys(cells).length === 0 ? 'I' : 'none';
}

/** A section of the office's own, drawn to scale with what follows from its figures as they are typed; saved as a version. */
export function SectionForm({ start }: { readonly start: FormStart }) {
  const [name, setName] = useState(start.name);
  const [units, setUnits] = useState<System>(start.units);
  const [shape, setShape] = useState<ShapeName>(() => shapeOf(start));
  const [typed, setTyped] = useState<Readonly<Record<string, string>>>(start.cells);
  const [note, setNote] = useState(start.note);
  const [tried, setTried] = useState(false);
  const { of } = shapes[shape];
  const value = (column: string): string => typed[column] ?? '';
  const given = properties.map(([column]) => column).filter((column) => value(column).trim() !== '');
  const cells: Record<string, string> = {};
  for (const column of [...of, ...given]) if (value(column).trim() !== '') cells[column] = value(column).trim();
  if (shape !== 'none') cells['shape'] = shape === 'round' ? 'bar' : shape;
  if (value('material').trim() !== '') cells['material'] = value('material').trim();
  const record = { name: name.trim() === '' ? 'section' : name.trim(), units, cells };
  const read = readOwnRecord('section', record, note.trim());
  const wrong = errorsByField('section', read.problems);
  const warnings = read.problems.filter(({ severity }) => severity === 'warning');
  const section = read.records[0]?.section ?? null;
  const save = useSaveOwn('section', start.id, { ...record, name }, note);
  const sent = save.error instanceof RequestError ? save.error.body.fields : undefined;
  /** A blank field is told when saving is tried, a figure that cannot be as it is typed. */
  const errorOf = (field: string): string | null =>
    (tried || value(field) !== '' ? (wrong[field] ?? null) : null) ?? sent?.[field]?.[0] ?? null;
  const label = (column: string): string => {
    const word = shape === 'none' && column in ofNone ? ofNone[column as keyof typeof ofNone] : dimensionWords[column as 'h'];
    return `${word}, ${column}`;
  };
  const figure = (column: string, text: string, quantity: Quantity, hint?: string) => (
    <Field
      key={column}
      label={text}
      unit={unitLabel(quantity, units)}
      inputMode="decimal"
      autoComplete="off"
      value={value(column)}
      error={errorOf(column)}
      hint={hint}
      onChange={(event) => setTyped({ ...typed, [column]: event.target.value })}
    />
  );
  const nameError = (name.trim() !== '' ? (wrong['name'] ?? null) : tried ? 'Give it a name.' : null) ?? sent?.['name']?.[0];
  const main = (
    <form
      className="own-form"
      onSubmit={(event) => {
        event.preventDefault();
        setTried(true);
        if (section && name.trim() !== '') save.mutate();
      }}
    >
      {start.id === null && (
        <Field
          label="Name"
          hint="As members name it. A standard designation is refused, so that nobody takes the one for the other."
          maxLength={60}
          value={name}
          error={nameError ?? null}
          onChange={(event) => setName(event.target.value)}
        />
      )}
      <div className="own-choices">
        <Segments
          label="Shape"
          options={Object.entries(shapes).map(([one, { label: text }]) => ({ value: one, label: text }))}
          value={shape}
          onChange={(one) => setShape(one as ShapeName)}
        />
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
      <fieldset className="own-figures">
        <legend>{shape === 'none' ? 'Outer dimensions, where known' : 'Dimensions'}</legend>
        {of.map((column) =>
          figure(
            column,
            label(column),
            'dimension',
            column === 'r' ? (shape === 'rhs' ? 'blank: 1.5 t' : 'blank: 0') : undefined,
          ),
        )}
      </fieldset>
      <details className="own-properties" open={shape === 'none' || given.length > 0}>
        <summary>Published properties, used as given in place of derived ones</summary>
        <fieldset className="own-figures">
          <legend className="sr-only">Published properties</legend>
          {properties.map(([column, what, quantity]) => figure(column, `${what}, ${column}`, quantity))}
        </fieldset>
      </details>
      <Field
        label="Source"
        hint="Where the figures come from: a drawing, a maker’s table. It stands on the cover of what is computed with it."
        maxLength={300}
        value={note}
        error={sent?.['note']?.[0] ?? null}
        onChange={(event) => setNote(event.target.value)}
      />
      {warnings.map(({ column, message }) => (
        <Notice key={`${column} ${message}`} kind="near">
          {column}: {message}.
        </Notice>
      ))}
      {tried && wrong['shape'] && <Notice kind="error">{wrong['shape']}</Notice>}
      {save.error && sent === undefined && <Notice kind="error">{save.error.message}</Notice>}
      <p>
        <Button type="submit" look="filled" disabled={save.isPending}>
          Save as version {start.next}
        </Button>
      </p>
    </form>
  );
  return (
    <Columns
      main={<Zone title={start.id === null ? 'Figures' : `Figures of version ${start.next}`}>{main}</Zone>}
      side={
        <Zone title="What follows" note="as typed, not yet saved">
          {section ? (
            <OwnSection section={{ ...section, name: name.trim() === '' ? 'The section' : name.trim() }} units={units} />
          ) : (
            <p role="status">Give every figure of the shape: it is drawn to scale here, with its properties.</p>
          )}
        </Zone>
      }
    />
  );
}
