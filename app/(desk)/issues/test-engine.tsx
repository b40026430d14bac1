'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';

interface Told {
  readonly going: { readonly done: number; readonly of: number } | null;
  readonly failure: string | null;
}

const between_ms = 700;

/** Tests one issue by the present engine, and says how far that is. */
export function TestEngine({ issue, number }: { readonly issue: number; readonly number: string }) {
  const router = useRouter();
  const [done, setDone] = useState(0);
  const test = useMutation({
    mutationFn: async () => {
      const address = api.issuePart(issue, 'engine');
      await request(address, { method: 'POST' });
      for (;;) {
        const { going, failure } = await request<Told>(address);
        if (going === null) {
          if (failure !== null) throw new Error(failure);
          return;
        }
        setDone(going.done);
        await new Promise((resolve) => setTimeout(resolve, between_ms));
      }
    },
    onSuccess: () => router.refresh(),
  });
  return (
    <span role="status">
      {test.isPending ? (
        `${done.toLocaleString('en-GB')} frames so far`
      ) : (
        <Button onClick={() => test.mutate()}>
          Test<span className="sr-only"> {number} by the present engine</span>
        </Button>
      )}
      {test.error && <span className="field-error">{test.error.message}</span>}
    </span>
  );
}
