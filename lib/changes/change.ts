/** A change chosen on screen: an edit of a revision's input rows, from which the next revision is made. */
import { z } from 'zod';
import { roles } from '@/lib/model/frame';
import { settingWords, type SettingName } from '@/lib/model/settings';

const settingNames = Object.keys(settingWords) as [SettingName, ...SettingName[]];

/** Members that one change may name one by one. */
export const mostMembers = 2_000;

/** A setting takes another value: its row on the Setup sheet is edited, or added. */
const settingChange = z.strictObject({
  kind: z.literal('setting'),
  setting: z.enum(settingNames, { error: 'Name a setting.' }),
  /** As it would be typed on the sheet: `second order`, `0.66`, `none`, `yes`. */
  value: z.string({ error: 'Give the value as it would be typed on the sheet.' }).trim().max(200),
});

const aFactor = z.number({ error: 'Give a factor as a number.' }).min(-100).max(100);

/** Rows of the Combinations sheet are edited; generated ones become rows of it too, and the sheet's are then all there are. */
const listCombinationsChange = z.strictObject({
  kind: z.literal('list combinations'),
  /** Whether generated combinations are written as rows, or go on being generated; not said: they are written. */
  generated: z.enum(['write', 'keep'], { error: 'Say whether generated combinations are written: write or keep.' }).optional(),
  /** Rows to add, for every frame. */
  add: z
    .array(
      z.strictObject({
        name: z.string({ error: 'Name the combination.' }).trim().min(1, 'Name the combination.').max(200),
        purpose: z.enum(['strength', 'service'], { error: 'Choose the purpose: strength or service.' }),
        terms: z
          .array(z.strictObject({ case: z.string().trim().min(1).max(300), factor: aFactor }))
          .min(1, 'Give at least one factor.')
          .max(300)
          .refine((terms) => new Set(terms.map((term) => term.case)).size === terms.length, 'Give each case once.'),
      }),
    )
    .max(200, 'Add at most 200 combinations at once.')
    .optional(),
  /** Names of combinations that are left out: generated ones are not written, listed rows go. */
  leaveOut: z.array(z.string().max(2000)).max(2000).default([]),
  /** Factors in place of generated or listed ones. */
  factors: z
    .array(
      z.strictObject({
        combination: z.string().max(2000),
        case: z.string().max(300),
        factor: aFactor,
      }),
    )
    .max(5000)
    .default([]),
});

/** What a version of one of the office's own combination sets makes of the load cases becomes rows of the Combinations sheet. */
const officeCombinationsChange = z.strictObject({
  kind: z.literal('office combinations'),
  set: z.number({ error: 'Choose a combination set of the office.' }).int().positive(),
  version: z.number({ error: 'Give the version of the set.' }).int().positive(),
  /** Whether what is listed stays beside it, or goes. */
  listed: z.enum(['keep', 'replace'], { error: 'Say what becomes of listed combinations: keep or replace.' }),
});

const id = (what: string) =>
  z
    .string({ error: `Name ${what}.` })
    .trim()
    .min(1, `Name ${what}.`)
    .max(200);

/** Members take another section: the cells that give it to them are edited. Everything that `what` says must fit a member. */
export const sectionChange = z.strictObject({
  kind: z.literal('section'),
  what: z
    .strictObject({
      section: id('a section').optional(),
      role: z.enum(roles, { error: `Name a role: ${roles.join(', ')}.` }).optional(),
      group: id('a group of members').optional(),
      span: id('a span').optional(),
      frame: id('a frame').optional(),
      members: z
        .array(z.strictObject({ frame: id('a frame'), member: id('a member') }))
        .min(1, 'Name at least one member.')
        .max(mostMembers, `Name at most ${mostMembers} members, or ask for them by section, role or group.`)
        .optional(),
    })
    .refine(
      (what) => Object.values(what).some((one) => one !== undefined),
      'Say which members: by section, role, group, span, frame or one by one.',
    ),
  /** A designation of the library, or a section of the batch's Sections sheet. */
  to: id('the section that they take'),
});

/** The office's latest version of a section or material takes the place of the one that the revision was read with. */
const ownVersionChange = z.strictObject({
  kind: z.literal('own version'),
  part: z.enum(['section', 'material'], { error: 'Say what is taken anew: section or material.' }),
  /** As the office calls it. */
  name: id('a section or material of the office’s own'),
});

/** Every kind of change. A further kind is one more line here, one in apply-changes.ts and one in change-words.ts. */
export const changeSchema = z.discriminatedUnion(
  'kind',
  [settingChange, sectionChange, listCombinationsChange, officeCombinationsChange, ownVersionChange],
  {
    error: 'Say what kind of change it is: setting, section, list combinations, office combinations or own version.',
  },
);

export type Change = z.infer<typeof changeSchema>;
export type SettingChange = Extract<Change, { kind: 'setting' }>;
export type ListCombinationsChange = Extract<Change, { kind: 'list combinations' }>;
export type OfficeCombinationsChange = Extract<Change, { kind: 'office combinations' }>;
export type OwnVersionChange = Extract<Change, { kind: 'own version' }>;
export type SectionChange = Extract<Change, { kind: 'section' }>;
