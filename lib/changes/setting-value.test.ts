import { describe, expect, it } from 'vitest';
import { changeLine, changeWords } from '@/lib/changes/change-words';
import { changeSchema } from '@/lib/changes/change';
import { settingChoices } from '@/lib/changes/setting-choices';
import { settingText } from '@/lib/changes/setting-text';
import { readSetting, saysTheSame } from '@/lib/changes/setting-value';
import { defaultSettings, settingWords, type SettingName } from '@/lib/model/settings';

describe('a value chosen on screen', () => {
  it('is what the Setup sheet would read it as, written the usual way', () => {
    expect(readSetting('stressFactor', '0,66')).toMatchObject({ typed: '0.66', settings: { stressFactor: 0.66 } });
    expect(readSetting('deflectionRatio', 'L/250')).toMatchObject({ typed: '250' });
    expect(readSetting('swayRatio', 'None')).toMatchObject({ typed: 'none' });
    expect(readSetting('analysis', 'First-Order')).toMatchObject({ typed: 'first order' });
    expect(readSetting('shearDeformation', 'off')).toMatchObject({ typed: 'no' });
    expect(readSetting('combinationSet', 'as listed')).toMatchObject({ typed: 'as listed' });
  });

  it.each<[SettingName, string, RegExp]>([
    ['nearLimit', '1.2', /at most 1|1\.2/],
    ['stressFactor', '0', /above 0|0/],
    ['analysis', 'third order', /third order/],
    ['strengthCheck', 'no such standard', /no such standard/],
    ['combinationSet', 'no such set', /no such set/],
    ['swayRatio', 'plenty', /plenty/],
    ['deflectionRatio', ' ', /value/],
  ])('is refused as the sheet refuses it: %s %s', (setting, value, words) => {
    expect(readSetting(setting, value).refused).toMatch(words);
  });

  it('changes nothing where it says what stands already', () => {
    expect(saysTheSame(defaultSettings, 'nearLimit', '0.90')).toBe(true);
    expect(saysTheSame(defaultSettings, 'nearLimit', '0.91')).toBe(false);
    expect(saysTheSame(defaultSettings, 'nearLimit', 'soon')).toBe(false);
  });
});

describe('settings offered on screen', () => {
  it('are choices that can be analysed, each explained', () => {
    for (const { setting, options, help } of settingChoices()) {
      expect(help.length, settingWords[setting]).toBeGreaterThan(20);
      for (const value of options ?? []) expect(readSetting(setting, value).refused).toBeNull();
      expect(options?.length ?? 2).toBeGreaterThan(1);
    }
    expect(settingChoices().map(({ setting }) => setting)).toEqual(
      expect.arrayContaining(['stressFactor', 'nearLimit', 'stability', 'deflectionRatio', 'swayRatio']),
    );
  });
});

describe('a change in words', () => {
  it('names the setting, what it was and what it is', () => {
    const words = changeWords({ kind: 'setting', setting: 'deflectionRatio', value: '300' }, defaultSettings);
    expect(changeLine(words)).toBe('deflection ratio: no limit given → L/300');
    const near = { kind: 'setting', setting: 'nearLimit', value: '0,8' } as const;
    expect(changeLine(changeWords(near, defaultSettings))).toBe('near limit: 0.90 → 0.80');
  });

  it('shows a factor with every figure that matters', () => {
    expect(settingText('stressFactor', { ...defaultSettings, stressFactor: 0.667 })).toBe('0.667');
  });

  it('is taken only in its own shape', () => {
    expect(changeSchema.safeParse({ kind: 'setting', setting: 'analysis', value: ' second order ' }).data).toMatchObject({
      value: 'second order',
    });
    expect(changeSchema.safeParse({ kind: 'setting', setting: 'speed', value: '1' }).success).toBe(false);
    expect(changeSchema.safeParse({ kind: 'wish', setting: 'analysis', value: '1' }).success).toBe(false);
    expect(changeSchema.safeParse({ kind: 'setting', setting: 'analysis', value: '1', row: 4 }).success).toBe(false);
  });
});
