const mebibyte = 1024 * 1024;

/** What one upload may hold (sheets §1); MB are counted as file managers show them. */
export const limits = {
  sentBytes: 25 * mebibyte,
  unpackedBytes: 250 * mebibyte,
  rows: 1_000_000,
  columns: 256,
  /** Files in one zip. */
  files: 2_000,
  /** Characters in one cell: what a spreadsheet itself allows. */
  cellCharacters: 32_767,
} as const;
