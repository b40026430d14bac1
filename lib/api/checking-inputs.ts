/** What the routes of checking take. */
import { z } from 'zod';
import { figureSchema } from '@/lib/checking/figure';

const words = (what: string, max: number) =>
  z
    .string({ error: `Write ${what}.` })
    .trim()
    .min(1, `Write ${what}.`)
    .max(max, `Keep ${what} to ${max} characters.`);
const maybe = (max: number) => z.string().trim().max(max, `Keep it to ${max} characters.`).default('');

export const sendInput = z.object({ note: maybe(2000) });
export const returnInput = z.object({ note: words('a note: what is to be mended', 2000) });
export const passInput = z.object({ note: maybe(2000) });

const named = z.string().trim().min(1).max(200).nullable().default(null);
export const queryInput = z.object({
  /** Member, span or node; none = the frame. */
  subject: named,
  check: named,
  text: words('the query', 2000),
});

/** More said to a query, its closing, or both. */
export const answerInput = z
  .object({ text: maybe(2000), close: z.boolean().default(false) })
  .refine(({ text, close }) => text !== '' || close, { error: 'Write an answer, or close the query.', path: ['text'] });

export const acceptInput = z.object({
  /** Places of the checks among the frame's own, from 0; −1 = the frame as a whole. */
  checks: z.array(z.number().int().min(-1), { error: 'Say which checks.' }).min(1, 'Choose at least one check.').max(2000),
  reason: words('the reason: it is printed beside the check', 1000),
  /** Also every other frame's check of that name that is not checked for the very same cause. */
  alike: z.boolean().default(false),
});

export const acceptedInput = z.object({ check: z.coerce.number({ error: 'Say which check: ?check=0.' }).int().min(-1) });

export const ownValueInput = z.object({
  figure: figureSchema,
  /** As one types it: `75.2`, in the batch's unit, or `75.2 kN`. */
  value: words('your own value', 60),
  note: maybe(500),
});
