import type { SettingOrigin } from '@/lib/model/settings';

/** Where a setting comes from: "Setup B6", "changed on screen by Ana Lyst", "the office’s own", "default, Setup is silent". */
export function originWords({ source, cell, changedBy }: SettingOrigin): string {
  if (changedBy !== undefined) return `changed on screen by ${changedBy}`;
  if (source === 'sheet') return cell ?? 'Setup';
  return source === 'office' ? 'the office’s own' : 'default, Setup is silent';
}
