'use client';
import { useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Segments } from '@/components/ui/segments';
import type { Measure } from '@/lib/model/frame';
import { limitPresets } from '@/lib/model/limit-presets';
import { limitKey, limitedBy, type OfficeLimit, ofNodes } from '@/lib/model/office-limit';

interface AddLimitProps {
  /** Keys of the limits that there are. */
  readonly known: readonly string[];
  readonly busy: boolean;
  readonly onAdd: (limit: OfficeLimit) => void;
}

const measures = ['deflection', 'sway', 'displacement', 'spread'] as const;
const directions = ['resultant', 'x', 'y'] as const;
const figure = (text: string): number => Number(text.replace(',', '.'));

/** A limit to add: its measure, whose, how much, in which combinations, and where the figure is from. */
export function AddLimit({ known, busy, onAdd }: AddLimitProps) {
  const [roleId, presetId] = [useId(), useId()];
  const [measure, setMeasure] = useState<Measure>('deflection');
  const [role, setRole] = useState<string>('beam');
  const [place, setPlace] = useState('');
  const [toPlace, setToPlace] = useState('');
  const [direction, setDirection] = useState<(typeof directions)[number]>('resultant');
  const [ratio, setRatio] = useState('');
  const [millimetres, setMillimetres] = useState('');
  const [combination, setCombination] = useState('');
  const [source, setSource] = useState('');
  const nodes = ofNodes(measure);
  const n = ratio.trim() === '' || measure === 'displacement' ? null : figure(ratio);
  const mm = millimetres.trim() === '' ? null : figure(millimetres);
  const soundRatio = n === null || (n >= 1 && n <= 10_000);
  const soundMillimetres = mm === null || (mm > 0 && mm <= 10_000);
  const limit: OfficeLimit = {
    appliesTo: nodes ? place.trim() || '*' : role,
    measure,
    ratio: n,
    source: source.trim(),
    ...(mm === null ? {} : { absolute_m: mm / 1000 }),
    ...(measure === 'displacement' && direction !== 'resultant' ? { direction } : {}),
    ...(measure === 'spread' ? { toPlace: toPlace.trim() } : {}),
    ...(combination.trim() === '' ? {} : { combination: combination.trim() }),
  };
  const sound = soundRatio && soundMillimetres && (n !== null || mm !== null) && (measure !== 'spread' || toPlace.trim() !== '');
  const own = limitPresets.filter((preset) => preset.measure === measure);
  return (
    <form
      className="mt-6 flex max-w-xl flex-col gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        if (!sound) return;
        onAdd(limit);
        setRatio('');
        setMillimetres('');
        setSource('');
      }}
    >
      <h2>Add a limit</h2>
      <Segments
        label="Measure"
        options={measures.map((value) => ({ value, label: value }))}
        value={measure}
        onChange={(value) => setMeasure(measures.find((one) => one === value) ?? 'deflection')}
      />
      {nodes ? (
        <Field
          label={measure === 'spread' ? 'Between nodes at' : 'Nodes at'}
          maxLength={100}
          hint="A place as the Nodes sheet names it (eaves, apex, tip), or a role; blank: all nodes."
          value={place}
          onChange={(event) => setPlace(event.target.value)}
        />
      ) : (
        <div className="field">
          <div className="field-head">
            <label htmlFor={roleId}>Applies to</label>
          </div>
          <div className="field-box">
            <select id={roleId} value={role} onChange={(event) => setRole(event.target.value)}>
              {limitedBy.map((one) => (
                <option key={one} value={one}>
                  {one === '*' ? 'all members' : `role ${one}`}
                </option>
              ))}
            </select>
          </div>
        </div>
      )}
      {measure === 'spread' && (
        <Field label="And nodes at" maxLength={100} value={toPlace} onChange={(event) => setToPlace(event.target.value)} />
      )}
      {measure === 'displacement' && (
        <Segments
          label="Direction"
          options={directions.map((value) => ({ value, label: value === 'resultant' ? 'in any direction' : `in ${value}` }))}
          value={direction}
          onChange={(value) => setDirection(directions.find((one) => one === value) ?? 'resultant')}
        />
      )}
      {own.length > 0 && (
        <div className="field">
          <div className="field-head">
            <label htmlFor={presetId}>Copied from</label>
          </div>
          <div className="field-box">
            <select
              id={presetId}
              value=""
              onChange={(event) => {
                const preset = own.find(({ id }) => id === event.target.value);
                if (!preset) return;
                setRatio(String(preset.ratio));
                setSource(`${preset.source}: ${preset.what}`);
              }}
            >
              <option value="">a published limit …</option>
              {own.map((preset) => (
                <option key={preset.id} value={preset.id}>
                  {preset.source}: {preset.what}, {measure === 'sway' ? 'h' : 'L'}/{preset.ratio}
                </option>
              ))}
            </select>
          </div>
          <p className="field-hint">Where its source names one load alone, name the combinations that hold that load below.</p>
        </div>
      )}
      {measure !== 'displacement' && (
        <Field
          label={measure === 'sway' ? 'n of h/n' : measure === 'spread' ? 'n of distance/n' : 'n of L/n'}
          inputMode="decimal"
          value={ratio}
          error={soundRatio ? null : 'Give a figure from 1 to 10,000, like 250.'}
          onChange={(event) => setRatio(event.target.value)}
        />
      )}
      <Field
        label="Movement allowed"
        unit="mm"
        inputMode="decimal"
        hint={measure === 'displacement' ? undefined : 'With both, the smaller holds.'}
        value={millimetres}
        error={soundMillimetres ? null : 'Give millimetres above 0, like 50.'}
        onChange={(event) => setMillimetres(event.target.value)}
      />
      <Field
        label="In combinations"
        maxLength={300}
        hint="The name of a service combination, with * for anything: * (frequent). Blank: every service combination."
        value={combination}
        onChange={(event) => setCombination(event.target.value)}
      />
      <Field
        label="Source"
        maxLength={200}
        hint="It stands with every check against this limit. Blank: the office’s own."
        value={source}
        onChange={(event) => setSource(event.target.value)}
      />
      <p>
        <Button type="submit" look="filled" disabled={!sound || busy}>
          {known.includes(limitKey(limit)) ? 'Put it in place of the one there is' : 'Add the limit'}
        </Button>
      </p>
    </form>
  );
}
