import type { Change } from '@/lib/changes/change';
import { settingText } from '@/lib/changes/setting-text';
import { readSetting } from '@/lib/changes/setting-value';
import { settingWords, type Settings } from '@/lib/model/settings';

/** A change in words: what, and its value before and after. */
export interface ChangeWords {
  /** "analysis" */
  readonly what: string;
  /** "first order" */
  readonly from: string;
  /** "second order" */
  readonly to: string;
}

/** @param before the settings of the revision that is changed */
export function changeWords(change: Change, before: Settings): ChangeWords {
  const { setting, value } = change;
  const read = readSetting(setting, value);
  const to = read.refused === null ? settingText(setting, read.settings) : value;
  return { what: settingWords[setting], from: settingText(setting, before) ?? 'none', to: to ?? value };
}

/** "analysis: first order → second order" */
export const changeLine = ({ what, from, to }: ChangeWords): string => `${what}: ${from} → ${to}`;

/** Settings that say nothing more about a frame once it is read: to change only these leaves every result as it is. */
const outsideResults: ReadonlySet<string> = new Set(['title']);

/** Whether every frame has to be analysed and checked again after these changes, or none. */
export function touches(changes: readonly Change[]): 'every frame' | 'no frame' {
  return changes.every((change) => outsideResults.has(change.setting)) ? 'no frame' : 'every frame';
}
