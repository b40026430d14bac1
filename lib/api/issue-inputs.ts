/** What the API takes about issues: one schema a body or query, with the sentence a person reads where it doesn't fit. */
import { z } from 'zod';
import { issueFileKinds } from '@/lib/issuing/issue-file';

const text = (what: string, max: number) =>
  z
    .string({ error: `Enter ${what}.` })
    .trim()
    .min(1, `Enter ${what}.`)
    .max(max, `Keep ${what} to ${max.toLocaleString('en-GB')} characters.`);

const people = z
  .array(z.number().int().positive(), { error: 'List the clients by their ids.' })
  .max(200, 'Issue to at most 200 clients.');

/** A revision to be issued: to whom, with what note, and which frames the calculation report shows one by one. */
export const issueInput = z.strictObject({
  clients: people.min(1, 'Choose at least one client of the project.'),
  note: z.string().trim().max(2000, 'Keep the note to 2,000 characters.').default(''),
  frames: z
    .union([z.enum(['all', 'flagged']), z.array(z.number().int().positive()).min(1).max(20_000)], {
      error: 'Choose the frames of the report: all, flagged, or their numbers in sheet order.',
    })
    .default('all'),
});

export const moreClientsInput = z.strictObject({ clients: people.min(1, 'Choose at least one client of the project.') });

export const withdrawInput = z.strictObject({ reason: text('why it is withdrawn', 1000) });

/** `frame`: its number in sheet order, from 1, or its name; left out for a question on the whole issue. */
export const questionInput = z.strictObject({
  frame: z.union([z.number().int().positive(), z.string().trim().min(1).max(200)], { error: 'Name the frame.' }).nullish(),
  text: text('the question', 2000),
});

export const sayInput = z.strictObject({ text: text('what you say', 2000) });

export const checkersIssueInput = z.strictObject({
  checkersIssue: z.boolean({ error: 'Say true or false: whether checkers may issue.' }),
});

export const issueFileInput = z.enum(issueFileKinds);

/** Which frames of an issue, a page of them at a time. */
export const issuedFramesInput = z.object({
  find: z.string().trim().max(100).optional(),
  group: z.string().max(200).optional(),
  verdict: z.enum(['over', 'near', 'within', 'not checked']).optional(),
  page: z.coerce.number().int().min(1, 'Pages count from 1.').max(1_000_000).default(1),
  size: z.coerce.number().int().min(1, 'Ask for at least 1 frame.').max(500, 'Ask for at most 500 frames.').default(50),
});
