'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import { api, pages } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';
import type { OwnKind } from '@/lib/intake/own/own-thing';

interface TakeVersionProps {
  readonly batch: number;
  readonly letter: string;
  readonly part: OwnKind;
  /** The office's name for it. */
  readonly name: string;
  /** The newer one. */
  readonly version: number;
}

/** Makes the next revision with a newer version of one of the office's own; frames without it keep their results. */
export function TakeVersion({ batch, letter, part, name, version }: TakeVersionProps) {
  const router = useRouter();
  const [reason, setReason] = useState('');
  const make = useMutation({
    mutationFn: () =>
      request<{ readonly revision: string }>(api.part(batch, letter, 'changes'), {
        method: 'POST',
        json: { changes: [{ kind: 'own version', part, name }], reason, run: false },
      }),
    onSuccess: ({ revision }) => router.push(pages.sheet(batch, revision, 'read')),
  });
  return (
    <details>
      <summary>Version {version} is newer: take it</summary>
      <form
        className="own-form"
        onSubmit={(event) => {
          event.preventDefault();
          make.mutate();
        }}
      >
        <Field
          label={`Why ${name} is taken anew`}
          hint={`${letter} stays as it is; frames without ${name} keep their results in the next revision.`}
          maxLength={500}
          value={reason}
          onChange={(event) => setReason(event.target.value)}
        />
        {make.error && <Notice kind="error">{make.error.message}</Notice>}
        <p>
          <Button type="submit" disabled={make.isPending || make.isSuccess || reason.trim() === ''}>
            Make the next revision with version {version}
          </Button>
        </p>
      </form>
    </details>
  );
}
