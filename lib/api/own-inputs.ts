/** What may be sent about an office's own sections and grades. */
import { z } from 'zod';
import type { OwnKind } from '@/lib/intake/own/own-thing';

export const ownPath = z.enum(['sections', 'grades']).transform((path): OwnKind => (path === 'grades' ? 'material' : 'section'));

const units = z.enum(['metric', 'us'], { error: 'Choose the units: metric or us.' });
const note = z.string({ error: 'Say where the figures come from, in words.' }).trim().max(300).default('');
const cells = z.record(z.string().max(40), z.string({ error: 'Give each figure as it is typed.' }).trim().max(300));

/** A version of one: cells by column of its sheet (`h`, `I minor`, `fy`, …), as they would be typed there. */
export const ownVersionInput = z.strictObject({ units, cells, note });
export const ownInput = ownVersionInput.extend({
  name: z.string({ error: 'Give it a name.' }).trim().min(1, 'Give it a name.').max(60, 'A name has at most 60 characters.'),
});

/** A table of them is looked at first; `keep=yes` keeps what it says. */
export const ownImportInput = z.object({ units: units.default('metric'), keep: z.enum(['yes', 'no']).default('no') });
export const ownTemplateInput = z.object({ units: units.default('metric'), format: z.enum(['xlsx', 'csv']).default('xlsx') });

/** A Changes sheet is looked at first; `make=yes` makes the next revision by it. */
export const changesSheetInput = z.object({
  make: z.enum(['yes', 'no']).default('no'),
  run: z.enum(['yes', 'no']).default('no'),
  reason: z.string().trim().max(500, 'Keep why it is changed to 500 characters.').default(''),
});
export const changesTemplateInput = z.object({ format: z.enum(['xlsx', 'csv']).default('xlsx') });
