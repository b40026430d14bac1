import { Worker } from 'node:worker_threads';
import { expect, it } from 'vitest';
import { noWriters, standAside, takeTurn, type WaitingWriters } from '@/db/writers-turn';

function timed(work: () => void): number {
  const before = performance.now();
  work();
  return performance.now() - before;
}

/** A thread that waits to write: it shows itself at its place, and leaves after a while. */
async function waitingThread(waiting: WaitingWriters, place: number, leaves: boolean): Promise<Worker> {
  const code = `
    const { parentPort, workerData } = require('node:worker_threads');
    const { waiting, place, leaves } = workerData;
    Atomics.store(waiting, place, 1);
    parentPort.postMessage('waits');
    if (leaves) { Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, 60); Atomics.store(waiting, place, 0); Atomics.add(waiting, 0, 1); Atomics.notify(waiting, 0); }`;
  const thread = new Worker(code, { eval: true, workerData: { waiting, place, leaves } });
  await new Promise((resolve) => thread.once('message', resolve));
  return thread;
}

it('stands aside for nobody where nobody waits', () => {
  const waiting = noWriters();
  expect(timed(() => standAside(waiting))).toBeLessThan(50);
});

it('stands aside until who waits has had their turn, and no longer', async () => {
  const waiting = noWriters();
  const thread = await waitingThread(waiting, 7, true);
  standAside(waiting);
  expect(Atomics.load(waiting, 7)).toBe(0);
  expect(Atomics.load(waiting, 0)).toBe(1);
  await thread.terminate();
});

it('forgets a thread that was ended while it waited', async () => {
  const waiting = noWriters();
  const thread = await waitingThread(waiting, 9, false);
  await thread.terminate();
  const first = timed(() => standAside(waiting));
  expect(first).toBeGreaterThan(100);
  expect(Atomics.load(waiting, 9)).toBe(0);
  expect(timed(() => standAside(waiting))).toBeLessThan(first / 2);
});

it('shows a thread as waiting while it takes its turn, and not afterwards, even where it fails', () => {
  const waiting = noWriters();
  const shown = takeTurn(() => waiting[4], waiting, 3);
  expect(shown).toBe(1);
  expect(waiting[4]).toBe(0);
  const busy = (): never => {
    throw new Error('database is locked');
  };
  expect(() => takeTurn(busy, waiting, 3)).toThrow('locked');
  expect([waiting[0], waiting[4]]).toEqual([2, 0]);
});

it('is known to threads that start later', async () => {
  const { getEnvironmentData } = await import('node:worker_threads');
  const seen = new Worker(
    `const { parentPort, getEnvironmentData } = require('node:worker_threads');
     parentPort.postMessage(getEnvironmentData('tallyframe.waiting-writers').buffer instanceof SharedArrayBuffer);`,
    { eval: true },
  );
  expect(getEnvironmentData('tallyframe.waiting-writers')).toBeInstanceOf(Int32Array);
  expect(await new Promise((resolve) => seen.once('message', resolve))).toBe(true);
});
