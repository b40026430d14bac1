'use client';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useId, useState } from 'react';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import type { CheckingDetail } from '@/app/_server/checking-detail';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';
import { whyNotPass } from '@/lib/checking/why-not-pass';

interface PassOrReturnProps {
  readonly batch: number;
  readonly letter: string;
  readonly detail: CheckingDetail;
}

/** The foot of the checker's desk: what stands against passing, written out; return with a note, or pass. */
export function PassOrReturn({ batch, letter, detail }: PassOrReturnProps) {
  const router = useRouter();
  const client = useQueryClient();
  const field = useId();
  const [note, setNote] = useState('');
  const act = useMutation({
    mutationFn: (to: 'return' | 'pass') => request(api.checking(batch, letter, to), { method: 'POST', json: { note } }),
    onSuccess: async () => {
      setNote('');
      router.refresh();
      await client.invalidateQueries({ predicate: ({ queryKey }) => String(queryKey[0]).startsWith('checking') });
    },
  });
  const { whyNotReturn, whyNotCheck, state, acts, progress } = detail;
  const against = detail.mayMark ? whyNotPass(progress) : detail.whyNotPass;
  if (state !== 'to check' && state !== 'checked') return null;
  const preparer = acts.findLast(({ what }) => what === 'sent')?.by ?? 'who prepared it';
  const unnoted = note.trim() === '';
  if (whyNotCheck !== null)
    return (
      <div className="ck-bar">
        <p>
          <b>You may not pass or return this revision.</b> {whyNotCheck}
          {state === 'to check' && detail.checkers.length > 0 && ` It may be checked by ${detail.checkers.join(', ')}.`}
        </p>
      </div>
    );
  return (
    <div className="ck-bar">
      <div className="ck-form">
        {state === 'to check' && (
          <p>
            <b>Passing needs every listed frame seen, every query closed, every over and not checked accepted.</b>{' '}
            {against.length > 0 ? against.join(' ') : 'Nothing stands against it.'} You did not prepare this revision, so you may
            pass it.
          </p>
        )}
        {state === 'checked' && <p>Passed. As long as it is not issued it may still be returned.</p>}
        <label htmlFor={field}>Note{unnoted ? ': needed to return it' : ''}</label>
        <textarea id={field} rows={2} maxLength={2000} value={note} onChange={(event) => setNote(event.target.value)} />
        {act.error && <Notice kind="error">{act.error.message}</Notice>}
      </div>
      <div className="ck-buttons">
        <Button look="checker" disabled={whyNotReturn !== null || unnoted || act.isPending} onClick={() => act.mutate('return')}>
          Return to {preparer}
        </Button>
        {state === 'to check' && (
          <Button look="checker" disabled={against.length > 0 || act.isPending} onClick={() => act.mutate('pass')}>
            Pass revision {letter}
          </Button>
        )}
      </div>
    </div>
  );
}
