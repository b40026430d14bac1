import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { api, pages } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';
import type { OwnKind, OwnRecord } from '@/lib/intake/own/own-thing';

/** Saves a section or a grade of the office's own, a new one or the next version of one, and goes to its page. @param id null = a new one */
export function useSaveOwn(kind: OwnKind, id: number | null, { name, units, cells }: OwnRecord, note: string) {
  const router = useRouter();
  return useMutation({
    mutationFn: () =>
      id === null
        ? request<{ id: number }>(api.own(kind), { method: 'POST', json: { name: name.trim(), units, cells, note } })
        : request<{ id: number }>(api.ownPart(kind, id), { method: 'PUT', json: { units, cells, note } }),
    onSuccess: (saved) => {
      router.push(pages.ownPart(kind, saved.id));
      router.refresh();
    },
  });
}
