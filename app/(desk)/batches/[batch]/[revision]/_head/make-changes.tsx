'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { api, pages } from '@/lib/api/addresses';
import { request, RequestError } from '@/lib/api/fetch';
import type { SectionChange } from '@/lib/changes/change';

interface MakeChangesProps {
  readonly batch: number;
  readonly letter: string;
  /** The letter that the next revision will have. */
  readonly next: string;
  readonly changes: readonly SectionChange[];
  /** What a reason might be: it can be written over. */
  readonly reason?: string;
  readonly children?: ReactNode;
}

/** Makes the next revision by several changes of section at once, with a reason. */
export function MakeChanges({ batch, letter, next, changes, reason: suggested = '', children }: MakeChangesProps) {
  const router = useRouter();
  const [reason, setReason] = useState(suggested);
  const make = useMutation({
    mutationFn: (run: boolean) =>
      request<{ readonly revision: string }>(api.part(batch, letter, 'changes'), {
        method: 'POST',
        json: { changes, reason, run },
      }),
    onSuccess: ({ revision }) => router.push(pages.sheet(batch, revision, 'read')),
  });
  const wrong = make.error instanceof RequestError ? (make.error.body.fields?.['reason']?.[0] ?? null) : null;
  const busy = make.isPending || make.isSuccess;
  return (
    <form className="make-change" onSubmit={(event) => event.preventDefault()}>
      {children}
      <Field
        label="Why it is changed"
        hint="It stands at the head of the new revision and in the activity of the project."
        maxLength={500}
        value={reason}
        error={wrong}
        disabled={busy}
        onChange={(event) => setReason(event.target.value)}
      />
      {make.error && wrong === null && <Notice kind="error">{make.error.message}</Notice>}
      <div className="make-change-acts">
        <Button look="filled" disabled={busy} onClick={() => make.mutate(true)}>
          Make revision {next} and run what it touches
        </Button>
        <Button disabled={busy} onClick={() => make.mutate(false)}>
          Make revision {next}
        </Button>
      </div>
    </form>
  );
}
