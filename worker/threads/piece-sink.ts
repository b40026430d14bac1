/** A stream into the database: pieces of about a megabyte, each a short transaction, hashed as they pass. */
import { createHash } from 'node:crypto';
import { Writable } from 'node:stream';

const pieceSize = 1 << 20;

export class PieceSink extends Writable {
  private readonly hash = createHash('sha256');
  private waiting: Buffer[] = [];
  private held = 0;
  private count = 0;
  private digest = '';
  /** Bytes taken so far. */
  size = 0;

  /** @param keep keeps one piece; pieces come in order, numbered from 0 */
  constructor(private readonly keep: (ordinal: number, bytes: Buffer) => void) {
    super({ highWaterMark: pieceSize });
  }

  /** SHA-256 of all bytes, in hex. @throws {RangeError} before the stream has finished */
  get sha256(): string {
    if (this.digest === '') throw new RangeError('Expected the stream to have finished');
    return this.digest;
  }

  override _write(chunk: Buffer | string, encoding: BufferEncoding, done: (error?: Error | null) => void): void {
    // copied: a writer may use its buffer again for the next chunk
    const bytes = typeof chunk === 'string' ? Buffer.from(chunk, encoding) : Buffer.from(chunk);
    this.hash.update(bytes);
    this.size += bytes.length;
    this.waiting.push(bytes);
    this.held += bytes.length;
    try {
      if (this.held >= pieceSize) this.put();
      done();
    } catch (error) {
      done(error as Error);
    }
  }

  override _final(done: (error?: Error | null) => void): void {
    try {
      if (this.held > 0) this.put();
      this.digest = this.hash.digest('hex');
      done();
    } catch (error) {
      done(error as Error);
    }
  }

  private put(): void {
    const all = Buffer.concat(this.waiting);
    this.waiting = [];
    this.held = 0;
    for (let at = 0; at < all.length; at += pieceSize) this.keep(this.count++, all.subarray(at, at + pieceSize));
  }
}
