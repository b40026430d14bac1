import type { Settings } from '@/lib/model/settings';
import type { DesignCode } from './clause-row';

/** The design codes that members can be checked by; a strength check that is not among them is refused by the reader. */
const codes: readonly DesignCode[] = [];

/** The code of a strength check; null = elastic stress, or none that is built. */
export const designCodeOf = (strengthCheck: Settings['strengthCheck']): DesignCode | null =>
  codes.find((code) => code.name === strengthCheck) ?? null;
