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

/** Every kind of change. A further kind is one more line here, one in apply-changes.ts and one in change-words.ts. */
export const changeSchema = z.discriminatedUnion('kind', [settingChange], { error: 'Say what kind of change it is: setting.' });

export type Change = z.infer<typeof changeSchema>;
export type SettingChange = Extract<Change, { kind: 'setting' }>;
