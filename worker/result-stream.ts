/** A result file as a stream of bytes, made in a thread while it is read. */
import { MessageChannel } from 'node:worker_threads';
import type { Pools } from './pools';
import type { PortMessage } from './threads/port-sink';
import type { ResultFile, WriteTask } from './threads/write';

/**
 * Streams the result workbook, JSON, or a zip of CSV of a revision whose office the caller has made sure of.
 * The thread waits for a slow reader and ends with one that goes away. Errors of the thread error the stream.
 */
export function resultStream(
  pools: Pools,
  of: { readonly file: string; readonly office: number; readonly revision: number; readonly as: ResultFile },
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
        const task: WriteTask = { ...of, port: port2 };
        pools.write
          .run(task, { filename: pools.bundle('write'), name: 'writeResult', transferList: [port2], signal: gone.signal })
          .catch((error: unknown) => {
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
