/** What the API takes about people: invitations, passwords, where someone stands, personal tokens. */
import { z } from 'zod';
import { personRoles, type PersonRole } from '@/lib/access/may';
import { passwordLength } from '@/lib/access/password-length';
import { tokenDays, tokenScopes } from '@/lib/access/token-scopes';
import { mailKinds } from '@/lib/mail/kinds';
import type { MailKind } from '@/lib/mail/message';
import { emailInput } from './inputs';

const role = z.enum(personRoles as readonly [PersonRole, ...PersonRole[]], {
  error: 'Choose what they come to do: lead, analyst, checker or client.',
});
const projects = z.array(z.number().int().positive(), { error: 'List the projects by their ids.' }).max(500);
const newPassword = z
  .string({ error: 'Enter a password.' })
  .min(passwordLength.min, `Choose a password of at least ${passwordLength.min} characters.`)
  .max(passwordLength.max, `Keep the password to ${passwordLength.max} characters.`);
const name = (what: string, max: number) =>
  z
    .string({ error: `Enter ${what}.` })
    .trim()
    .min(1, `Enter ${what}.`)
    .max(max, `Keep ${what} to ${max} characters.`);
const secret = z.string({ error: 'The link’s own part is missing.' }).min(1).max(200);

export const invitationInput = z.object({ email: emailInput, role, projects: projects.default([]) });
export const acceptInput = z.object({ token: secret, name: name('your name', 120), password: newPassword });
export const askResetInput = z.object({ email: emailInput });
export const resetInput = z.object({ token: secret, password: newPassword });
export const ownPasswordInput = z.object({
  current: z
    .string({ error: 'Enter the password you have now.' })
    .min(1, 'Enter the password you have now.')
    .max(passwordLength.max),
  password: newPassword,
});

/** Where someone stands; what is left out stays. */
export const standingInput = z
  .strictObject({ role: role.optional(), projects: projects.optional(), disabled: z.boolean().optional() })
  .refine((sent) => Object.keys(sent).length > 0, 'Say what to change: role, projects or disabled.');

export const transferInput = z.object({
  to: z.number({ error: 'Choose who takes it over.' }).int().positive(),
  lead: z.boolean().default(false),
});

/** Which kinds of letters someone wants. */
export const lettersInput = z.object({
  letters: z.partialRecord(
    z.enum(Object.keys(mailKinds) as [MailKind, ...MailKind[]], { error: 'Name a kind of letter.' }),
    z.boolean(),
  ),
});

export const tokenInput = z.object({
  name: name('what the token is for', 60),
  scope: z.enum(tokenScopes, { error: `Choose what it may do: ${tokenScopes.join(' or ')}.` }),
  days: z.union(
    tokenDays.map((days) => z.literal(days)),
    { error: `Choose for how many days: ${tokenDays.join(', ')}.` },
  ),
});

const dayText = z.string().regex(/^\d{4}-\d{2}-\d{2}$/, 'Give a day like 2026-12-01.');
/** An empty field of a form says nothing. */
const orNothing = <T extends z.ZodType>(schema: T) => z.preprocess((sent) => (sent === '' ? undefined : sent), schema.optional());

/** Which entries of a project’s activity. */
export const activityInput = z.object({
  person: orNothing(z.coerce.number({ error: 'Name a person by their id.' }).int().positive()),
  what: orNothing(z.string().max(100)),
  from: orNothing(dayText),
  to: orNothing(dayText),
  before: orNothing(z.coerce.number().int().positive()),
});
