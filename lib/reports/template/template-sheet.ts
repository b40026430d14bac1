import type { SheetName } from '@/lib/intake/sheet-definitions';
import type { Quantity } from '@/lib/units/quantity';

type Value = string | number | null;

export interface TemplateColumn {
  readonly heading: string;
  /** Its unit is written into the heading. */
  readonly quantity?: Quantity;
  readonly note: string;
  /** Offered as a drop-down. `only` false: other entries (numbers) are allowed too. */
  readonly choices?: { readonly words: readonly string[]; readonly only: boolean };
}

export interface TemplateSheet {
  readonly name: SheetName;
  /** What the sheet is for: the title row above its headings. */
  readonly purpose: string;
  readonly required: readonly string[];
  readonly columns: readonly TemplateColumn[];
  /** Example rows; one that begins with `#` is a comment. */
  readonly rows: readonly (readonly Value[])[];
}

/** Takes the metric figure or the other, as the template's units ask. */
export type Pick = <T>(metric: T, other: T) => T;

/** Nothing but these words. */
export const one = (...words: string[]): TemplateColumn['choices'] => ({ words, only: true });
/** These words, or a number. */
export const orNumber = (...words: string[]): TemplateColumn['choices'] => ({ words, only: false });
export const column = (heading: string, note: string, more: Partial<TemplateColumn> = {}): TemplateColumn => ({
  heading,
  note,
  ...more,
});
export const frame = column('frame', 'Name of the frame; * means every frame of the batch that has what the row names.');
export const loadCase = column('case', 'A load case of sheet Load cases.');
export const yesNo = one('yes', 'no');
