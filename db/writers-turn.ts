/**
 * Whose turn it is to write. SQLite lets whoever waits for the writer's place look in now and then, so that a thread which
 * writes one short transaction after another leaves no gap that a look falls into: others would wait for seconds, the server
 * with all its pages. So whoever waits says so, where all threads of the process see it, and who has just written waits in turn.
 */
import { getEnvironmentData, setEnvironmentData, threadId } from 'node:worker_threads';

/** Longer than SQLite ever pauses between two looks (0.1 s), so that who is waited for has looked. */
const most_ms = 150;
const places = 256;
const key = 'tallyframe.waiting-writers';

/** [0] changes whenever somebody has stopped waiting; then a place for each thread, 1 while it waits. */
export type WaitingWriters = Int32Array<SharedArrayBuffer>;

export function noWriters(): WaitingWriters {
  return new Int32Array(new SharedArrayBuffer(4 * (1 + places)));
}

/** Those of this process: threads are handed it when they start. */
function ofProcess(): WaitingWriters {
  const known: unknown = getEnvironmentData(key);
  if (known instanceof Int32Array) return known as WaitingWriters;
  const made = noWriters();
  setEnvironmentData(key, made as unknown as Parameters<typeof setEnvironmentData>[1]);
  return made;
}

const writers = ofProcess();

/** Takes the writer's place, as `take` does it, and says so while it waits. */
export function takeTurn<T>(take: () => T, waiting = writers, thread = threadId): T {
  const place = 1 + (thread % places);
  Atomics.store(waiting, place, 1);
  try {
    return take();
  } finally {
    Atomics.store(waiting, place, 0);
    Atomics.add(waiting, 0, 1);
    Atomics.notify(waiting, 0);
  }
}

/**
 * Lets those who wait go first, between two transactions; blocks the thread for as long, 0.15 s at most. Whoever has not
 * come by then was ended while it waited, and is forgotten.
 */
export function standAside(waiting = writers): void {
  const until = performance.now() + most_ms;
  for (;;) {
    const turn = Atomics.load(waiting, 0);
    if (!waiting.includes(1, 1)) return;
    const left = until - performance.now();
    if (left <= 0) break;
    Atomics.wait(waiting, 0, turn, left);
  }
  waiting.fill(0, 1);
}
