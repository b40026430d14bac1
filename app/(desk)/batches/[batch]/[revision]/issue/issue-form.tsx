'use client';
import { useMutation, useQuery } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useEffect, useState } from 'react';
import type { MakingProgress } from '@/app/_server/issue-preparing';
import { sizeText } from '@/components/issues/issue-data';
import { Area } from '@/components/ui/area';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { request, RequestError } from '@/lib/api/fetch';
import { readReportChoice } from '@/lib/reports/report-choice';

interface IssueFormProps {
  readonly address: string;
  readonly clients: readonly { readonly id: number; readonly name: string; readonly email: string; readonly holds: boolean }[];
  readonly frames: number;
  readonly flagged: number;
  readonly may: boolean;
  readonly making: MakingProgress | null;
}

type Frames = 'all' | 'flagged' | 'some';

/** To whom, with what note, which frames in the report; then how far its files are. */
export function IssueForm({ address, clients, frames, flagged, may, making }: IssueFormProps) {
  const router = useRouter();
  const [chosen, setChosen] = useState<ReadonlySet<number>>(() => new Set(clients.map(({ id }) => id)));
  const [which, setWhich] = useState<Frames>('all');
  const [some, setSome] = useState('');
  const [note, setNote] = useState('');
  const [begun, setBegun] = useState(making !== null);
  const asked = which === 'some' ? readReportChoice(some, frames) : null;
  const issue = useMutation({
    mutationFn: (json: object) => request(address, { method: 'POST', json }),
    onSuccess: () => setBegun(true),
  });
  if (begun) return <Making address={address} first={making} onEnd={() => router.refresh()} onFail={() => setBegun(false)} />;
  if (!may || clients.length === 0) return null;
  const fields = issue.error instanceof RequestError ? (issue.error.body.fields ?? {}) : {};
  const toggle = (id: number): void => {
    const next = new Set(chosen);
    if (!next.delete(id)) next.add(id);
    setChosen(next);
  };
  return (
    <form
      className="flex max-w-[68ch] flex-col gap-4"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        if (asked && 'wrong' in asked) return;
        issue.mutate({ clients: [...chosen], note, frames: asked ? asked.frames : which });
      }}
    >
      <fieldset>
        <legend className="field-head">Clients who get it, each by e-mail</legend>
        {clients.map(({ id, name, email, holds }) => (
          <label key={id} className="check-line">
            <input type="checkbox" checked={chosen.has(id) || holds} disabled={holds} onChange={() => toggle(id)} />
            {name} <span className="text-ink2">{email}</span>
            {holds && <span className="text-ink2">has the issue that this one takes the place of</span>}
          </label>
        ))}
        {fields.clients?.[0] && <p className="field-error">{fields.clients[0]}</p>}
      </fieldset>
      <Area
        label="Note, printed on the covers"
        value={note}
        maxLength={2000}
        onChange={(event) => setNote(event.target.value)}
        error={fields.note?.[0]}
      />
      <fieldset>
        <legend className="field-head">Frames that the calculation report shows one by one</legend>
        {(
          [
            ['all', `all ${frames.toLocaleString('en-GB')}`],
            ['flagged', `those over or not checked (${flagged.toLocaleString('en-GB')})`],
            ['some', 'some, by their numbers in sheet order'],
          ] as const
        ).map(([value, label]) => (
          <label key={value} className="check-line">
            <input type="radio" name="frames" checked={which === value} onChange={() => setWhich(value)} /> {label}
          </label>
        ))}
        {which === 'some' && (
          <Field
            label="Frames"
            value={some}
            onChange={(event) => setSome(event.target.value)}
            placeholder="1-12, 20"
            autoComplete="off"
            error={some !== '' && asked && 'wrong' in asked ? asked.wrong : (fields.frames?.[0] ?? null)}
          />
        )}
        <p className="field-hint">The result workbook has every frame, whatever is chosen here.</p>
      </fieldset>
      <p>
        <Button type="submit" look="filled" disabled={issue.isPending || (asked !== null && 'wrong' in asked)}>
          Issue to {chosen.size === 1 ? '1 client' : `${chosen.size} clients`}
        </Button>
      </p>
      <p className="text-ink2">
        With this you approve it: your name and today’s date stand on the covers. It can be withdrawn, but not taken back.
      </p>
      {issue.error && Object.keys(fields).length === 0 && <Notice kind="error">{issue.error.message}</Notice>}
    </form>
  );
}

interface MakingProps {
  readonly address: string;
  readonly first: MakingProgress | null;
  readonly onEnd: () => void;
  readonly onFail: () => void;
}

/** How far the files are; it may be left, and goes on. */
function Making({ address, first, onEnd, onFail }: MakingProps) {
  const { data } = useQuery({
    queryKey: ['making', address],
    queryFn: () => request<{ issue: MakingProgress | null }>(address),
    refetchInterval: 700,
    staleTime: 0,
  });
  const at = data?.issue ?? first;
  const state = data?.issue?.state;
  useEffect(() => {
    if (state === undefined || state === 'making') return;
    if (state === 'failed') onFail();
    onEnd();
  }, [state, onEnd, onFail]);
  return (
    <div role="status" aria-live="polite">
      <p>
        {at === null || at.files.of === 0
          ? 'Its files wait for their turn.'
          : at.files.done < at.files.of
            ? `Making file ${at.files.done + 1} of ${at.files.of}: ${sizeText(at.bytes)} so far.`
            : 'Its files are made; clients are being told.'}
      </p>
      <progress value={at?.files.done ?? 0} max={at?.files.of || 1} aria-label="Files made" />
      <p className="text-ink2">You may leave this page. Clients are told once every file is there.</p>
    </div>
  );
}
