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

/** Generated combinations become rows of the Combinations sheet, and the sheet's are all there are. */
const listCombinationsChange = z.strictObject({
  kind: z.literal('list combinations'),
  /** Names of generated combinations that are not written. */
  leaveOut: z.array(z.string().max(2000)).max(2000).default([]),
  /** Factors in place of generated ones. */
  factors: z
    .array(
      z.strictObject({
        combination: z.string().max(2000),
        case: z.string().max(300),
        factor: z.number({ error: 'Give a factor as a number.' }).min(-100).max(100),
      }),
    )
    .max(5000)
    .default([]),
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

/** Every kind of change. A further kind is one more line here, one in apply-changes.ts and one in change-words.ts. */
export const changeSchema = z.discriminatedUnion('kind', [settingChange, sectionChange, listCombinationsChange], {
  error: 'Say what kind of change it is: setting, section or list combinations.',
});

export type Change = z.infer<typeof changeSchema>;
export type SettingChange = Extract<Change, { kind: 'setting' }>;
export type ListCombinationsChange = Extract<Change, { kind: 'list combinations' }>;
export type SectionChange = Extract<Change, { kind: 'section' }>;
