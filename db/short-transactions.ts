import type { RawDatabase } from '@/db/open';
import { standAside, takeTurn } from '@/db/writers-turn';

/** A transaction takes no new item after this long, so that it ends well under the 50 ms it may last. */
const slice_ms = 30;

/**
 * Does `work` for every item, in as many transactions as keep each short; an item is never divided.
 * Between two of them others write, those who wait first.
 *
 * @param last what each transaction ends with, such as counts of what was written in it
 */
export function inShortTransactions<T>(
  raw: RawDatabase,
  items: Iterable<T>,
  work: (item: T) => void,
  last: () => void = () => undefined,
): void {
  const iterator = items[Symbol.iterator]();
  // What comes first is fetched (and made, where items come from a generator) before its transaction begins.
  let item = iterator.next();
  while (item.done !== true) {
    takeTurn(() => raw.exec('begin immediate'));
    try {
      const began = performance.now();
      do {
        work(item.value);
        item = iterator.next();
      } while (item.done !== true && performance.now() - began < slice_ms);
      last();
      raw.exec('commit');
    } catch (fault) {
      if (raw.inTransaction) raw.exec('rollback');
      throw fault;
    }
    standAside();
  }
}
