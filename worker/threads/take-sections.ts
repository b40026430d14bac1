/** In a thread: what sections are in a batch, with its materials for their thickness. */
import type { OpenDatabase } from '@/db/open';
import { listOwnThings } from '@/db/queries/own-parts';
import { listSheets } from '@/db/queries/problems';
import { rowsOfSheets } from '@/db/queries/sizing';
import { canBeReadAgain } from '@/lib/intake/rows/input-rows';
import { probeSections, saysSections, type SectionAsked } from '@/lib/sizing/probe-sections';
import type { SectionTaken } from '@/lib/sizing/section-taken';
import type { Unfit } from '@/lib/sizing/with-sections';
import { storedInput } from './make-changed';
import { openOnce } from './open-once';

export interface TakeTask {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly revision: number;
  readonly asked: readonly SectionAsked[];
}

/** In the order of what was asked. */
export type TakeAnswer = readonly (SectionTaken | Unfit)[];

export const takeSections = ({ file, office, revision, asked }: TakeTask): Promise<TakeAnswer> =>
  sectionsOf(openOnce(file), office, revision, asked);

export async function sectionsOf(
  { db, raw }: Pick<OpenDatabase, 'db' | 'raw'>,
  office: number,
  revision: number,
  asked: readonly SectionAsked[],
): Promise<TakeAnswer> {
  const own = await listOwnThings(db, office);
  const sheets = await listSheets(db, office, revision);
  const parts = [...sheets.keys()].filter((place) => saysSections(sheets[place]?.known ?? null));
  const rows = rowsOfSheets(raw, revision, parts);
  if (rows.length > 0) return probeSections({ sheets, rows }, { own }, asked);
  // kept by an earlier version, row by row without its sheets, or there are no such sheets
  const whole = await storedInput({ db, raw }, office, revision);
  if (!canBeReadAgain(whole.rows)) throw new RangeError(`Expected revision ${revision} to be readable again`);
  return probeSections({ sheets: whole.sheets, rows: whole.rows.filter((row) => row.part !== undefined && parts.includes(row.part)) }, { own }, asked); // prettier-ignore
}
