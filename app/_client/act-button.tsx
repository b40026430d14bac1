'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { request } from '@/lib/api/fetch';

interface ActButtonProps {
  readonly label: string;
  readonly address: string;
  readonly method: 'POST' | 'PUT' | 'DELETE';
  readonly json?: unknown;
  /** Asked before it is done: "Disable Ivo? They are signed out at once." */
  readonly question?: string;
  /** In a table's row: as a link looks. */
  readonly quiet?: boolean;
  /** Said when it is done; the page is read again besides. */
  readonly done?: string;
}

/** One act at one address, asked back where it matters; the page then shows what became of it. */
export function ActButton({ label, address, method, json, question, done, quiet = false }: ActButtonProps) {
  const router = useRouter();
  const [asking, setAsking] = useState(false);
  const act = useMutation({
    mutationFn: () => request(address, { method, json }),
    onSuccess: () => router.refresh(),
    onSettled: () => setAsking(false),
  });
  const begin = () => (question === undefined ? act.mutate() : setAsking(true));
  if (asking) {
    return (
      <span className="inline-flex flex-wrap items-center gap-2">
        <span role="alert">{question}</span>
        <Button onClick={() => act.mutate()} disabled={act.isPending} autoFocus>
          {label}
        </Button>
        <Button onClick={() => setAsking(false)}>Leave it</Button>
      </span>
    );
  }
  return (
    <span className="inline-flex flex-wrap items-center gap-2">
      {quiet ? (
        <button type="button" className="choice-plain underline underline-offset-3" onClick={begin} disabled={act.isPending}>
          {label}
        </button>
      ) : (
        <Button onClick={begin} disabled={act.isPending}>
          {label}
        </Button>
      )}
      <span role="status">{act.error ? act.error.message : act.isSuccess ? (done ?? '') : ''}</span>
    </span>
  );
}
