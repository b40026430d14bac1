'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { RunWhatIsGood } from '@/components/intake/run-what-is-good';
import { Button, ButtonLink } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { api, pages } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';

interface RunGoodProps {
  readonly batch: number;
  readonly letter: string;
  readonly project: number;
  readonly good: number;
  readonly stopped: number;
  readonly state: string;
  /** Whether this person may start a run. */
  readonly may: boolean;
}

/** The foot of the page: run what can run, or leave it. */
export function RunGood({ batch, letter, project, good, stopped, state, may }: RunGoodProps) {
  const router = useRouter();
  const run = useMutation({
    mutationFn: () => request(api.part(batch, letter, 'run'), { method: 'POST' }),
    onSuccess: () => router.push(pages.sheet(batch, letter, 'run')),
  });
  if (state !== 'read') {
    return (
      <RunWhatIsGood letter={letter} good={good} stopped={stopped}>
        {good > 0 && (
          <ButtonLink href={pages.sheet(batch, letter, state === 'run' ? 'glance' : 'run')}>
            {state === 'run' ? 'See the results' : 'See the run'}
          </ButtonLink>
        )}
      </RunWhatIsGood>
    );
  }
  return (
    <>
      <RunWhatIsGood letter={letter} good={good} stopped={stopped}>
        <ButtonLink href={pages.project(project)}>Leave it for now</ButtonLink>
        {may && good > 0 && (
          <Button look="filled" disabled={run.isPending || run.isSuccess} onClick={() => run.mutate()}>
            Run {good.toLocaleString('en-GB')} {good === 1 ? 'frame' : 'frames'}
          </Button>
        )}
      </RunWhatIsGood>
      {run.error && <Notice kind="error">{run.error.message}</Notice>}
    </>
  );
}
