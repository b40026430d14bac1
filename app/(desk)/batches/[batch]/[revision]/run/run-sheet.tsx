'use client';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { useEffect } from 'react';
import type { RunProgressData } from '@/components/run/run-data';
import { RunCertificate, type RunCertificateData } from '@/components/run/run-certificate';
import { RunProgress } from '@/components/run/run-progress';
import { Strip } from '@/components/strip/strip';
import { Button, ButtonLink } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Columns, Zone } from '@/components/ui/sheet';
import { api, pages } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';
import { stripFrames, type GlanceCell } from '../_head/strip-frames';
import { OverSoFar } from './over-so-far';

interface Told extends RunProgressData {
  readonly revisionState: string;
  readonly inHand: readonly number[];
}

interface Summed {
  readonly cells: readonly GlanceCell[];
  readonly certificate: RunCertificateData | null;
}

interface RunSheetProps {
  readonly batch: number;
  readonly letter: string;
  readonly nearLimit: number;
  readonly may: boolean;
  readonly first: Summed & { readonly progress: Told };
}

const going: readonly string[] = ['waiting', 'running', 'stopping'];

/** The run as it goes: asked for every second, the strip less often the longer it is. */
export function RunSheet({ batch, letter, nearLimit, may, first }: RunSheetProps) {
  const router = useRouter();
  const client = useQueryClient();
  const progressKey = ['progress', batch, letter];
  const progress = useQuery({
    queryKey: progressKey,
    queryFn: ({ signal }) => request<{ run: Told }>(api.part(batch, letter, 'progress'), { signal }),
    initialData: { run: first.progress },
    staleTime: 0,
    refetchInterval: ({ state }) => (going.includes(state.data?.run.state ?? '') ? 1000 : false),
  });
  const { run } = progress.data;
  const goes = going.includes(run.state);
  const strip = useQuery({
    // The last count of a run that has ended is asked for once more, so that the strip ends complete.
    queryKey: ['strip', batch, letter, goes ? 'going' : `${run.state} ${run.done}`],
    queryFn: ({ signal }) =>
      request<{ summary: Pick<Summed, 'cells'>; certificate: Summed['certificate'] }>(api.part(batch, letter, 'summary'), {
        signal,
      }),
    placeholderData: (before) => before ?? { summary: { cells: first.cells }, certificate: first.certificate },
    staleTime: 0,
    refetchInterval: goes ? Math.max(1000, first.cells.length) : false,
  });
  const act = useMutation({
    mutationFn: (method: 'POST' | 'DELETE') => request<{ run: Told }>(api.part(batch, letter, 'run'), { method }),
    onSuccess: (answer) => client.setQueryData(progressKey, answer),
  });
  const drawn = first.progress.state;
  useEffect(() => {
    // The title block's state and the sheet index come from the server.
    if (run.state !== drawn) router.refresh();
  }, [run.state, drawn, router]);
  const cells = strip.data?.summary.cells ?? first.cells;
  const certificate = strip.data?.certificate ?? first.certificate;
  const acts = (
    <>
      {may && (run.state === 'running' || run.state === 'waiting') && (
        <Button disabled={act.isPending} onClick={() => act.mutate('DELETE')}>
          Stop the run
        </Button>
      )}
      {may && (run.state === 'stopped' || run.state === 'failed') && (
        <Button look="filled" disabled={act.isPending} onClick={() => act.mutate('POST')}>
          Run the {(run.total - run.done).toLocaleString('en-GB')} that are left
        </Button>
      )}
      {!goes && (
        <ButtonLink href={pages.sheet(batch, letter, 'glance')} look={run.state === 'done' ? 'filled' : 'outline'}>
          See the results
        </ButtonLink>
      )}
    </>
  );
  const main = (
    <Zone>
      <Strip
        frames={stripFrames(cells, goes, run.inHand)}
        nearLimit={nearLimit}
        title={goes ? 'The strip so far' : undefined}
        note={goes ? 'a cell appears when its frame is solved, checked and kept' : undefined}
        hrefPattern={`${pages.sheet(batch, letter, 'frames')}/{n}`}
      />
    </Zone>
  );
  const side = (
    <>
      <OverSoFar cells={cells} nearLimit={nearLimit} batch={batch} letter={letter} going={goes} />
      <Zone title={goes ? 'Certificate so far' : 'Certificate'} note="the worst of all frames">
        <RunCertificate certificate={certificate} />
      </Zone>
      {goes && (
        <Zone>
          <p>
            You may close this page. The run goes on, and after a restart it takes up at the first frame not kept; none is lost or
            run twice.
          </p>
        </Zone>
      )}
    </>
  );
  const fault = act.error ?? progress.error;
  return (
    <>
      <RunProgress run={run} acts={acts} />
      {fault && <Notice kind="error">{fault.message}</Notice>}
      <Columns main={main} side={side} />
    </>
  );
}
