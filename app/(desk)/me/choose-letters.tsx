'use client';
import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';

interface ChooseLettersProps {
  readonly kinds: readonly { readonly kind: string; readonly when: string; readonly wanted: boolean }[];
}

/** Which kinds of letters one gets. */
export function ChooseLetters({ kinds }: ChooseLettersProps) {
  const [wanted, setWanted] = useState<ReadonlySet<string>>(
    () => new Set(kinds.filter((one) => one.wanted).map((one) => one.kind)),
  );
  const save = useMutation({
    mutationFn: () => {
      const letters = Object.fromEntries(kinds.map(({ kind }) => [kind, wanted.has(kind)]));
      return request(api.ownLetters, { method: 'PUT', json: { letters } });
    },
  });
  const toggle = (kind: string) => {
    save.reset();
    const next = new Set(wanted);
    if (!next.delete(kind)) next.add(kind);
    setWanted(next);
  };
  return (
    <fieldset className="flex flex-col gap-2">
      <legend className="mb-2">A letter when</legend>
      {kinds.map(({ kind, when }) => (
        <label key={kind} className="flex items-center gap-2">
          <input type="checkbox" checked={wanted.has(kind)} onChange={() => toggle(kind)} />
          {when}
        </label>
      ))}
      <p className="field-hint">Invitations, new passwords and withdrawals are always sent.</p>
      <p className="flex items-center gap-3">
        <Button onClick={() => save.mutate()} disabled={save.isPending}>
          Save
        </Button>
        <span role="status">{save.isSuccess ? 'Saved.' : (save.error?.message ?? '')}</span>
      </p>
    </fieldset>
  );
}
