/** A change chosen on screen: an edit of a revision's input rows, from which the next revision is made. */
import { z } from 'zod';
import { settingWords, type SettingName } from '@/lib/model/settings';

const settingNames = Object.keys(settingWords) as [SettingName, ...SettingName[]];

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

/** Every kind of change. A further kind is one more line here, one in apply-changes.ts and one in change-words.ts. */
export const changeSchema = z.discriminatedUnion('kind', [settingChange, listCombinationsChange], {
  error: 'Say what kind of change it is: setting or list combinations.',
});

export type Change = z.infer<typeof changeSchema>;
export type SettingChange = Extract<Change, { kind: 'setting' }>;
export type ListCombinationsChange = Extract<Change, { kind: 'list combinations' }>;
