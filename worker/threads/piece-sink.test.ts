import { createHash } from 'node:crypto';
import { once } from 'node:events';
import { describe, expect, it } from 'vitest';
import { PieceSink } from './piece-sink';

const sha256 = (bytes: Buffer): string => createHash('sha256').update(bytes).digest('hex');

async function through(chunks: readonly Buffer[]): Promise<{ pieces: Buffer[]; sink: PieceSink }> {
  const pieces: Buffer[] = [];
  const sink = new PieceSink((ordinal, bytes) => {
    expect(ordinal).toBe(pieces.length);
    pieces.push(bytes);
  });
  for (const chunk of chunks) sink.write(chunk);
  sink.end();
  await once(sink, 'finish');
  return { pieces, sink };
}

describe('a file on its way into the database', () => {
  it('is cut into pieces of a megabyte that are the file again, and hashed whole', async () => {
    const file = Buffer.alloc(2_600_000, 'frame');
    const { pieces, sink } = await through([file.subarray(0, 10), file.subarray(10, 2_200_000), file.subarray(2_200_000)]);
    expect(Buffer.concat(pieces).equals(file)).toBe(true);
    expect(Math.max(...pieces.map((piece) => piece.length))).toBe(1 << 20);
    expect(sink.size).toBe(file.length);
    expect(sink.sha256).toBe(sha256(file));
  });

  it('keeps what was written though the writer uses its buffer again', async () => {
    const buffer = Buffer.from('one');
    const pieces: Buffer[] = [];
    const sink = new PieceSink((_ordinal, bytes) => pieces.push(bytes));
    sink.write(buffer);
    buffer.write('two');
    sink.end();
    await once(sink, 'finish');
    expect(Buffer.concat(pieces).toString()).toBe('one');
  });

  it('ends with an error where a piece can’t be kept', async () => {
    const sink = new PieceSink(() => {
      throw new Error('the disk is full');
    });
    sink.write(Buffer.alloc(3_000_000));
    const [error] = (await once(sink, 'error')) as [Error];
    expect(error.message).toBe('the disk is full');
    expect(() => sink.sha256).toThrow(RangeError);
  });
});
