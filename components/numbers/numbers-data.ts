/** The numbers behind a member as they are laid out: plain, in the units chosen, unrounded. */

/** A cell: a number in the unit of its row or column, a word, or nothing. */
export type NumberCell = number | string | null;

export interface NumberColumn {
  readonly label: string;
  readonly unit?: string | null;
  /** Its numbers are of a kind of their own: decimals are chosen for the column and not for the table. */
  readonly apart?: boolean;
  /** Words rather than numbers: set to the left. */
  readonly words?: boolean;
  /** What is left over by rounding: shown as a power of ten. */
  readonly power?: boolean;
}

export interface NumberRow {
  readonly label: string;
  readonly unit?: string | null;
  readonly cells: readonly NumberCell[];
  /** Of the member that is followed: stands out from the other rows. */
  readonly own?: boolean;
}

/** A matrix, a vector or a table that can be read and copied. */
export interface NumberTable {
  /** For its name and its place in the page. */
  readonly id: string;
  readonly title: string;
  /** Over the labels of the rows. */
  readonly corner: string;
  readonly columns: readonly NumberColumn[];
  readonly rows: readonly NumberRow[];
  /** Numbers of several kinds, each shown with six figures; absent: decimal points stand under one another. */
  readonly mixed?: boolean;
  /** A long table scrolls on screen and prints its own rows only. */
  readonly long?: boolean;
}

/** One step of the calculation. */
export interface NumberStep {
  readonly title: string;
  /** What is done here, in a sentence or two. */
  readonly words: readonly string[];
  readonly tables: readonly NumberTable[];
}

export interface NumbersData {
  readonly member: string;
  readonly result: string;
  /** "1.35 dead + 1.5 snow" */
  readonly description: string | null;
  readonly steps: readonly NumberStep[];
  /** The whole frame: numbering, load vector, displacements. */
  readonly frame: NumberStep;
}
