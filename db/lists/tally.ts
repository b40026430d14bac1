import type { RawDatabase } from '@/db/open';

export const tallied = ['members', 'checks', 'reactions', 'movements'] as const;
export type Tallied = (typeof tallied)[number];

/** Which list column each key of a tally counts by, in the order of its columns a to e. */
export const tallyColumns: Readonly<Record<Tallied, readonly string[]>> = {
  members: ['role', 'section', 'group', 'check', 'verdict'],
  checks: ['role', 'section', 'check', 'combination', 'verdict'],
  reactions: ['node', 'result', 'kind'],
  movements: ['node', 'place', 'result', 'kind'],
};

/**
 * Counts rows as they are written: a million rows fall into few kinds, so that how many fit a filter, and the choices
 * of each filter, are read from the tally and not from the rows.
 */
export class TallyWriter {
  private readonly counts = new Map<string, number>();
  private readonly upsert;

  constructor(raw: RawDatabase) {
    this.upsert = raw.prepare(
      `insert into tally (revision, list, a, b, c, d, e, rows) values (?, ?, ?, ?, ?, ?, ?, ?)
       on conflict do update set rows = rows + excluded.rows`,
    );
  }

  add(revision: number, list: Tallied, a: string, b: string, c: string, d: string, e: string): void {
    const key = `${revision}\u0000${list}\u0000${a}\u0000${b}\u0000${c}\u0000${d}\u0000${e}`;
    this.counts.set(key, (this.counts.get(key) ?? 0) + 1);
  }

  /** Adds what was counted since the last time; call in the transaction that wrote the rows. */
  flush(): void {
    for (const [key, rows] of this.counts) {
      const [revision, ...rest] = key.split('\u0000');
      this.upsert.run(Number(revision), ...rest, rows);
    }
    this.counts.clear();
  }
}
