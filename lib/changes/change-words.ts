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
