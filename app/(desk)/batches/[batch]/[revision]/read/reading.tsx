'use client';
import { useQuery } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useEffect } from 'react';
import { Empty, Notice } from '@/components/ui/notice';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';

interface Answer {
  readonly run: { readonly revisionState: string };
}

/** While the files are read: asks every half second, then shows what was read. */
export function Reading({ batch, letter }: { readonly batch: number; readonly letter: string }) {
  const router = useRouter();
  const progress = useQuery({
    queryKey: ['reading', batch, letter],
    queryFn: ({ signal }) => request<Answer>(api.part(batch, letter, 'progress'), { signal }),
    refetchInterval: 500,
    staleTime: 0,
  });
  const state = progress.data?.run.revisionState ?? 'reading';
  useEffect(() => {
    if (state !== 'reading') router.refresh();
  }, [state, router]);
  return (
    <Empty strokes={3}>
      <p role="status">The files have arrived and are being read. A thousand frames take a few seconds.</p>
      <p>You may close this page; the reading goes on.</p>
      {progress.error && <Notice kind="error">{progress.error.message}</Notice>}
    </Empty>
  );
}
