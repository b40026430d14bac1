'use client';
import { useCallback, useEffect, useRef, useState } from 'react';
import type { TryTold } from '@/lib/sizing/try-sections';
import type { TryAnswer, TryAsked } from './try-message';

type Outcome = { readonly told: TryTold } | { readonly refused: string };

/**
 * The engine in a worker, brought when it is first asked. Asking again while it works ends that worker: what is not wanted any
 * more is not worked out, and its answer never comes.
 */
export function useEngine(): { readonly busy: boolean; readonly ask: (asked: Omit<TryAsked, 'id'>, then: (outcome: Outcome) => void) => void } {
  const worker = useRef<Worker | null>(null);
  const waiting = useRef<{ readonly id: number; readonly then: (outcome: Outcome) => void } | null>(null);
  const ids = useRef(0);
  const [busy, setBusy] = useState(false);

  const end = useCallback(() => {
    worker.current?.terminate();
    worker.current = null;
    waiting.current = null;
  }, []);
  useEffect(() => end, [end]);

  const ask = useCallback(
    (asked: Omit<TryAsked, 'id'>, then: (outcome: Outcome) => void) => {
      if (waiting.current) end();
      const settle = (outcome: Outcome): void => {
        const wanted = waiting.current;
        waiting.current = null;
        setBusy(false);
        wanted?.then(outcome);
      };
      if (!worker.current) {
        const made = new Worker(new URL('./try-worker.ts', import.meta.url), { type: 'module' });
        made.addEventListener('message', ({ data }: MessageEvent<TryAnswer>) => {
          if (data.id === waiting.current?.id) settle(data);
        });
        made.addEventListener('error', () => {
          end();
          setBusy(false);
          then({ refused: 'The engine could not be started in this browser. Load the page again.' });
        });
        worker.current = made;
      }
      ids.current += 1;
      waiting.current = { id: ids.current, then };
      setBusy(true);
      worker.current.postMessage({ ...asked, id: ids.current } satisfies TryAsked);
    },
    [end],
  );
  return { busy, ask };
} // prettier-ignore
