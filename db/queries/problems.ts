/** Signatures for those who code against them; bodies follow in this folder. */
import type { Db } from '@/db/open';
import type { InputRow, SheetRead } from '@/lib/intake/intake';
import type { Problem } from '@/lib/problems/problem';

/** A revision's problems in order: those of the sheets, then those the analysis found. */
export declare function listProblems(db: Db, office: number, revision: number): Promise<Problem[]>;

/** What was recognised of each sheet. */
export declare function listSheets(db: Db, office: number, revision: number): Promise<SheetRead[]>;

/** Rows as typed, in order, a thousand at a time. */
export declare function iterateInputRows(db: Db, office: number, revision: number): AsyncGenerator<InputRow>;

/** The rows as typed around a row of a sheet, for a fragment of the sheet beside a problem. */
export declare function listInputRowsAround(
  db: Db,
  office: number,
  revision: number,
  at: { readonly sheet: string; readonly row: number; readonly around: number },
): Promise<InputRow[]>;
