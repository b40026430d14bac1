import type { RawDatabase } from '@/db/open';
import { statement } from '@/db/statements';

/** As many picks are kept side by side; the one longest not used gives way. */
const most = 20;

interface Slot {
  frames: readonly number[];
  mark: number;
}
const kept = new WeakMap<RawDatabase, { slots: (Slot | undefined)[]; used: number[]; marks: number }>();

/**
 * A table of the connection's own that holds these frames, to be looked up row by row: a list handed over with each page
 * would be read anew for each. The frames of one array are written once.
 *
 * @returns SQL that gives them
 */
export function pickedFrames(raw: RawDatabase, frames: readonly number[]): string {
  let known = kept.get(raw);
  if (!known) kept.set(raw, (known = { slots: [], used: [], marks: 0 }));
  let at = known.slots.findIndex((slot) => slot?.frames === frames);
  if (at >= 0) known.used = known.used.filter((one) => one !== at);
  else at = known.used.length < most ? known.used.length : known.used.shift()!;
  known.used.push(at);
  const slot = known.slots[at];
  if (slot?.frames !== frames || !isThere(raw, at, slot.mark)) {
    known.marks += 1;
    known.slots[at] = { frames, mark: known.marks };
    fill(raw, at, frames, known.marks);
  }
  return `select frame from temp.picked_${at}`;
}

/** A transaction that was taken back would have taken the rows along: each pick begins with a mark of its own. */
function isThere(raw: RawDatabase, at: number, mark: number): boolean {
  if (!raw.prepare(`select 1 from temp.sqlite_schema where name = 'picked_${at}'`).get()) return false;
  return statement(raw, `select 1 from temp.picked_${at} where frame = ?`).get(-mark) !== undefined;
}

function fill(raw: RawDatabase, at: number, frames: readonly number[], mark: number): void {
  raw.exec(`create temp table if not exists picked_${at} (frame integer primary key); delete from temp.picked_${at}`);
  statement(raw, `insert into temp.picked_${at} select value from json_each(?) union select ?`).run(
    JSON.stringify(frames),
    -mark,
  );
}
