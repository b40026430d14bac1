import type { RawDatabase } from '@/db/open';

/** How many answers of each sort are kept. Orders and frames are long, counts a few words. */
const most = { count: 2000, frames: 20, order: 8, summary: 4, certificate: 20 } as const;

const kept = new WeakMap<RawDatabase, Map<keyof typeof most, Map<string, unknown>>>();

/**
 * An answer that holds as long as its key does: keys carry the revision's stamp, which grows with every change of its
 * results, so that nothing here is ever out of date. The answer longest not asked for is given up first.
 */
export function remembered<T>(raw: RawDatabase, sort: keyof typeof most, key: string, make: () => T): T {
  let sorts = kept.get(raw);
  if (!sorts) kept.set(raw, (sorts = new Map()));
  let answers = sorts.get(sort);
  if (!answers) sorts.set(sort, (answers = new Map()));
  const known = answers.has(key);
  const answer = known ? (answers.get(key) as T) : make();
  answers.delete(key);
  answers.set(key, answer);
  const oldest = answers.size > most[sort] ? answers.keys().next() : undefined;
  if (oldest?.done === false) answers.delete(oldest.value);
  return answer;
}
