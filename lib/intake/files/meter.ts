import { limits } from '@/lib/intake/files/limits';
import { tooLarge } from '@/lib/intake/files/refusal';

/** Bytes of cells that one upload may keep: with the parsers' own needs the process grows by less than 512 MB. */
const keptBytes = 230_000_000;

/**
 * Counts what one upload costs while it is being read and stops it at the limits: unpacked bytes, memory of cells, time.
 * Sizes are estimates of what the cells take on the heap.
 */
export class Meter {
  private unpacked = 0;
  private kept = 0;

  constructor(
    private readonly shouldStop: () => boolean,
    private readonly stopsAfter: string,
  ) {}

  /** Call for every chunk of unpacked bytes. */
  chunk(bytes: number): void {
    this.unpacked += bytes;
    if (this.unpacked > limits.unpackedBytes) throw unpackedTooLarge();
    if (this.shouldStop()) {
      throw tooLarge(
        `Reading was given up after ${this.stopsAfter}. Send fewer rows at once, or save the file anew: something in it takes too long to read.`,
      );
    }
  }

  /** A meter that watches the time only, for reading the same bytes a second time. */
  uncounted(): Meter {
    return new Meter(this.shouldStop, this.stopsAfter);
  }

  /** Call for everything that is kept. */
  keep(bytes: number): void {
    this.kept += bytes;
    if (this.kept > keptBytes) {
      throw tooLarge('The sheets hold more filled cells than can be read at once. Split the frames over several batches.');
    }
  }
}

export function unpackedTooLarge(): ReturnType<typeof tooLarge> {
  return tooLarge('The file unpacks to more than 250 MB, the most that is read. Remove sheets and pictures that are not needed.');
}
