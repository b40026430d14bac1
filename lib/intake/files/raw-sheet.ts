/**
 * Sheets as they stand in the files, before any rule of the contract looks at them: the door between
 * lib/intake/files (bytes → sheets) and lib/intake (rows → model).
 */
import type { InputIdentity } from '@/lib/intake/intake';
import type { Problem } from '@/lib/problems/problem';

interface Merged {
  /** A1 address of the master, where the cell lies in a merged block and is not its master. The value is the master's. */
  readonly mergedFrom?: string;
}

/** A cell's content; a blank cell is null. `text` is always what a reader of the sheet would call its text, never ''. */
export type RawCell = Merged &
  (
    | { readonly kind: 'text'; readonly text: string }
    /** Text = shortest decimal text of the number (`1`, `0.25`, `1e+21`). CSV cells are all text: only XLSX has this kind. */
    | { readonly kind: 'number'; readonly value: number; readonly text: string }
    /** `TRUE` or `FALSE`. */
    | { readonly kind: 'boolean'; readonly value: boolean; readonly text: string }
    /** A number shown as a date or a time. Text = as shown (`1-Feb`, `2026-02-01`); iso = the day. */
    | { readonly kind: 'date'; readonly text: string; readonly iso: string }
    /** `#REF!`, `#DIV/0!` … */
    | { readonly kind: 'error'; readonly text: string }
    /** A formula with no stored value (the workbook was written by a program that does not compute). Text = `=A1+B1`. */
    | { readonly kind: 'formula'; readonly text: string }
  );

export interface RawRow {
  /** 1-based row as in the file. */
  readonly row: number;
  /** By column from A; trailing blanks left out. Blank rows are left out of `rows` altogether. */
  readonly cells: readonly (RawCell | null)[];
  /** Who typed or changed it on screen, where it does not stand so in the files. */
  readonly changedBy?: string;
}

/** One sheet of one file. Its heading row is its own: columns may stand in another order than in another part. */
export interface RawPart {
  /** Sheet name as in this file. */
  readonly name: string;
  /** Basename of the file it came from (of a zip: of the file in it). */
  readonly file: string;
  /** Place in reading order among all parts, from 0: the order of problems. */
  readonly order: number;
  /**
   * What the numbers of this file that can be read one way only settle its decimal mark to; null = nothing settles it.
   * Hand it to `readNumber`. Only text cells need it.
   */
  readonly decimalMark: '.' | ',' | null;
  readonly rows: readonly RawRow[];
}

/** Sheets of one name (case, blanks, `_`, `-`, plural s ignored), joined in file-name order. */
export interface RawSheet {
  /** Name as in the first part. */
  readonly name: string;
  readonly parts: readonly RawPart[];
}

/** What reading files gives. `problems` are of whole files or sheets (`too-large`, `unreadable`), each with what to do. */
export interface FilesRead {
  /** In order of first appearance. Sheets read before a problem stopped a file are left out: nothing is read by halves. */
  readonly sheets: readonly RawSheet[];
  readonly problems: readonly Problem[];
  readonly identity: InputIdentity;
}

export interface ReadOptions {
  /** Asked now and then while reading; true = give up, with a `too-large` problem saying that it took too long. */
  readonly shouldStop?: () => boolean;
  /** The stated time in words for that problem: "60 seconds". */
  readonly stopsAfter?: string;
}
