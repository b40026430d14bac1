'use client';
import { useQuery } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useEffect } from 'react';
import { Empty, Notice } from '@/components/ui/notice';
import { api, pages } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';

interface Answer {
  readonly run: { readonly revisionState: string };
}

interface ReadingProps {
  readonly batch: number;
  readonly letter: string;
  /** The revision it is made from by changes; null = its files were brought in. */
  readonly madeFrom: string | null;
}

/** While the files are read: asks every half second, then shows what was read. */
export function Reading({ batch, letter, madeFrom }: ReadingProps) {
  const router = useRouter();
  const progress = useQuery({
    queryKey: ['reading', batch, letter],
    queryFn: ({ signal }) => request<Answer>(api.part(batch, letter, 'progress'), { signal }),
    refetchInterval: 500,
    staleTime: 0,
  });
  const state = progress.data?.run.revisionState ?? 'reading';
  useEffect(() => {
    // asked for with its run, it goes on by itself
    if (state === 'running' || state === 'run') router.replace(pages.sheet(batch, letter, 'run'));
    else if (state !== 'reading') router.refresh();
  }, [state, router, batch, letter]);
  return (
    <Empty strokes={3}>
      <p role="status">
        {madeFrom === null
          ? 'The files have arrived and are being read. A thousand frames take a few seconds.'
          : `The rows of revision ${madeFrom} are being read with the changes made to them. A thousand frames take a few seconds.`}
      </p>
      <p>You may close this page; the reading goes on.</p>
      {progress.error && <Notice kind="error">{progress.error.message}</Notice>}
    </Empty>
  );
}
