/** A result file, or a table of it, as a stream of bytes, made in a thread while it is read. */
import { MessageChannel, type MessagePort } from 'node:worker_threads';
import type { Pools, ThreadPool } from './pools';
import type { PortMessage } from './threads/port-sink';
import type { ResultFile, WriteTask } from './threads/write';
import type { WriteCompareTask } from './threads/write-compare';
import type { WriteReportTask } from './threads/write-report';
import type { WriteTableTask } from './threads/write-table';

/** Streams the result workbook, JSON, or a zip of CSV of a revision whose office the caller has made sure of. */
export function resultStream(
  pools: Pools,
  of: { readonly file: string; readonly office: number; readonly revision: number; readonly as: ResultFile },
): ReadableStream<Uint8Array> {
  return threadStream(pools.write, { filename: pools.bundle('write'), name: 'writeResult' }, (port): WriteTask => ({
    ...of,
    port,
  }));
}

/** Streams the rows of one view of a table. Threads of its own: a view need not wait until a large workbook is taken away. */
export function tableStream(pools: Pools, of: Omit<WriteTableTask, 'port'>): ReadableStream<Uint8Array> {
  return threadStream(pools.tables, { filename: pools.bundle('write'), name: 'writeTable' }, (port): WriteTableTask => ({ ...of, port })); // prettier-ignore
}

/** Streams the differences between two revisions as a workbook. */
export function compareStream(pools: Pools, of: Omit<WriteCompareTask, 'port'>): ReadableStream<Uint8Array> {
  return threadStream(pools.write, { filename: pools.bundle('write'), name: 'writeCompare' }, (port): WriteCompareTask => ({ ...of, port })); // prettier-ignore
}

/** Streams the calculation report of a revision as a draft. */
export function reportStream(pools: Pools, of: Omit<WriteReportTask, 'port'>): ReadableStream<Uint8Array> {
  return threadStream(pools.write, { filename: pools.bundle('write'), name: 'writeDraftReport' }, (port): WriteReportTask => ({ ...of, port })); // prettier-ignore
}

/** The thread waits for a slow reader and ends with one that goes away. Errors of the thread error the stream. */
function threadStream(
  pool: ThreadPool,
  call: { readonly filename: string; readonly name: string },
  taskOf: (port: MessagePort) => unknown,
): ReadableStream<Uint8Array> {
  const { port1, port2 } = new MessageChannel();
  const gone = new AbortController();
  let answer = false;
  return new ReadableStream<Uint8Array>(
    {
      start(controller) {
        let ended = false;
        port1.on('message', (message: PortMessage) => {
          if ('bytes' in message) {
            answer = true;
            controller.enqueue(message.bytes);
          } else {
            ended = true;
            controller.close();
            port1.close();
          }
        });
        pool.run(taskOf(port2), { ...call, transferList: [port2], signal: gone.signal }).catch((error: unknown) => {
          if (!ended && !gone.signal.aborted) controller.error(error);
          port1.close();
        });
      },
      pull() {
        if (!answer) return;
        answer = false;
        port1.postMessage('taken');
      },
      cancel() {
        gone.abort();
        port1.close();
      },
    },
    { highWaterMark: 1 },
  );
}
