import 'server-only';
import type { SettingLine } from '@/components/certificate/certificate';
import type { RevisionRecord } from '@/db/queries/revisions';
import { settingText } from '@/lib/changes/setting-text';
import { settingWords, type SettingName, type SettingOrigin } from '@/lib/model/settings';

/** Every setting of a revision's run with where it was given; one that none gave is left out. */
export function settingLines({ settings, origins }: Pick<RevisionRecord, 'settings' | 'origins'>): SettingLine[] {
  if (settings === null) return [];
  return (Object.keys(settingWords) as SettingName[]).flatMap((name) => {
    const value = settingText(name, settings);
    return name === 'title' || value === null ? [] : [{ name: settingWords[name], value, source: sourceWords(origins?.[name]) }];
  });
}

function sourceWords(origin: SettingOrigin | undefined): string {
  if (origin === undefined) return 'not kept';
  if (origin.source === 'default') return 'default, Setup is silent';
  return origin.cell ?? (origin.source === 'office' ? 'the office’s own' : 'Setup');
}
