import type { SettingName, Settings } from '@/lib/model/settings';

/** A setting's value as it would be typed on the Setup sheet; '' = the sheet is silent. */
export function typedSetting(name: SettingName, settings: Settings): string {
  const value = settings[name];
  if (value === null) return '';
  return typeof value === 'boolean' ? (value ? 'yes' : 'no') : String(value);
}

/** A setting's value as people read it: `L/250`, `as listed`, `no limit given`; null = none is given. */
export function settingText(name: SettingName, settings: Settings): string | null {
  const value = settings[name];
  switch (name) {
    case 'title':
    case 'material':
    case 'nationalAnnex':
      return value === null ? null : String(value);
    case 'stressFactor':
    case 'nearLimit':
    case 'gammaM0':
    case 'gammaM1':
      // never two figures where the third would tell them apart
      return typeof value === 'number' ? (Number(value.toFixed(2)) === value ? value.toFixed(2) : String(value)) : null;
    case 'deflectionRatio':
      return value === null ? 'no limit given' : value === 'none' ? 'none' : `L/${String(value)}`;
    case 'swayRatio':
      return value === null ? 'no limit given' : value === 'none' ? 'none' : `h/${String(value)}`;
    case 'combinationSet':
      return value === null ? 'as listed' : String(value);
    case 'shearDeformation':
      return value === true ? 'yes' : 'no';
    default:
      return String(value);
  }
}
