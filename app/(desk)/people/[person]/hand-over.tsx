'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Choice } from '@/components/ui/choice';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';

interface HandOverProps {
  readonly person: number;
  readonly leads: boolean;
  readonly takers: readonly { readonly id: number; readonly name: string; readonly role: string }[];
}

/** Hands batches and projects, and the lead’s role where asked, to someone else. */
export function HandOver({ person, leads, takers }: HandOverProps) {
  const router = useRouter();
  const [to, setTo] = useState<string | null>(null);
  const [lead, setLead] = useState(false);
  const hand = useMutation({
    mutationFn: () => request(api.transfer(person), { method: 'POST', json: { to: Number(to), lead } }),
    onSuccess: () => router.refresh(),
  });
  if (takers.length === 0) return <p>There is nobody else of the office who could take it over.</p>;
  return (
    <div className="flex flex-col gap-3">
      <p>
        Letters about their batches go to{' '}
        <Choice
          label="who takes it over"
          options={takers.map(({ id, name, role }) => ({ value: String(id), label: `${name}, ${role}` }))}
          value={to === null ? [] : [to]}
          onChange={([value]) => {
            hand.reset();
            setTo(value ?? null);
          }}
        />{' '}
        from then on. Who prepared what stays as it was.
      </p>
      {leads && (
        <label className="flex items-center gap-2">
          <input type="checkbox" checked={lead} onChange={(event) => setLead(event.target.checked)} />
          the lead’s role too, in exchange for theirs
        </label>
      )}
      <p className="flex flex-wrap items-center gap-3">
        <Button onClick={() => hand.mutate()} disabled={to === null || hand.isPending}>
          Hand it over
        </Button>
        <span role="status">{hand.isSuccess ? 'Handed over.' : (hand.error?.message ?? '')}</span>
      </p>
    </div>
  );
}
