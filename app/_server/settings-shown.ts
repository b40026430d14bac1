import 'server-only';
import type { SettingOffered } from '@/components/changes/setting-field';
import type { SettingShown } from '@/components/changes/setting-table';
import { originWords } from '@/lib/changes/origin-words';
import { settingChoices } from '@/lib/changes/setting-choices';
import { settingText, typedSetting } from '@/lib/changes/setting-text';
import { settingWords, statedSettings, type SettingOrigins, type Settings } from '@/lib/model/settings';

/** Every setting with its value and where that comes from, in the order of the sheet's contract. */
export function settingsShown(settings: Settings, origins: SettingOrigins): SettingShown[] {
  return statedSettings(settings, origins).map((name) => ({
    setting: settingWords[name],
    value: settingText(name, settings) ?? 'none given',
    source: originWords(origins[name]),
    onScreen: origins[name].changedBy !== undefined,
  }));
}

/** The settings that may be chosen on screen, each with what it is now. */
export function settingsOffered(settings: Settings): SettingOffered[] {
  return settingChoices().map(({ setting, ...choice }) => ({
    ...choice,
    setting,
    word: settingWords[setting],
    typed: typedSetting(setting, settings),
    now: settingText(setting, settings) ?? 'none given',
  }));
}
