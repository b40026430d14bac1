'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useId, useState } from 'react';
import { RuleFields } from '@/components/combination-sets/rule-fields';
import { WhatItMakes } from '@/components/combination-sets/what-it-makes';
import { Area } from '@/components/ui/area';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { Segments } from '@/components/ui/segments';
import { api, pages } from '@/lib/api/addresses';
import { request, RequestError } from '@/lib/api/fetch';
import { type OfficeRule, type OfficeSet, rulesOf } from '@/lib/combinations/office-set';
import { readRuleSet, ruleSetNames } from '@/lib/combinations/read-rule-set';
import { readRule } from '@/lib/combinations/rule-text';

interface EditSetProps {
  /** The version that is changed; null = a new set is made. */
  readonly from: (OfficeSet & { readonly set: number; readonly version: number }) | null;
}

const empty: OfficeRule = { from: '', purpose: 'strength', suffix: '', rule: '' };
const ways = [
  { value: 'no', label: 'each alone and together' },
  { value: 'yes', label: 'all together' },
] as const;
const levels = [
  { value: 'factored', label: 'factored loads' },
  { value: 'allowable', label: 'loads of allowable stress' },
] as const;

/** Makes a set of the office's own, or the next version of one. */
export function EditSet({ from }: EditSetProps) {
  const router = useRouter();
  const baseId = useId();
  const [name, setName] = useState(from?.name ?? '');
  const [basedOn, setBasedOn] = useState<string | null>(from?.basedOn ?? null);
  const [level, setLevel] = useState<OfficeSet['level']>(from?.level ?? 'factored');
  const [together, setTogether] = useState(from?.together ?? false);
  const [rules, setRules] = useState<readonly OfficeRule[]>(from?.rules ?? [empty]);
  const [provenance, setProvenance] = useState(from?.provenance ?? '');
  const save = useMutation({
    mutationFn: () => {
      const content = { basedOn, level, together, rules, provenance };
      return from === null
        ? request<{ set: number }>(api.combinationSets, { method: 'POST', json: { name, ...content } })
        : request<{ set: number }>(api.combinationSet(from.set), { method: 'POST', json: { after: from.version, ...content } });
    },
    onSuccess: ({ set }) => {
      router.push(pages.combinationSet(set));
      router.refresh();
    },
  });
  const begin = (text: string) => {
    const { set } = text === '' ? { set: null } : readRuleSet(text);
    setBasedOn(set === null ? null : set.name);
    setRules(set === null ? [empty] : rulesOf(text));
    if (set !== null) setLevel(set.level);
  };
  const wrong = rules.filter(({ rule }) => readRule(rule).wrong !== null).length;
  const unsaid = rules.filter((rule) => rule.from.trim() === '').length;
  const fields = save.error instanceof RequestError ? (save.error.body.fields ?? {}) : {};
  const ready = name.trim() !== '' && provenance.trim() !== '' && rules.length > 0 && wrong + unsaid === 0 && !save.isPending;
  const missing = [
    ...(name.trim() === '' ? ['its name'] : []),
    ...(provenance.trim() === '' ? ['where it is from'] : []),
    ...(unsaid > 0 ? [`where ${unsaid === 1 ? 'a rule is' : `${unsaid} rules are`} from`] : []),
    ...(wrong > 0 ? [`${wrong === 1 ? 'a rule' : `${wrong} rules`} that can be read`] : []),
    ...(rules.length === 0 ? ['at least one rule'] : []),
  ];
  return (
    <form
      className="flex flex-col gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        if (ready) save.mutate();
      }}
    >
      {from === null && (
        <div className="grid max-w-3xl gap-3 min-[700px]:grid-cols-2">
          <Field
            label="Name"
            maxLength={100}
            value={name}
            error={fields['name']?.[0] ?? null}
            onChange={(event) => setName(event.target.value)}
          />
          <div className="field">
            <div className="field-head">
              <label htmlFor={baseId}>Begun from</label>
            </div>
            <div className="field-box">
              <select id={baseId} value={basedOn ?? ''} onChange={(event) => begin(event.target.value)}>
                <option value="">nothing</option>
                {ruleSetNames.map((each) => (
                  <option key={each}>{each}</option>
                ))}
              </select>
            </div>
            <p className="field-hint">Its rules are copied here to be changed. What is typed below is lost.</p>
          </div>
        </div>
      )}
      <div className="flex flex-wrap gap-x-8 gap-y-3">
        <div>
          <div className="field-head">Strength combinations hold</div>
          <Segments
            label="Strength combinations hold"
            options={levels}
            value={level}
            onChange={(value) => setLevel(value === 'allowable' ? 'allowable' : 'factored')}
          />
        </div>
        <div>
          <div className="field-head">Cases of one kind act</div>
          <Segments
            label="Cases of one kind act"
            options={ways}
            value={together ? 'yes' : 'no'}
            onChange={(value) => setTogether(value === 'yes')}
          />
        </div>
      </div>
      <p className="max-w-3xl">
        A rule is written like <b>1.35/1.0 dead + 1.5 live + [1.5×0.6 wind]</b>: high and low factor on what is permanent, γ of
        the leading action, and in brackets γ × ψ of one that accompanies it, which acts or not, whichever is worse. Kinds that
        are one action stand together: 1.6 live and crane.
      </p>
      <RuleFields rules={rules} onChange={setRules} />
      <p>
        <Button onClick={() => setRules([...rules, { ...empty, from: rules.at(-1)?.from ?? '' }])}>Add a rule</Button>
      </p>
      <WhatItMakes set={{ name, basedOn, level, together, rules, provenance }} />
      <div className="max-w-3xl">
        <Area
          label="Where the figures are from, and who agreed to them"
          maxLength={2000}
          value={provenance}
          onChange={(event) => setProvenance(event.target.value)}
        />
      </div>
      {save.error && !fields['name'] && <Notice kind="error">{save.error.message}</Notice>}
      <p role="status">{missing.length > 0 ? `It still needs ${missing.join(', ')}.` : ''}</p>
      <p>
        <Button type="submit" look="filled" disabled={!ready}>
          {from === null ? 'Keep the set' : `Keep it as version ${from.version + 1}`}
        </Button>
      </p>
    </form>
  );
}
