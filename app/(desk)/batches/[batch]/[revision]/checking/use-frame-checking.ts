'use client';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import type { CheckingDetail, FrameChecking } from '@/app/_server/checking-detail';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';

/** Marks on one frame as they stand, and what a checker does to them. */
export function useFrameChecking(batch: number, letter: string, number: number, enabled = true) {
  const client = useQueryClient();
  const address = (part?: 'seen' | 'queries' | 'acceptances' | 'own-values') => api.checkingFrame(batch, letter, number, part);
  const marks = useQuery({
    queryKey: ['checking-frame', batch, letter, number],
    queryFn: ({ signal }) => request<{ frame: FrameChecking }>(address(), { signal }),
    enabled,
  });
  const again = async () => {
    await Promise.all([
      client.invalidateQueries({ queryKey: ['checking-frame', batch, letter, number] }),
      client.invalidateQueries({ queryKey: ['checking', batch, letter] }),
    ]);
  };
  const act = useMutation({
    mutationFn: ({ to, method = 'POST', json }: { to: string; method?: 'POST' | 'DELETE'; json?: unknown }) =>
      request(to, { method, json }),
    onSettled: again,
  });
  // a mark is set many times a minute: the list is mended by what is answered, and not brought anew
  const see = useMutation({
    mutationFn: ({ of, seen }: { of: number; seen: boolean }) =>
      request<{ progress: CheckingDetail['progress'] }>(api.checkingFrame(batch, letter, of, 'seen'), {
        method: seen ? 'POST' : 'DELETE',
      }),
    onSuccess: async ({ progress }, { of, seen }) => {
      client.setQueryData<CheckingDetail>(
        ['checking', batch, letter],
        (known) => known && { ...withSeen(known, of, seen), progress },
      );
      await client.invalidateQueries({ queryKey: ['checking-frame', batch, letter, of] });
    },
    onError: again,
  });
  return {
    marks: marks.data?.frame ?? null,
    error: act.error ?? see.error ?? marks.error,
    busy: act.isPending || see.isPending,
    seen: (seen: boolean) => see.mutate({ of: number, seen }),
    query: (json: { subject: string | null; check: string | null; text: string }) =>
      act.mutateAsync({ to: address('queries'), json }),
    answer: (query: number, json: { text: string; close: boolean }) =>
      act.mutateAsync({ to: api.query(batch, letter, query), json }),
    accept: (json: { checks: readonly number[]; reason: string; alike: boolean }) =>
      act.mutateAsync({ to: address('acceptances'), json }),
    takeBack: (item: number) => act.mutate({ to: `${address('acceptances')}?check=${item}`, method: 'DELETE' }),
    ownValue: (json: { figure: unknown; value: string; note: string }) => act.mutateAsync({ to: address('own-values'), json }),
  };
}
/** The list with a frame of it marked seen, or no longer: others may have seen it too, which the next reading of the list says. */
export function withSeen(detail: CheckingDetail, number: number, seen: boolean): CheckingDetail {
  return { ...detail, list: detail.list.map((row) => (row.number === number ? { ...row, seen } : row)) };
}

export type FrameCheckingActs = ReturnType<typeof useFrameChecking>;
