'use client';
import { useMutation, useQuery } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useEffect, useState } from 'react';
import { Button } from '@/components/ui/button';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';

interface Told {
  readonly going: { readonly done: number; readonly of: number } | null;
  readonly failure: string | null;
}

/** Tests one issue by the present engine, and says how far that is. */
export function TestEngine({ issue, number }: { readonly issue: number; readonly number: string }) {
  const router = useRouter();
  const [waiting, setWaiting] = useState(false);
  const address = api.issuePart(issue, 'engine');
  const test = useMutation({
    mutationFn: () => request(address, { method: 'POST' }),
    onSuccess: () => setWaiting(true),
  });
  const { data } = useQuery({
    queryKey: ['engine', issue, waiting],
    queryFn: () => request<Told>(address),
    enabled: waiting,
    refetchInterval: 700,
    staleTime: 0,
  });
  const ended = waiting && data !== undefined && data.going === null;
  useEffect(() => {
    if (!ended) return;
    setWaiting(false);
    router.refresh();
  }, [ended, router]);
  return (
    <span role="status">
      {waiting ? (
        `${data?.going?.done ?? 0} frames so far`
      ) : (
        <Button onClick={() => test.mutate()} disabled={test.isPending}>
          Test<span className="sr-only"> {number} by the present engine</span>
        </Button>
      )}
      {test.error && <span className="field-error">{test.error.message}</span>}
    </span>
  );
}
