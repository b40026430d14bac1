import { setTimeout as later } from 'node:timers/promises';
import { MessageChannel } from 'node:worker_threads';
import { describe, expect, it } from 'vitest';
import { PortSink, type PortMessage } from './port-sink';

describe('a stream into another thread', () => {
  it('hands on every byte in order, then the end', async () => {
    const { port1, port2 } = new MessageChannel();
    const sink = new PortSink(port2);
    const taken: Uint8Array[] = [];
    const ended = new Promise<void>((resolve) => {
      port1.on('message', (message: PortMessage) => {
        if ('end' in message) return resolve();
        taken.push(message.bytes);
        port1.postMessage('taken');
      });
    });
    const lines = Array.from({ length: 40_000 }, (_, i) => `line ${i}\n`);
    for (const line of lines) if (!sink.write(line)) await new Promise((resolve) => sink.once('drain', resolve));
    sink.end();
    await ended;
    port1.close();
    expect(Buffer.concat(taken).toString()).toBe(lines.join(''));
    expect(taken.length).toBeGreaterThan(3);
  });

  it('writes no further than its reader takes', async () => {
    const { port1, port2 } = new MessageChannel();
    const sink = new PortSink(port2);
    let messages = 0;
    port1.on('message', () => messages++);
    const piece = Buffer.alloc(64 * 1024);
    let accepted = 0;
    while (sink.write(piece)) accepted++;
    await later(50);
    expect(messages).toBe(1);
    expect(accepted).toBeLessThan(8);
    port1.postMessage('taken');
    await later(50);
    expect(messages).toBe(2);
    port1.close();
  });
});
