'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useId, useState } from 'react';
import { LimitTable } from '@/components/limits/limit-table';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Segments } from '@/components/ui/segments';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';
import { limitPresets } from '@/lib/model/limit-presets';
import { limitedBy, type OfficeLimit } from '@/lib/model/office-limit';

const measures = ['deflection', 'sway'] as const;

/** The lead adds a limit, by a published one or by a figure of the office's own, and takes limits away. */
export function EditLimits({ limits }: { readonly limits: readonly OfficeLimit[] }) {
  const router = useRouter();
  const [roleId, presetId] = [useId(), useId()];
  const [appliesTo, setAppliesTo] = useState<OfficeLimit['appliesTo']>('beam');
  const [measure, setMeasure] = useState<OfficeLimit['measure']>('deflection');
  const [ratio, setRatio] = useState('');
  const [source, setSource] = useState('');
  const save = useMutation({
    mutationFn: (list: readonly OfficeLimit[]) => request(api.limits, { method: 'PUT', json: { limits: list } }),
    onSuccess: () => router.refresh(),
  });
  const n = Number(ratio.replace(',', '.'));
  const sound = ratio.trim() !== '' && n >= 1 && n <= 10_000;
  const same = (one: OfficeLimit) => one.appliesTo === appliesTo && one.measure === measure;
  const known = limits.some(same);
  const add = () => {
    save.mutate([...limits.filter((one) => !same(one)), { appliesTo, measure, ratio: n, source: source.trim() }]);
    setRatio('');
    setSource('');
  };
  const own = limitPresets.filter((preset) => preset.measure === measure);
  return (
    <>
      <LimitTable
        limits={limits}
        acts={{
          heading: 'Take away',
          of: (index) => (
            <button
              type="button"
              className="link"
              disabled={save.isPending}
              aria-label={`Take away ${limits[index]?.measure ?? ''} of ${limits[index]?.appliesTo ?? ''}`}
              onClick={() => save.mutate(limits.filter((_, i) => i !== index))}
            >
              Take away
            </button>
          ),
        }}
      />
      <form
        className="mt-6 flex max-w-xl flex-col gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          if (sound) add();
        }}
      >
        <h2>Add a limit</h2>
        <Segments
          label="Measure"
          options={measures.map((value) => ({ value, label: value }))}
          value={measure}
          onChange={(value) => setMeasure(value === 'sway' ? 'sway' : 'deflection')}
        />
        <div className="field">
          <div className="field-head">
            <label htmlFor={roleId}>Applies to</label>
          </div>
          <div className="field-box">
            <select
              id={roleId}
              value={appliesTo}
              onChange={(event) => setAppliesTo(limitedBy.find((one) => one === event.target.value) ?? '*')}
            >
              {limitedBy.map((one) => (
                <option key={one} value={one}>
                  {one === '*' ? 'all members' : `role ${one}`}
                </option>
              ))}
            </select>
          </div>
        </div>
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
          <p className="field-hint">A limit of the office holds in every service combination, whatever load its source names.</p>
        </div>
        <Field
          label={measure === 'sway' ? 'n of h/n' : 'n of L/n'}
          inputMode="decimal"
          value={ratio}
          error={ratio.trim() !== '' && !sound ? 'Give a figure from 1 to 10,000, like 250.' : null}
          onChange={(event) => setRatio(event.target.value)}
        />
        <Field
          label="Source"
          maxLength={200}
          hint="It stands with every check against this limit. Blank: the office’s own."
          value={source}
          onChange={(event) => setSource(event.target.value)}
        />
        <p>
          <Button type="submit" look="filled" disabled={!sound || save.isPending}>
            {known ? 'Put it in place of the one there is' : 'Add the limit'}
          </Button>
        </p>
        {save.error && <Notice kind="error">{save.error.message}</Notice>}
      </form>
    </>
  );
}
