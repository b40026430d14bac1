import type { RawDatabase } from '@/db/open';

export type Tallied = 'members' | 'checks' | 'reactions' | 'movements';

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
  private counts: Counts = new Map();
  private readonly upsert;

  constructor(raw: RawDatabase) {
    this.upsert = raw.prepare(
      `insert into tally (revision, list, a, b, c, d, e, rows) values (?, ?, ?, ?, ?, ?, ?, ?)
       on conflict do update set rows = rows + excluded.rows`,
    );
  }

  add(revision: number, list: Tallied, a: string, b: string, c: string, d: string, e: string): void {
    const ofList = within(within(this.counts, revision), list);
    const last = within(within(within(within(ofList, a), b), c), d);
    last.set(e, (last.get(e) ?? 0) + 1);
  }

  /** Adds what was counted since the last time; call in the transaction that wrote the rows. */
  flush(): void {
    for (const [revision, lists] of this.counts)
      for (const [list, as] of lists)
        for (const [a, bs] of as)
          for (const [b, cs] of bs)
            for (const [c, ds] of cs)
              for (const [d, es] of ds) for (const [e, rows] of es) this.upsert.run(revision, list, a, b, c, d, e, rows);
    this.counts = new Map();
  }
}

/** By revision, list and each of the keys a to e: looked up word by word, since putting them together costs more. */
type Counts = Map<number, Map<Tallied, Map<string, Map<string, Map<string, Map<string, Map<string, number>>>>>>>;

function within<K, K2, V>(counts: Map<K, Map<K2, V>>, key: K): Map<K2, V> {
  let found = counts.get(key);
  if (!found) counts.set(key, (found = new Map<K2, V>()));
  return found;
}
