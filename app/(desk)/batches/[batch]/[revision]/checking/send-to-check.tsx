'use client';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';

interface SendToCheckProps {
  readonly batch: number;
  readonly letter: string;
  /** Names of those who may check it; [] = nobody of the office. */
  readonly checkers: readonly string[];
  readonly again: boolean;
}

/** The preparer hands a revision to a second engineer, with a note. */
export function SendToCheck({ batch, letter, checkers, again }: SendToCheckProps) {
  const router = useRouter();
  const client = useQueryClient();
  const field = useId();
  const [note, setNote] = useState('');
  const send = useMutation({
    mutationFn: () => request(api.checking(batch, letter), { method: 'POST', json: { note } }),
    onSuccess: async () => {
      router.refresh();
      await client.invalidateQueries({ predicate: ({ queryKey }) => String(queryKey[0]).startsWith('checking') });
    },
  });
  const nobody = checkers.length === 0;
  return (
    <form
      className="ck-form max-w-2xl"
      onSubmit={(event) => {
        event.preventDefault();
        send.mutate();
      }}
    >
      <p>
        {nobody
          ? 'Nobody of the office may check it: everyone who could has had a hand in it. The lead adds a checker.'
          : `It may be checked by ${checkers.join(', ')}. They get a letter.`}{' '}
        From then on revision {letter} is frozen: a change makes the next one.
      </p>
      <label htmlFor={field}>Note to the checker</label>
      <textarea id={field} rows={3} maxLength={2000} value={note} onChange={(event) => setNote(event.target.value)} />
      <div className="ck-buttons">
        <Button type="submit" look="filled" disabled={nobody || send.isPending}>
          Send revision {letter} to check{again ? ' again' : ''}
        </Button>
      </div>
      {send.error && <Notice kind="error">{send.error.message}</Notice>}
    </form>
  );
}
