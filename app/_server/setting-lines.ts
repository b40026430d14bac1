import 'server-only';
import type { SettingLine } from '@/components/certificate/certificate';
import { db } from '@/db/client';
import { listChanges } from '@/db/queries/changes';
import type { RevisionRecord } from '@/db/queries/revisions';
import { originWords } from '@/lib/changes/origin-words';
import { settingText } from '@/lib/changes/setting-text';
import { settingMatters, settingWords, statedSettings, type SettingName } from '@/lib/model/settings';
import { day } from './dates';

/** Every setting of a revision's run with where it was given, one changed on screen with what it was and when. */
export async function settingLines({ id, office, settings, origins }: RevisionRecord): Promise<SettingLine[]> {
  if (settings === null) return [];
  const changes = await listChanges(db(), office, id);
  const names = origins
    ? statedSettings(settings, origins)
    : (Object.keys(settingWords) as SettingName[]).filter((name) => settingMatters(name, settings));
  return names.flatMap((name) => {
    const value = settingText(name, settings);
    if (name === 'title' || value === null) return [];
    const given = origins ? originWords(origins[name]) : 'not kept';
    const change = changes.findLast(({ change: one }) => one.kind === 'setting' && one.setting === name);
    const before = change ? `, ${day(change.at)} (was ${change.from})` : '';
    return [{ name: settingWords[name], value, source: `${given}${before}` }];
  });
}
