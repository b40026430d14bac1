'use client';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import type { SizingTold } from '@/app/_server/sizings';
import { timeLeft } from '@/components/run/run-progress';
import { GroupResult } from '@/components/sizing/group-result';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Zone } from '@/components/ui/sheet';
import { api, pages } from '@/lib/api/addresses';
import { request } from '@/lib/api/fetch';
import type { SizingGroup } from '@/lib/sizing/sizing';
import type { System } from '@/lib/units/quantity';
import type { GroupListed } from '@/worker/threads/list-groups';
import { ChooseGroups } from './choose-groups';
import { FoundTogether } from './found-together';

interface SizeSheetProps {
  readonly batch: number;
  readonly letter: string;
  readonly next: string;
  readonly units: System;
  readonly nearLimit: number;
  readonly may: { readonly size: boolean; readonly change: boolean };
  readonly offered: readonly GroupListed[];
  /** Names of the standard ranges. */
  readonly ranges: readonly string[];
  readonly first: SizingTold | null;
}

const goes = (state: SizingTold['state'] | undefined): boolean =>
  state === 'queued' || state === 'running' || state === 'stopping';

/** Chooses groups and ranges, shows how far the search is, and what it found. */
export function SizeSheet({ batch, letter, next, units, nearLimit, may, offered, ranges, first }: SizeSheetProps) {
  const router = useRouter();
  const client = useQueryClient();
  const key = ['sizing', batch, letter, first?.id ?? null];
  const asked = useQuery({
    queryKey: key,
    queryFn: ({ signal }) => request<{ sizing: SizingTold }>(api.sizing(batch, letter, first?.id ?? 0), { signal }),
    enabled: first !== null,
    initialData: first === null ? undefined : { sizing: first },
    staleTime: 0,
    refetchInterval: ({ state }) => (goes(state.data?.sizing.state) ? 700 : false),
  });
  const sizing = asked.data?.sizing ?? null;
  const start = useMutation({
    mutationFn: (groups: readonly SizingGroup[]) =>
      request<{ sizing: SizingTold }>(api.sizings(batch, letter), { method: 'POST', json: { groups } }),
    onSuccess: ({ sizing: made }) => router.push(pages.size(batch, letter, made.id)),
  });
  const act = useMutation({
    mutationFn: (method: 'POST' | 'DELETE') =>
      request<{ sizing: SizingTold }>(api.sizing(batch, letter, sizing?.id ?? 0), { method }),
    onSuccess: (answer) => client.setQueryData(key, answer),
  });
  const going = goes(sizing?.state);
  const fault = start.error ?? act.error ?? asked.error;
  return (
    <>
      {may.size && (
        <Zone title="Which members, from which range" note="members of a group take one section in every frame that has them">
          {offered.length === 0 ? (
            <p>No member of a frame that can run has a role, a group or a section.</p>
          ) : (
            <ChooseGroups
              key={sizing?.id ?? 0}
              offered={offered}
              ranges={ranges}
              units={units}
              busy={going || start.isPending}
              first={sizing?.request.groups ?? []}
              onSize={(groups) => start.mutate(groups)}
            />
          )}
        </Zone>
      )}
      {fault && <Notice kind="error">{fault.message}</Notice>}
      {sizing && (going || sizing.state === 'stopped' || sizing.state === 'failed') && (
        <Progress sizing={sizing} may={may.size} busy={act.isPending} act={(method) => act.mutate(method)} />
      )}
      {sizing?.found && (
        <>
          <FoundTogether batch={batch} letter={letter} next={next} units={units} nearLimit={nearLimit} sizing={sizing} found={sizing.found} mayChange={may.change} />
          {sizing.found.groups.map((group) => (
            <GroupResult
              key={`${group.by} ${group.name}`}
              group={group}
              units={units}
              nearLimit={nearLimit}
              withOthers={(sizing.found?.groups.length ?? 0) > 1}
              frameHref={(frame) => pages.table(batch, letter, { table: 'frames', filters: [{ column: 'frame', op: 'in', values: [frame] }], sort: null, columns: null })}
            />
          ))}
        </>
      )}
    </>
  ); // prettier-ignore
}

interface ProgressProps {
  readonly sizing: SizingTold;
  readonly may: boolean;
  readonly busy: boolean;
  readonly act: (method: 'POST' | 'DELETE') => void;
}

/** Frames × candidates done, rate and time left; stop, and go on. */
function Progress({ sizing, may, busy, act }: ProgressProps) {
  const { state, done, total, rate, secondsLeft, reason } = sizing;
  const going = goes(state);
  const words = { queued: 'waiting for its turn', stopping: 'stopping', running: '', stopped: '', failed: '', done: '' }[state];
  return (
    <section className="run-progress" aria-label="Sizing">
      <div className="run-figures">
        <p className="run-count">
          <b>{done.toLocaleString('en-GB')}</b> of about {total.toLocaleString('en-GB')} frames × candidates
        </p>
        {words !== '' && <p className="run-value">{words}</p>}
        {state === 'running' && rate !== null && <p className="run-value">{Math.round(rate).toLocaleString('en-GB')} a second</p>}
        {state === 'running' && secondsLeft !== null && <p className="run-value">{timeLeft(secondsLeft)} left</p>}
        {may && (
          <div className="run-acts">
            {going && (
              <Button disabled={busy || state === 'stopping'} onClick={() => act('DELETE')}>
                Stop
              </Button>
            )}
            {!going && (
              <Button disabled={busy} onClick={() => act('POST')}>
                Go on
              </Button>
            )}
          </div>
        )}
      </div>
      {reason && (
        <p className="run-message" role={state === 'failed' ? 'alert' : 'status'}>
          {reason}
        </p>
      )}
      {going && <p className="run-message">You may close this page: the search goes on, also after a restart.</p>}
      <div className="rail" role="progressbar" aria-label="Frames and candidates done" aria-valuemin={0} aria-valuemax={total} aria-valuenow={done}>
        <span style={{ width: `${total > 0 ? (100 * done) / total : 0}%` }} />
      </div>
    </section>
  ); // prettier-ignore
}
