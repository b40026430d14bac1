/** What the API takes of an office's own limits and combination sets. */
import { z } from 'zod';
import { mostRules } from '@/lib/combinations/office-set';
import { readRule, ruleText } from '@/lib/combinations/rule-text';
import { readRuleSet } from '@/lib/combinations/read-rule-set';
import { limitKey, limitedBy, ofNodes } from '@/lib/model/office-limit';

const line = (what: string, max: number) => z.string().trim().max(max, `Keep ${what} to ${max} characters.`);

const limit = z
  .strictObject({
    appliesTo: line('what it applies to', 100).min(1, 'Say what it applies to.'),
    measure: z.enum(['deflection', 'sway', 'displacement', 'spread'], {
      error: 'Choose the measure: deflection, sway, displacement or spread.',
    }),
    direction: z.enum(['x', 'y', 'resultant'], { error: 'Choose the direction: x, y or resultant.' }).nullish(),
    toPlace: line('the other place', 100).nullish(),
    ratio: z
      .number({ error: 'Give n of L/n as a number.' })
      .min(1, 'Give n of L/n from 1.')
      .max(10_000, 'Give n of L/n up to 10,000.')
      .nullable(),
    absolute_m: z
      .number({ error: 'Give the movement allowed as a number of metres.' })
      .positive('Give a movement above 0.')
      .max(10, 'Give a movement of at most 10 m.')
      .nullish(),
    combination: line('the combination', 300).nullish(),
    source: line('the source', 200).default(''),
  })
  .superRefine((one, context) => {
    const tell = (message: string) => context.addIssue({ code: 'custom', message });
    if (!ofNodes(one.measure) && !limitedBy.some((each) => each === one.appliesTo))
      tell(`Say whose ${one.measure} it is: ${limitedBy.join(', ')}.`);
    if (one.measure === 'displacement' && one.ratio !== null) tell('A displacement has no length to divide: give millimetres.');
    if (one.ratio === null && (one.absolute_m ?? null) === null) tell('Give a ratio or a movement.');
    if (one.measure === 'spread' && (one.toPlace ?? '') === '') tell('Give the place of the other node of a spread.');
  });

/** An office's own limits on movement, one for a thing, measure and combination. */
export const limitsInput = z.object({
  limits: z
    .array(limit, { error: 'List the limits.' })
    .max(100, 'Keep at most 100 limits.')
    .refine(
      (list) => new Set(list.map(limitKey)).size === list.length,
      'Give one limit for a role or place, measure and combination.',
    ),
});

const rule = z.strictObject({
  from: line('where a rule is from', 100).min(1, 'Say of each rule where it is from.'),
  purpose: z.enum(['strength', 'service'], { error: 'Choose the purpose of each rule: strength or service.' }),
  suffix: line('the end of the name', 40).default(''),
  rule: line('a rule', 500).transform((text, context) => {
    const { parts, wrong } = readRule(text);
    if (parts !== null) return ruleText(parts);
    context.addIssue({ code: 'custom', message: `${wrong}.` });
    return z.NEVER;
  }),
});

const content = {
  level: z.enum(['factored', 'allowable'], { error: 'Say what strength combinations hold: factored or allowable.' }),
  together: z.boolean().default(false),
  rules: z.array(rule, { error: 'List the rules.' }).min(1, 'A set has at least one rule.').max(mostRules, `Keep at most ${mostRules} rules.`), // prettier-ignore
  provenance: line('where it is from', 2000).min(1, 'Say where the figures are from and who agreed to them.'),
  basedOn: z
    .string()
    .trim()
    .max(300)
    .refine((text) => readRuleSet(text).set !== null, 'A set is based on a published one, or on none.')
    .nullable()
    .default(null),
};

/** A new set of the office. */
export const newSetInput = z.object({
  name: line('the name', 100)
    .min(1, 'Name the set.')
    .refine((text) => readRuleSet(text).set === null, 'A published set has this name. Give the office’s own another.'),
  ...content,
});

/** The next version of a set, after the one that was looked at; or whether it is offered. */
export const setVersionInput = z.object({ after: z.number().int().positive(), ...content });
export const setOfferedInput = z.object({ offered: z.boolean({ error: 'Say whether the set is offered.' }) });
