/**
 * Numbers that stand for "none" in columns that are sorted: keyset paging wants a total order without nulls.
 * No ratio, mass, force or movement comes near them.
 */
export const noneLow = -1e300;
/** Where none means "infinitely large": a frame without a critical load sorts after all that have one. */
export const noneHigh = 1e300;

export const orNone = (value: number | null): number => (value === null || !Number.isFinite(value) ? noneLow : value);
export const orNoneHigh = (value: number | null): number => (value === null || !Number.isFinite(value) ? noneHigh : value);
export const orNull = (value: number): number | null => (value === noneLow || value === noneHigh ? null : value);
