'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Area } from '@/components/ui/area';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { request, RequestError } from '@/lib/api/fetch';

/** Withdraws an issue with its reason: for good. */
export function Withdraw({ address, number }: { readonly address: string; readonly number: string }) {
  const router = useRouter();
  const [reason, setReason] = useState('');
  const withdraw = useMutation({
    mutationFn: () => request(address, { method: 'POST', json: { reason } }),
    onSuccess: () => router.refresh(),
  });
  const wrong = withdraw.error instanceof RequestError ? withdraw.error.body.fields?.reason?.[0] : undefined;
  return (
    <form
      className="flex flex-col gap-2"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        withdraw.mutate();
      }}
    >
      <Area
        label="What is wrong, as everyone who has it will read it"
        value={reason}
        maxLength={1000}
        onChange={(event) => setReason(event.target.value)}
        error={wrong}
      />
      <p>
        <Button type="submit" disabled={withdraw.isPending || reason.trim() === ''}>
          Withdraw {number}
        </Button>
      </p>
      {withdraw.error && !wrong && <Notice kind="error">{withdraw.error.message}</Notice>}
    </form>
  );
}

interface SendToMoreProps {
  readonly address: string;
  readonly clients: readonly { readonly id: number; readonly name: string }[];
}

/** Sends the issue to clients of the project who don’t have it yet. */
export function SendToMore({ address, clients }: SendToMoreProps) {
  const router = useRouter();
  const [chosen, setChosen] = useState<ReadonlySet<number>>(new Set());
  const send = useMutation({
    mutationFn: () => request(address, { method: 'POST', json: { clients: [...chosen] } }),
    onSuccess: () => router.refresh(),
  });
  const toggle = (id: number): void => {
    const next = new Set(chosen);
    if (!next.delete(id)) next.add(id);
    setChosen(next);
  };
  return (
    <fieldset className="pt-3">
      <legend className="field-head">Clients of the project who don’t have it</legend>
      {clients.map(({ id, name }) => (
        <label key={id} className="check-line">
          <input type="checkbox" checked={chosen.has(id)} onChange={() => toggle(id)} /> {name}
        </label>
      ))}
      <p className="flex items-center gap-3">
        <Button onClick={() => send.mutate()} disabled={send.isPending || chosen.size === 0}>
          Send to {chosen.size === 1 ? '1 client' : `${chosen.size} clients`}
        </Button>
        <span role="status">{send.error?.message ?? ''}</span>
      </p>
    </fieldset>
  );
}
