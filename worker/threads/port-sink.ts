import { Writable } from 'node:stream';
import type { MessagePort } from 'node:worker_threads';

/** What a thread sends through its port: bytes, the end. Each piece of bytes is answered when it has been taken. */
export type PortMessage = { readonly bytes: Uint8Array } | { readonly end: true };

/** Bytes put together to one message. */
const pieceSize = 64 * 1024;

/** A stream into another thread that writes no faster than that thread takes. */
export class PortSink extends Writable {
  private pieces: Uint8Array[] = [];
  private size = 0;
  private taken: (() => void) | null = null;

  constructor(private readonly port: MessagePort) {
    super({ highWaterMark: 4 * pieceSize });
    port.on('message', () => {
      const go = this.taken;
      this.taken = null;
      go?.();
    });
  }

  override _write(chunk: Buffer | string, encoding: BufferEncoding, done: (error?: Error | null) => void): void {
    const bytes = typeof chunk === 'string' ? Buffer.from(chunk, encoding) : chunk;
    this.pieces.push(bytes);
    this.size += bytes.byteLength;
    if (this.size < pieceSize) done();
    else this.send(done);
  }

  override _final(done: (error?: Error | null) => void): void {
    const end = (): void => {
      this.port.postMessage({ end: true } satisfies PortMessage);
      this.port.close();
      done();
    };
    if (this.size > 0) this.send(end);
    else end();
  }

  private send(done: () => void): void {
    const bytes = new Uint8Array(this.size);
    let at = 0;
    for (const piece of this.pieces) {
      bytes.set(piece, at);
      at += piece.byteLength;
    }
    this.pieces = [];
    this.size = 0;
    this.taken = done;
    this.port.postMessage({ bytes } satisfies PortMessage, [bytes.buffer]);
  }
}
