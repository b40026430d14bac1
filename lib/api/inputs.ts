/** What the API takes: one schema a body or query, with the sentence a person reads where it doesn't fit. */
import { z } from 'zod';
import { passwordLength } from '@/lib/access/password-length';
import { personRoles } from '@/lib/access/may';
import { type Change, changeSchema, sectionChange } from '@/lib/changes/change';
import { movementKinds } from '@/lib/results/compare';
import { comparedLists } from '@/lib/results/compared-page';

const text = (what: string, max: number) =>
  z
    .string({ error: `Enter ${what}.` })
    .trim()
    .min(1, `Enter ${what}.`)
    .max(max, `Keep ${what} to ${max} characters.`);

const letterText = z.string().regex(/^[A-Z]{1,3}$/, 'Name a revision by its letter.');

export const emailInput = z
  .string({ error: 'Enter an e-mail address.' })
  .trim()
  .toLowerCase()
  .max(200, 'Keep the e-mail address to 200 characters.')
  .pipe(z.email('Enter an e-mail address, like name@office.example.'));

export const credentialsInput = z.object({
  email: emailInput,
  password: z.string().min(1, 'Enter your password.').max(passwordLength.max),
});

export const projectInput = z.object({
  number: z.string().trim().max(40, 'Keep the number to 40 characters.').default(''),
  name: text('the project’s name', 120),
});

export const personInput = z.object({
  name: text('the person’s name', 120),
  email: emailInput,
  role: z.enum(personRoles, { error: 'Choose what they come to do: lead, analyst, checker or client.' }),
  password: z
    .string({ error: 'Enter a first password.' })
    .min(passwordLength.min, `Give a first password of at least ${passwordLength.min} characters.`)
    .max(passwordLength.max, `Keep the password to ${passwordLength.max} characters.`),
});

export const assignedInput = z.object({ people: z.array(z.number().int().positive()).max(500) });

/** What a change is about: nothing is changed twice at once. */
function subjectOf(change: Change): string {
  if (change.kind === 'section') return JSON.stringify(change.what);
  // what frames are combined by is one thing, whichever way it is changed
  if (change.kind === 'list combinations' || change.kind === 'office combinations') return 'combinationSet';
  if (change.kind === 'own version') return `${change.part} ${change.name.toLowerCase()}`;
  return change.setting;
}

/** Changes from which the next revision is made. */
export const changesInput = z.object({
  changes: z
    .array(changeSchema, { error: 'List the changes.' })
    .min(1, 'Change at least one thing.')
    .max(50, 'Make at most 50 changes at once.')
    .refine((list) => new Set(list.map(subjectOf)).size === list.length, 'Change each thing once.'),
  reason: text('why it is changed', 500),
  run: z.boolean().default(false),
});

/** A change of section to be looked at before it is made. */
export const previewInput = z.object({ change: sectionChange });

export const batchNameInput = text('the batch’s name', 120);

/** Which page of a table's rows: after or before a cursor given by the page before it. */
export const pageInput = z.object({
  after: z.string().max(2000).optional(),
  before: z.string().max(2000).optional(),
  size: z.coerce.number().int().min(1, 'Ask for at least 1 row.').max(500, 'Ask for at most 500 rows.').default(100),
});

export const exportInput = z.object({
  format: z.enum(['csv', 'xlsx'], { error: 'Choose the format: csv or xlsx.' }),
});

/** Which revision it is compared with, and which rows of what moved. */
export const compareInput = z.object({
  with: letterText.optional(),
  list: z.enum(comparedLists, { error: `Choose a list: ${comparedLists.join(', ')}.` }).default('frames'),
  show: z.enum(movementKinds, { error: `Choose what to show: ${movementKinds.join(', ')}.` }).default('moved'),
  by: z.coerce
    .number({ error: 'Give what is a movement as a number, like 0.01.' })
    .min(0, 'A movement is 0 or more.')
    .max(1000, 'Give a movement of at most 1000.')
    .default(0.01),
  page: z.coerce.number().int().min(1, 'Pages count from 1.').max(1_000_000).default(1),
  size: z.coerce.number().int().min(1, 'Ask for at least 1 row.').max(500, 'Ask for at most 500 rows.').default(100),
});

export const cellInput = z
  .object({
    sheet: z.string({ error: 'Name the sheet: ?sheet=Members.' }).min(1).max(200),
    cell: z
      .string()
      .regex(/^[A-Z]{1,3}[1-9]\d{0,6}$/, 'Name a cell, like E412.')
      .optional(),
    row: z.coerce.number().int().min(1).max(1_048_576).optional(),
  })
  .refine((at) => at.cell !== undefined || at.row !== undefined, 'Name the cell, like E412, or the row.');

/** Ids are whole numbers; anything else names nothing. */
export const idInput = z
  .string()
  .regex(/^[1-9]\d{0,14}$/)
  .transform(Number);
export const frameNumberInput = z.coerce.number().int().min(1).max(20_000);
export const letterInput = letterText;

export const templateInput = z.object({
  units: z.enum(['metric', 'us'], { error: 'Choose the units: metric or us.' }).default('metric'),
});
