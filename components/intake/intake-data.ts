import type { Severity } from '@/lib/problems/problem';

/** A sheet as it was read, with the number of problems at its cells. */
export interface SheetLine {
  readonly name: string;
  readonly file: string | null;
  /** The contract's sheet it was read as; null = not a sheet it knows. */
  readonly known: string | null;
  readonly rows: number;
  /** "all 4 headings", "8 of 9 headings": counts only, the component writes the words. */
  readonly headings: number;
  readonly headingsKnown: number;
  readonly errors: number;
  readonly warnings: number;
  readonly notes: number;
}

export interface ProblemLine {
  readonly id: string;
  readonly severity: Severity;
  readonly code: string;
  readonly sheet: string | null;
  readonly file: string | null;
  readonly cell: string | null;
  readonly found: string | null;
  readonly message: string;
  readonly frames: readonly string[];
  /** All the frames it touches, where `frames` was cut short. */
  readonly frameCount?: number;
  readonly stopsAll: boolean;
}

/** A piece of the sender's own sheet around the cell of a problem. */
export interface CellFragment {
  readonly sheet: string;
  /** Letters of the columns shown, in order. */
  readonly columns: readonly string[];
  /** The heading row, where it is not among `rows`. */
  readonly heading: FragmentRow | null;
  readonly rows: readonly FragmentRow[];
  /** A1 address of the ringed cell; null = the whole row `row`. */
  readonly cell: string | null;
  readonly row: number | null;
}
export interface FragmentRow {
  readonly row: number;
  /** Text by column shown; null = blank. */
  readonly cells: readonly (string | null)[];
}

export interface DefaultLine {
  readonly setting: string;
  /** With its unit. */
  readonly value: string;
  /** "default" or "office". */
  readonly source: string;
}
