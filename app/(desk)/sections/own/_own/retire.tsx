'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';
import type { OwnKind } from '@/lib/intake/own/own-thing';

/** Takes one of the office's own from what is offered. */
export function Retire({ kind, id, name }: { readonly kind: OwnKind; readonly id: number; readonly name: string }) {
  const router = useRouter();
  const retire = useMutation({
    mutationFn: () => request(api.ownPart(kind, id), { method: 'DELETE' }),
    onSuccess: () => router.refresh(),
  });
  return (
    <>
      <Button disabled={retire.isPending || retire.isSuccess} onClick={() => retire.mutate()}>
        Offer {name} no longer
      </Button>
      <p className="field-hint">
        Sheets that name it are told so from then on. What was read with it keeps it; saving a version offers it again.
      </p>
      {retire.error && <Notice kind="error">{retire.error.message}</Notice>}
    </>
  );
}
