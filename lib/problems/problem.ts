/** What can be wrong in the sheets, by severity; the words for each are in wording.ts. */
export const errorCodes = [
  'missing-sheet', 'missing-column', 'missing-id', 'duplicate-id', 'conflicting-row', 'unknown-node', 'unknown-member',
  'unknown-section', 'unknown-material', 'unknown-case', 'unknown-unit', 'wrong-unit-kind', 'unknown-grade',
  'unknown-word', 'not-a-number', 'date-for-number', 'error-value', 'no-stored-value', 'zero-length', 'not-positive',
  'load-beyond-end', 'combination-without-case', 'no-supports', 'mechanism', 'not-connected', 'out-of-range',
  'not-supported', 'bad-expression', 'too-large', 'unreadable',
] as const; // prettier-ignore
export const warningCodes = [
  'same-ends', 'coincident-nodes', 'crossing', 'suspect-unit', 'no-self-weight', 'stress-factor', 'near-miss-column',
  'repeated-row',
] as const; // prettier-ignore
export const noteCodes = ['column-ignored', 'text-number', 'default-used', 'derived', 'clipped'] as const;

export type ProblemCode = (typeof errorCodes)[number] | (typeof warningCodes)[number] | (typeof noteCodes)[number];
export type Severity = 'error' | 'warning' | 'note';

/**
 * One thing wrong at one cell. `frames` lists every frame it touches ([] = none, or the whole batch where
 * severity is error and `stopsAll`); `frame` of the published JSON is the first of them.
 * Severity usually follows the code; a few rules lower or raise it (sheets §7).
 */
export interface Problem {
  readonly severity: Severity;
  readonly code: ProblemCode;
  /** Sheet name as in the file; null where the problem is with the file itself. */
  readonly sheet: string | null;
  /** File it stands in, where several were sent (basename only, never a path). */
  readonly file: string | null;
  /** 1-based row as in the file. */
  readonly row: number | null;
  /** Heading as typed (or the missing one's name). */
  readonly column: string | null;
  /** A1 address. */
  readonly cell: string | null;
  readonly frames: readonly string[];
  /** The cell's text as found, null where there is none. */
  readonly found: string | null;
  /** What it means and what to do, one or two sentences. */
  readonly message: string;
  /** True: no frame of the batch can run (a missing sheet, an unreadable file). */
  readonly stopsAll: boolean;
}
