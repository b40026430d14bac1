/** What reading a set of files gives: the door between sheets and everything after. */
import type { PartOrigin } from '@/lib/intake/own/own-thing';
import type { Frame } from '@/lib/model/frame';
import type { SettingOrigins, Settings } from '@/lib/model/settings';
import type { Problem } from '@/lib/problems/problem';

/** A file as sent: its name without any path, and its bytes. */
export interface InputFile {
  readonly name: string;
  readonly bytes: Uint8Array;
}

/** A row as typed, kept so that a revision can be written out as a workbook again. */
export interface InputRow {
  /** Sheet name as in the file. */
  readonly sheet: string;
  /** 1-based row as in the file. */
  readonly row: number;
  /** Text of each cell as typed, by column from A; null = empty. Formula cells: the stored value. */
  readonly cells: readonly (string | null)[];
  /** Place among `sheets` of the sheet it stands on; missing in what was stored before rows could be read again. */
  readonly part?: number;
  /** What its cells are where their text does not say so (rows/cell-marks.ts); null = nothing of the kind. */
  readonly marks?: string | null;
  /** Who typed or changed the row on screen; null = it stands so in the files. */
  readonly changedBy?: string | null;
}

/** What was recognised of one sheet, for the page that brings sheets in. */
export interface SheetRead {
  readonly name: string;
  readonly file: string;
  /** The contract's sheet it was read as; null = not a sheet it knows. */
  readonly known: string | null;
  /** 1-based heading row, null where none was found. */
  readonly headingRow: number | null;
  /** Data rows read (titles, headings, units, comments, blanks left out). */
  readonly rows: number;
  readonly headings: readonly { readonly text: string; readonly cell: string; readonly known: string | null }[];
  /** What the numbers of its file settle the decimal mark to. */
  readonly decimalMark?: '.' | ',' | null;
}

export interface InputIdentity {
  /** The first file's name. */
  readonly name: string;
  /** SHA-256 of the file; of several: of the lines `sha256 name` sorted by name. */
  readonly sha256: string;
  readonly files: readonly { readonly name: string; readonly sha256: string; readonly size: number }[];
}

/** A frame as read: `frame` is null where errors stop it. */
export interface FrameRead {
  readonly id: string;
  readonly frame: Frame | null;
}

export interface Intake {
  readonly input: InputIdentity;
  readonly settings: Settings;
  readonly origins: SettingOrigins;
  /** In order of first definition; frames with `run` no are left out. */
  readonly frames: readonly FrameRead[];
  /** In the order of sheets in the file, rows, columns. */
  readonly problems: readonly Problem[];
  readonly sheets: readonly SheetRead[];
  readonly rows: readonly InputRow[];
  /** Sections and materials of the frames that can run, in order of first use. */
  readonly parts?: readonly PartOrigin[];
}
