'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { api } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';

/** Who issues what a checker passed: the lead, or checkers too; the lead chooses. */
export function WhoIssues({ checkersIssue, may }: { readonly checkersIssue: boolean; readonly may: boolean }) {
  const router = useRouter();
  const choose = useMutation({
    mutationFn: (on: boolean) => request(api.whoIssues, { method: 'PUT', json: { checkersIssue: on } }),
    onSuccess: () => router.refresh(),
  });
  return (
    <>
      <p>
        {checkersIssue ? 'The lead issues what a checker passed, and so may checkers.' : 'The lead issues what a checker passed.'}{' '}
        Nobody issues what they had a part in making; that binds the lead as well.
      </p>
      {may && (
        <p className="pt-2">
          <Button onClick={() => choose.mutate(!checkersIssue)} disabled={choose.isPending}>
            {checkersIssue ? 'Let the lead alone issue' : 'Let checkers issue too'}
          </Button>{' '}
          <span role="status">{choose.error?.message ?? ''}</span>
        </p>
      )}
    </>
  );
}
