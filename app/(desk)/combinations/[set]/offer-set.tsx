'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';

/** Takes a set out of use, or offers it again; what it made stays. */
export function OfferSet({ set, offered }: { readonly set: number; readonly offered: boolean }) {
  const router = useRouter();
  const change = useMutation({
    mutationFn: () => request(api.combinationSet(set), { method: 'PUT', json: { offered: !offered } }),
    onSuccess: () => router.refresh(),
  });
  return (
    <>
      <Button disabled={change.isPending} onClick={() => change.mutate()}>
        {offered ? 'Take it out of use' : 'Offer it again'}
      </Button>
      {change.error && <Notice kind="error">{change.error.message}</Notice>}
    </>
  );
}
