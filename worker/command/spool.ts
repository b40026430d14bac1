import { closeSync, mkdtempSync, openSync, readSync, rmSync, writeSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

/** Keeps byte strings by number in a temporary file, so that a batch's results need no memory of their own. */
export class Spool {
  private readonly folder = mkdtempSync(join(tmpdir(), 'tallyframe-'));
  private readonly file = openSync(join(this.folder, 'results'), 'w+');
  private readonly places: ({ readonly from: number; readonly size: number } | undefined)[] = [];
  private end = 0;

  constructor() {
    // Out of the folder at once: however the process ends, nothing is left behind.
    rmSync(this.folder, { recursive: true, force: true });
  }

  put(index: number, bytes: Uint8Array): void {
    for (let written = 0; written < bytes.byteLength;)
      written += writeSync(this.file, bytes, written, bytes.byteLength - written, this.end + written);
    this.places[index] = { from: this.end, size: bytes.byteLength };
    this.end += bytes.byteLength;
  }

  get(index: number): Buffer | null {
    const place = this.places[index];
    if (!place) return null;
    const bytes = Buffer.allocUnsafe(place.size);
    for (let read = 0; read < place.size;) {
      const got = readSync(this.file, bytes, read, place.size - read, place.from + read);
      if (got === 0) throw new Error(`The temporary file of results ended early at result ${index}`);
      read += got;
    }
    return bytes;
  }

  /** Removes the file. */
  close(): void {
    closeSync(this.file);
  }
}
