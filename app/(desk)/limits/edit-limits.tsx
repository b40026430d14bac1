'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { LimitTable } from '@/components/limits/limit-table';
import { limitedWords, measureWords } from '@/components/limits/limit-words';
import { Notice } from '@/components/ui/notice';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';
import { limitKey, limitedBy, type OfficeLimit } from '@/lib/model/office-limit';
import { AddLimit } from './add-limit';

/** The lead adds a limit, by a published one or by a figure of the office's own, and takes limits away. */
export function EditLimits({ limits }: { readonly limits: readonly OfficeLimit[] }) {
  const router = useRouter();
  const save = useMutation({
    mutationFn: (list: readonly OfficeLimit[]) => request(api.limits, { method: 'PUT', json: { limits: list } }),
    onSuccess: () => router.refresh(),
  });
  const nameOf = (limit: OfficeLimit | undefined) =>
    limit
      ? `${measureWords(limit)} of ${limitedWords(limit, limitedBy)}${limit.combination ? ` in ${limit.combination}` : ''}`
      : '';
  return (
    <>
      <LimitTable
        limits={limits}
        acts={{
          heading: 'Take away',
          of: (index) => (
            <button
              type="button"
              className="link"
              disabled={save.isPending}
              aria-label={`Take away ${nameOf(limits[index])}`}
              onClick={() => save.mutate(limits.filter((_, i) => i !== index))}
            >
              Take away
            </button>
          ),
        }}
      />
      <AddLimit
        known={limits.map(limitKey)}
        busy={save.isPending}
        onAdd={(limit) => save.mutate([...limits.filter((one) => limitKey(one) !== limitKey(limit)), limit])}
      />
      {save.error && <Notice kind="error">{save.error.message}</Notice>}
    </>
  );
}
